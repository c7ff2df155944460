import type { UnitId } from '../engine/ids';
import type { Sketch } from '../sketch/types';
import { BEND, bendsLeft, type Heading } from './search';
import type { StandingUnit } from './standing';
import { AWAY, HEADING, opposite, portOnSheet } from './transform';
import type { Point, PortPlace, SymbolData } from './types';

/** A line's way is weighed by length and bends between the ends of its straight pieces [px]. */
const STUB = 24;
/** A line that hangs stays on its own side unless another one has a use for it [px]. */
const MOVED_HANGING = 20;

interface DotEnd {
  readonly name: string;
  /** Where the line's other end is; undefined: it hangs. */
  readonly other: StandingUnit | undefined;
  readonly otherPort: string;
}

const chosen = new WeakMap<SymbolData, Map<string, SymbolData>>();

/**
 * Dots turned by no one: each line takes the side that suits it, so that joining or dividing a stream needs no turning.
 * Ports keep their names; only their places around the dot change.
 */
export function withSides(units: readonly StandingUnit[], sketch: Sketch): readonly StandingUnit[] {
  const byId = new Map<UnitId, StandingUnit>(units.map((u) => [u.unit.id, u]));
  const ends = new Map<UnitId, DotEnd[]>();
  const note = (unit: UnitId, end: DotEnd): void => {
    if (!byId.get(unit)?.symbol.sides) return;
    const list = ends.get(unit);
    if (list) list.push(end);
    else ends.set(unit, [end]);
  };
  for (const { from, to } of sketch.streams) {
    if (from) note(from[0], { name: from[1], other: to && byId.get(to[0]), otherPort: to?.[1] ?? '' });
    if (to) note(to[0], { name: to[1], other: from && byId.get(from[0]), otherPort: from?.[1] ?? '' });
  }
  return units.map((u) => {
    const own = ends.get(u.unit.id);
    const { sides } = u.symbol;
    if (!sides || !own || own.length > sides.length || u.pose.turn !== 0 || u.pose.mirror) return u;
    return { ...u, symbol: symbolWith(u.symbol, sides, own, best(u, sides, own)) };
  });
}

/** Index of a side for each end: the cheapest way to give them out, the usual places among equals. */
function best(u: StandingUnit, sides: readonly PortPlace[], ends: readonly DotEnd[]): readonly number[] {
  const usual = ends.map(({ name }) => sides.indexOf(u.symbol.ports(name)!));
  const price = ends.map((end, k) => sides.map((side, s) => priceOf(u, side, end, s === usual[k])));
  let least = Infinity;
  let found: readonly number[] = usual;
  const given: number[] = [];
  const give = (sum: number): void => {
    const k = given.length;
    if (k === ends.length) {
      if (sum < least - 1e-9) {
        least = sum;
        found = [...given];
      }
      return;
    }
    const order = [usual[k]!, ...sides.keys()];
    for (const s of new Set(order)) {
      if (s < 0 || given.includes(s)) continue;
      given.push(s);
      give(sum + price[k]![s]!);
      given.pop();
    }
  };
  give(0);
  return found;
}

function priceOf(u: StandingUnit, side: PortPlace, end: DotEnd, usual: boolean): number {
  if (!end.other) return usual ? 0 : MOVED_HANGING;
  const at = stubEnd(portOnSheet(u.pose, side));
  const { symbol, pose } = end.other;
  const port = symbol.sides ? undefined : symbol.ports(end.otherPort);
  const far = port && portOnSheet(pose, port);
  const to: Point = far ? stubEnd(far) : pose.at;
  const arrive: Heading | undefined = far && HEADING[opposite(far.side)];
  const [dx, dy] = [to[0] - at[0], to[1] - at[1]];
  return Math.abs(dx) + Math.abs(dy) + BEND * bendsLeft(dx, dy, HEADING[side.side], arrive);
}

const stubEnd = ({ at: [x, y], side }: PortPlace): Point => [
  x + STUB * AWAY[side][0],
  y + STUB * AWAY[side][1],
];

/** The symbol with its ports at the chosen sides; ports without a line have what is left. */
function symbolWith(
  symbol: SymbolData,
  sides: readonly PortPlace[],
  ends: readonly DotEnd[],
  given: readonly number[],
): SymbolData {
  const key = ends.map(({ name }, k) => `${name} ${given[k]}`).join();
  const known = chosen.get(symbol) ?? new Map<string, SymbolData>();
  chosen.set(symbol, known);
  const before = known.get(key);
  if (before) return before;
  const places = new Map(ends.map(({ name }, k): [string, PortPlace] => [name, sides[given[k]!]!]));
  const left = sides.filter((_, s) => !given.includes(s));
  const data: SymbolData = {
    ...symbol,
    ports(name) {
      const place = places.get(name);
      if (place) return place;
      const usual = symbol.ports(name);
      if (!usual || left.length === 0 || left.includes(usual)) return usual;
      return left[sides.indexOf(usual) % left.length];
    },
  };
  known.set(key, data);
  return data;
}
