import type { UnitId } from '../engine/ids';
import { useCompiled, useResults, useSketch } from '../store/react';

/** Why the balance cannot be closed: the first causes, then what waits for them. */
export function OpenClosure({ isOld }: { readonly isOld: boolean }) {
  const units = useSketch((state) => state.sketch.units);
  const gaps = useCompiled((state) => state.gaps);
  const results = useResults((state) => state.units);
  const solvedEdit = useResults((state) => state.solvedEdit);
  const lacking = new Set<UnitId>();
  for (const gap of gaps) if (gap.at.unit) lacking.add(gap.at.unit);
  const inState = (state: string): readonly string[] =>
    units.filter((u) => !lacking.has(u.id) && results.get(u.id)?.latest.state === state).map((u) => u.tag);
  const tags = units.filter((u) => lacking.has(u.id)).map((u) => u.tag);
  const causes = [
    ...(tags.length > 0 ? [`${listed(tags)} ${tags.length === 1 ? 'needs' : 'need'} a value.`] : []),
    ...inState('no-solution').map((tag) => `${tag} has no solution.`),
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
