import type { LabelShape, UnitShape } from '../drawing/types';
import type { UnitId } from '../engine/ids';
import type { Finding } from '../engine/outcome';
import { weightWord, worstFirst } from '../parts/LimitMark';
import type { SketchStream, SketchUnit } from '../sketch/types';
import { kindWord, type SayContext, sayFinding, stateWord } from '../wording';

/** "V-101, flash drum, solved, caution: liquid leaves at its bubble point": what a screen reader hears of a unit. */
export function unitName(
  unit: SketchUnit,
  shape: UnitShape | undefined,
  reasons: readonly Finding[],
  limits: readonly Finding[],
  context: SayContext,
): string {
  const say = (finding: Finding): string => sayFinding(finding, context).sentence.replace(/\.$/, '');
  const state = shape?.state ?? 'waiting';
  const [reason] = reasons;
  const why = reason && state !== 'solved' ? say(reason) : '';
  const [worst] = worstFirst(limits);
  return [
    unit.tag,
    unit.name,
    kindWord(unit.kind, unit.settings.service),
    stateAndReason(stateWord(state), why),
    worst && `${weightWord(worst.weight)}: ${say(worst)}`,
  ]
    .filter(Boolean)
    .join(', ');
}

/** "needs a value: no stream enters"; a reason that says the state itself stands alone. */
function stateAndReason(state: string, why: string): string {
  if (why === '') return state;
  return /^needs /i.test(why)
    ? `n${why.slice(1)}`
    : `${state}: ${why.charAt(0).toLowerCase()}${why.slice(1)}`;
}

/** "Stream 3, PV-101 to V-101, 120.0 kmol/h, 56.65 °C": what a screen reader hears of a stream. */
export function streamName(
  stream: SketchStream,
  label: LabelShape | undefined,
  tagOf: (id: UnitId) => string,
): string {
  const from = stream.from ? tagOf(stream.from[0]) : 'nowhere yet';
  const to = stream.to ? tagOf(stream.to[0]) : 'nowhere yet';
  const numbers = label?.rows.map((row) => `${row.number} ${row.unit}`.trim()) ?? [];
  return [
    `Stream ${stream.number}`,
    stream.name,
    `${from} to ${to}`,
    ...(label?.stale ? ['out of date'] : []),
    ...numbers,
  ]
    .filter(Boolean)
    .join(', ');
}
