import type { UnitId } from '../engine/ids';
import { useCompiled, useResults, useSketch } from '../store/react';
import { capital, sayLoopStop } from '../wording';

/** Why the balance cannot be closed: the first causes, then what waits for them. */
export function OpenClosure({ isOld }: { readonly isOld: boolean }) {
  const units = useSketch((state) => state.sketch.units);
  const gaps = useCompiled((state) => state.gaps);
  const results = useResults((state) => state.units);
  const basis = useCompiled((state) => state.basis);
  const solvedEdit = useResults((state) => state.solvedEdit);
  const lacking = new Set<UnitId>();
  for (const gap of gaps) if (gap.at.unit) lacking.add(gap.at.unit);
  const known = (id: string) => units.find((unit) => unit.id === id);
  const names = {
    tag: (id: string) => known(id)?.tag,
    kind: (id: string) => known(id)?.kind,
    chemical: (id: string) => basis?.chemicals.find((chemical) => chemical.id === id)?.name,
  };
  /** What stops a unit; what stops a whole loop is told of the loop. */
  const stops = units.flatMap(({ id, tag }) => {
    const latest = results.get(id)?.latest;
    const [reason] = latest?.reasons ?? [];
    const loop = reason && sayLoopStop(reason, names);
    if (latest?.state === 'needs-value' && loop) return [`${capital(loop)}.`];
    if (latest?.state !== 'no-solution' || lacking.has(id)) return [];
    return [loop ? `${capital(loop)}.` : `${tag} has no solution.`];
  });
  const tags = units.filter((u) => lacking.has(u.id)).map((u) => u.tag);
  const causes = [
    ...(tags.length > 0 ? [`${listed(tags)} ${tags.length === 1 ? 'needs' : 'need'} a value.`] : []),
    ...new Set(stops),
    ...(tags.length === 0 && gaps.length > 0
      ? ['Something about the chemicals, the model or the site is missing.']
      : []),
  ];
  return (
    <>
      <h3>{solvedEdit === 0 && causes.length === 0 ? 'Not solved yet' : 'Closure is open'}</h3>
      <p>{causes.join(' ')}</p>
      {isOld ? <p>What is drawn in italics is out of date.</p> : null}
    </>
  );
}

const listed = (tags: readonly string[]): string =>
  tags.length > 4 ? `${tags.slice(0, 4).join(', ')} and ${tags.length - 4} more` : tags.join(', ');
