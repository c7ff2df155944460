import type { StreamId } from '../../engine/ids';
import { Diamond } from '../../parts/Diamond';
import { TextField } from '../../parts/TextField';
import type { SketchStream } from '../../sketch/types';
import { describeStream, setNumber, setStreamName } from '../../store/commands';
import { useResults, useSketch, useStores, useStream, useStreamResult } from '../../store/react';
import { shownStream } from '../../store/resultsStore';
import { Head } from '../Head';
import { run } from '../run';
import { FieldFindingList } from '../unit/SettingRow';
import { portWord } from '../words';
import { Composition } from './Composition';
import { Conditions, Energies } from './Conditions';
import { Phases } from './Phases';
import { phaseSentence } from './sentence';

/** One stream: conditions, composition, phases. */
export function StreamDrawer({ id }: { readonly id: StreamId }) {
  const stream = useStream(id);
  const entry = useStreamResult(id);
  const shown = shownStream(entry);
  const all = useResults((state) => state.findings);
  if (!stream) return null;
  const findings = all.filter((finding) => finding.at.stream === id);
  const state = shown
    ? `${phaseSentence(shown.result)}${shown.outOfDate ? ' Out of date: shown until there is a new answer.' : ''}`
    : entry?.latest.state === 'no-solution'
      ? 'No solution upstream; no result is shown.'
      : 'Waiting for what is upstream.';
  return (
    <>
      <Head
        label={`Stream ${stream.number}`}
        mark={<Diamond number={stream.number} chosen size={26} />}
        title={<Title stream={stream} />}
        sentence={
          <>
            <Ends stream={stream} /> {state}
          </>
        }
      />
      <div className="drawer-body">
        {findings.length > 0 ? (
          <section className="section">
            <FieldFindingList findings={findings} />
          </section>
        ) : null}
        {shown ? (
          <>
            <Conditions stream={shown.result} outOfDate={shown.outOfDate} />
            <Composition stream={shown.result} outOfDate={shown.outOfDate} />
            <Phases stream={shown.result} outOfDate={shown.outOfDate} />
            <Energies stream={shown.result} outOfDate={shown.outOfDate} />
          </>
        ) : null}
      </div>
    </>
  );
}

function Title({ stream }: { readonly stream: SketchStream }) {
  const { sketch } = useStores();
  const units = useSketch((state) => state.sketch.units);
  const writable = useSketch((state) => state.writable);
  return (
    <span className="names">
      <span className="fixed">Stream</span>
      <TextField
        label="Stream number"
        path="number"
        className="tag"
        value={stream.number}
        disabled={!writable}
        onCommit={(text) => run(sketch, (s) => setNumber(s, stream.id, text))}
      />
      <TextField
        label="Description"
        path="name"
        value={stream.name ?? ''}
        placeholder={describeStream({ units }, stream) || 'description'}
        disabled={!writable}
        onCommit={(text) => run(sketch, (s) => setStreamName(s, stream.id, text))}
      />
    </span>
  );
}

/** "From V-101, vapour, to C-101, feed 1." with the tags as links. */
function Ends({ stream }: { readonly stream: SketchStream }) {
  const { session } = useStores();
  const units = useSketch((state) => state.sketch.units);
  const end = (place: SketchStream['from']) => {
    const unit = place && units.find((u) => u.id === place[0]);
    if (!place || !unit) return null;
    return (
      <button
        type="button"
        className="link"
        title={portWord(unit.kind, place[1])}
        onClick={() => session.select([unit.id])}
      >
        {unit.tag}
      </button>
    );
  };
  return (
    <>
      {stream.from ? <>From {end(stream.from)} </> : 'Without a source '}
      {stream.to ? <>to {end(stream.to)}.</> : ', leaving the sketch.'}
    </>
  );
}
