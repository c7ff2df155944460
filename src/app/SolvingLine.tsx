import type { LoopProgress } from '../engine/network/types';
import { Diamond } from '../parts/Diamond';
import { formatSignificant } from '../quantity';
import { useResults, useSketch, useStores } from '../store/react';
import { loopName } from '../wording';

/** "Solved means this or better, everywhere." */
const SOLVED = 1e-9;

/**
 * Over the foot of the sheet while a solve takes its time: where it is, in which loop, at which tear, how far; with a way to
 * stop it, and to go on after that.
 */
export function SolvingLine() {
  const { results } = useStores();
  const at = useResults((state) => (state.answering > state.solvedEdit ? state.at : null));
  const loop = useResults((state) => state.loop);
  const stopped = useResults((state) => state.stopped);
  const tag = useSketch((state) => state.sketch.units.find((unit) => unit.id === at)?.tag);
  if (stopped)
    return (
      <section className="foot-line" aria-label="Solving">
        <span>Stopped. What is drawn in italics is out of date.</span>
        <button type="button" className="button line" onClick={() => results.resume()}>
          Solve
        </button>
      </section>
    );
  if (!at) return null;
  return (
    <section className="foot-line late" aria-label="Solving">
      {loop ? <Loop loop={loop} /> : <span>Solving, at {tag}</span>}
      <button
        type="button"
        className="button line"
        title="Stop solving (Ctrl+.)"
        onClick={() => results.stop()}
      >
        Stop
      </button>
    </section>
  );
}

function Loop({ loop: { units, stream, pass, residual } }: { readonly loop: LoopProgress }) {
  const { session } = useStores();
  const number = useSketch(({ sketch }) => sketch.streams.find((s) => s.id === stream)?.number ?? stream);
  const name = useSketch(({ sketch }) => {
    const by = (id: string) => sketch.units.find((unit) => unit.id === id);
    return loopName(units, { tag: (id) => by(id)?.tag, kind: (id) => by(id)?.kind });
  });
  const off =
    residual === undefined
      ? 'first pass'
      : `pass ${pass}, ${residual > SOLVED ? `off by ${formatSignificant(residual, 1)}, solved at 10⁻⁹` : 'closing its balance'}`;
  // Every pass brings it nearer by about the same factor: equal steps of the bar.
  const behind = residual === undefined ? undefined : Math.log10(residual) / Math.log10(SOLVED);
  return (
    <>
      <span>
        Solving the loop of {name}, torn at stream{' '}
        <button
          type="button"
          className="link"
          aria-label={`Stream ${number}`}
          onClick={() => session.centre({ stream })}
        >
          <Diamond number={number} size={20} />
        </button>
        : {off}
      </span>
      <progress {...(behind === undefined ? {} : { value: behind })} max={1} aria-label="The loop closes" />
    </>
  );
}
