import { useEffect, useMemo, useRef, useState } from 'react';
import type { StreamId } from '../../engine/ids';
import { Choice } from '../../parts/Choice';
import type { FieldEdit } from '../../parts/fieldEdit';
import { useMeasures } from '../../parts/measures';
import { QuantityField } from '../../parts/QuantityField';
import { Segmented } from '../../parts/Segmented';
import { displayUnit, formatSignificant, STANDARD_SITE } from '../../quantity';
import type { Quantity } from '../../sketch/types';
import { describeStream, READABLE, scaledFlows, scaleFeeds } from '../../store/commands';
import { useResults, useSketch, useStores } from '../../store/react';
import { ScaledList } from './ScaledList';
import { type Scaling, scalingFor, type Wanted, type WhyNot } from './scaling';
import { FLOW_DIMS, missedBy, onceSolved, useBase } from './target';
import { flowText, missedSentence, tellMissed } from './words';

/** Factors outside this are slips of the hand. */
const [LEAST, MOST] = [1e-6, 1e6];

const WHY: Readonly<Record<WhyNot, string | undefined>> = {
  'nothing-asked': undefined,
  'stream-not-solved': 'This stream has no answer to count from.',
  'stream-empty': 'Nothing flows in this stream, so no factor brings it there.',
};

/**
 * Scales all feeds by a factor, or so that one stream becomes what is wanted. The sheet follows while the number moves; in
 * the end it is one step of the history, or none.
 */
export function ScaleFeeds({ close }: { readonly close: () => void }) {
  const stores = useStores();
  const { sketch, session } = stores;
  const base = useBase(stores);
  const measures = useMeasures();
  const streams = useSketch((state) => state.sketch.streams);
  const [by, setBy] = useState<Wanted['by']>('factor');
  const [factor, setFactor] = useState<Quantity | undefined>('1');
  const [stream, setStream] = useState<StreamId | undefined>(
    () => session.getState().streams[0] ?? streams[0]?.id,
  );
  const [flow, setFlow] = useState<Quantity | undefined>(undefined);
  const kept = useRef(false);

  useEffect(() => {
    sketch.begin('scale all feeds');
    return () => {
      if (!kept.current) sketch.cancel();
    };
  }, [sketch]);

  const wanted: Wanted = by === 'factor' ? { by, text: factor } : { by, stream, text: flow };
  const scaling = scalingFor(wanted, base.results);
  const ask = (next: Wanted): void => {
    setBy(next.by);
    if (next.by === 'factor') setFactor(next.text);
    else {
      setStream(next.stream);
      setFlow(next.text);
    }
    const edit = stepOf(scalingFor(next, base.results));
    sketch.change((s) => {
      const made = edit === undefined ? undefined : scaleFeeds(s, edit.factor, figuresOf(edit));
      return made?.ok ? made.sketch : s;
    });
  };
  // What was typed before there was an answer to count from is done once it has come.
  // biome-ignore lint/correctness/useExhaustiveDependencies: only when the answer comes
  useEffect(() => {
    if (base.known) ask(wanted);
  }, [base.known]);
  const before = useRef<Quantity | undefined>(undefined);
  const editOf = (make: (text: Quantity | undefined) => Wanted): FieldEdit => ({
    set: (text) => ask(make(text)),
    begin: () => {
      before.current = wanted.text;
    },
    change: (text) => ask(make(text)),
    commit: () => undefined,
    cancel: () => ask(make(before.current)),
  });

  const step = stepOf(scaling);
  const times = step?.factor ?? 1;
  const figures = figuresOf(step);
  const flows = useMemo(() => scaledFlows(base.sketch, times, figures), [base, times, figures]);
  const label = step && step.factor !== 1 ? scaleFeeds(base.sketch, step.factor, figures) : undefined;
  const keep = (): void => {
    if (!step || !label?.ok) return;
    kept.current = true;
    sketch.commit(label.label);
    session.setState({ spoken: `Done: ${label.label}` });
    close();
    if (step.target) {
      const { target } = step;
      onceSolved(stores, () => tellMissed(stores, target));
    }
  };

  return (
    <div className="scale-feeds">
      <Segmented
        label="Scale all feeds"
        path="scale.by"
        options={[
          { value: 'factor', text: 'by a factor' },
          { value: 'stream', text: 'so that a stream becomes' },
        ]}
        value={by}
        onChange={(next) =>
          ask(next === 'factor' ? { by: next, text: factor } : { by: next, stream, text: flow })
        }
      />
      {by === 'factor' ? (
        <QuantityField
          label="Factor"
          path="scale.factor"
          value={factor}
          dims="number"
          min={LEAST}
          max={MOST}
          needed
          site={STANDARD_SITE}
          edit={editOf((text) => ({ by: 'factor', text }))}
        />
      ) : (
        <>
          <Choice
            label="Stream"
            path="scale.stream"
            value={stream ?? ''}
            options={streams.map((s) => ({
              value: s.id,
              text: `${s.number} ${describeStream(base.sketch, s)}`.trim(),
            }))}
            onChange={(id) => ask({ by: 'stream', stream: id as StreamId, text: flow })}
          />
          <QuantityField
            label="Flow wanted"
            path="scale.flow"
            value={flow}
            dims={FLOW_DIMS}
            min={0}
            needed
            unitKept={displayUnit('molarFlow', measures).unit}
            site={STANDARD_SITE}
            edit={editOf((text) => ({ by: 'stream', stream, text }))}
          />
          <StreamNow stream={stream} scaling={step} isKnown={base.known} />
        </>
      )}
      {typeof scaling === 'string' && WHY[scaling] ? (
        <p className="refusal" role="alert">
          {base.known ? WHY[scaling] : 'Waiting for the answer to count from.'}
        </p>
      ) : null}
      {by === 'stream' && step ? (
        <p className="muted">
          Factor <b data-field="scale.computed">{formatSignificant(step.factor, 5)}</b>
        </p>
      ) : null}
      <ScaledList flows={flows} sketch={base.sketch} />
      <p className="scale-end">
        <button type="button" className="button fill" disabled={!label?.ok} onClick={keep}>
          {label?.ok ? `Keep: × ${formatSignificant(times, 4)}` : 'Keep'}
        </button>
        <button type="button" className="button line" onClick={close}>
          Take it back
        </button>
      </p>
    </div>
  );
}

const stepOf = (scaling: Scaling | WhyNot): Scaling | undefined =>
  typeof scaling === 'string' ? undefined : scaling;

/** A factor that is computed has more figures than anybody would type. */
const figuresOf = (step: Scaling | undefined): number | undefined => (step?.target ? READABLE : undefined);

/** What the chosen stream carries now, and whether it came out as wanted. */
function StreamNow({
  stream,
  scaling,
  isKnown,
}: {
  readonly stream: StreamId | undefined;
  readonly scaling: Scaling | undefined;
  readonly isKnown: boolean;
}) {
  const stores = useStores();
  const measures = useMeasures();
  const results = useResults((state) => state);
  const edit = useSketch((state) => state.edit);
  if (!stream || !isKnown) return null;
  const texts = FLOW_DIMS.flatMap((dim) => flowText(results, { stream, dim }, measures) ?? []);
  const missed =
    scaling?.target && results.solvedEdit >= edit ? missedBy(results, scaling.target) : undefined;
  return (
    <>
      <p className="muted" data-field="scale.now">
        {texts.length > 0 ? `Now ${texts.join(' or ')}.` : 'No answer now.'}
      </p>
      {scaling?.target && missed !== undefined ? (
        <p className="refusal">{missedSentence(stores, scaling.target, missed).join(' ')}</p>
      ) : null}
    </>
  );
}
