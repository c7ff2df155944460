import type { UnitId } from '../engine/ids';
import type { Finding } from '../engine/outcome';
import type { SayContext } from './say';

/** So many units of a loop are named, the rest are counted. */
const NAMED = 3;
/** Dots on the line: the sheet shows no tag of theirs. */
const DOTS = new Set(['join', 'divide']);

/** "a", "a and b", "a, b and c". */
const listed = (words: readonly string[]): string =>
  words.length < 2 ? words.join() : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;

/** "C-101, P-101 and 4 more": a loop by its units, in the order of their tags, those that the sheet shows first. */
export function loopName(units: readonly UnitId[], ctx: Pick<SayContext, 'tag' | 'kind'>): string {
  const isDot = (unit: UnitId): boolean => DOTS.has(ctx.kind?.(unit) ?? '');
  const tagsOf = (some: readonly UnitId[]): readonly string[] =>
    some.map((unit) => ctx.tag?.(unit) ?? unit).sort((a, b) => a.localeCompare(b, 'en', { numeric: true }));
  const tags = [...tagsOf(units.filter((unit) => !isDot(unit))), ...tagsOf(units.filter(isDot))];
  const [shown, more] = tags.length <= NAMED + 1 ? [tags, 0] : [tags.slice(0, NAMED), tags.length - NAMED];
  return more > 0 ? `${shown.join(', ')} and ${more} more` : listed(shown);
}

/** What stops a loop, by the code of its finding; the loop is named behind it. */
const STOPS: Readonly<Record<string, (chemicals: string, isOne: boolean) => string>> = {
  'network/no-way-out': (chemicals, isOne) =>
    `${chemicals} ${isOne ? 'has' : 'have'} no way out of the loop of`,
  'network/nothing-enters': () => 'nothing enters the loop of',
  'network/loop-unsettled': () => 'no solution for the loop of',
  'network/pressure-falls': () => 'the pressure falls all round the loop of',
};

/**
 * In few words what stops a whole loop: "nitrogen has no way out of the loop of V-101 and K-101"; undefined of a finding that is
 * not about a loop. All units of a loop carry the same finding.
 */
export function sayLoopStop(
  finding: Finding,
  ctx: Pick<SayContext, 'tag' | 'kind' | 'chemical'>,
): string | undefined {
  const says = Object.hasOwn(STOPS, finding.code) ? STOPS[finding.code] : undefined;
  if (!says) return undefined;
  const texts = (name: string): readonly string[] =>
    finding.evidence.flatMap((e) => (e.name === name && e.text !== undefined ? [e.text] : []));
  const chemicals = texts('chemical').map((id) => ctx.chemical?.(id) ?? id);
  return `${says(listed(chemicals), chemicals.length === 1)} ${loopName(texts('unit') as UnitId[], ctx)}`;
}
