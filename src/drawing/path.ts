import { arrowhead } from './symbols/shapes';
import type { Point, Side } from './types';

const BEND_R = 3;
const BRIDGE_R = 5;
const HEAD = { long: 9, half: 3.5, covered: 6 } as const;

/** What of a line is drawn: the path, and its arrowhead with the side it points to. */
export interface DrawnPath {
  readonly d: string;
  readonly head: string;
  readonly arrow: { readonly at: Point; readonly side: Side };
}

const toward = (a: Point, b: Point): Point => [Math.sign(b[0] - a[0]), Math.sign(b[1] - a[1])];
const sideOf = ([ux, uy]: Point): Side => (ux > 0 ? 'right' : ux < 0 ? 'left' : uy > 0 ? 'bottom' : 'top');
const n = (value: number): number => Math.round(value * 100) / 100;

/** Places where a horizontal piece jumps over vertical ones, by line and piece: x values in no order. */
export type Bridges = ReadonlyMap<number, ReadonlyMap<number, readonly number[]>>;

/**
 * Crossings of the lines, kept by the horizontal piece; those too near a bend or end of it cannot be jumped and are
 * left out.
 *
 * @param only lines whose bridges are asked for; absent: all
 */
export function bridgesOf(lines: readonly (readonly Point[])[], only?: ReadonlySet<number>): Bridges {
  const downs: { x: number; lo: number; hi: number }[] = [];
  for (const points of lines) {
    for (let k = 0; k + 1 < points.length; k++) {
      const [x1, y1] = points[k]!;
      const [x2, y2] = points[k + 1]!;
      if (x1 === x2 && y1 !== y2) downs.push({ x: x1, lo: Math.min(y1, y2), hi: Math.max(y1, y2) });
    }
  }
  const bridges = new Map<number, Map<number, number[]>>();
  lines.forEach((points, line) => {
    if (only && !only.has(line)) return;
    for (let k = 0; k + 1 < points.length; k++) {
      const [x1, y1] = points[k]!;
      const [x2, y2] = points[k + 1]!;
      if (y1 !== y2) continue;
      const room = BRIDGE_R + BEND_R;
      const lo = Math.min(x1, x2) + room;
      const hi = Math.max(x1, x2) - room;
      const xs = downs.filter((d) => d.x >= lo && d.x <= hi && d.lo < y1 && d.hi > y1).map((d) => d.x);
      if (xs.length === 0) continue;
      const own = bridges.get(line) ?? new Map<number, number[]>();
      own.set(k, [...new Set(xs)]);
      bridges.set(line, own);
    }
  });
  return bridges;
}

/** Jumps on one piece in the order of travel; jumps that would run into each other become one wide jump. */
function jumps(xs: readonly number[], forward: boolean): readonly (readonly [number, number])[] {
  const spans: [number, number][] = [];
  for (const x of [...xs].sort((a, b) => a - b)) {
    const last = spans.at(-1);
    if (last && x - BRIDGE_R < last[1] + 2) last[1] = x + BRIDGE_R;
    else spans.push([x - BRIDGE_R, x + BRIDGE_R]);
  }
  return forward ? spans : spans.reverse().map(([a, b]): [number, number] => [b, a]);
}

function jump(from: number, to: number, y: number): string {
  const sign = Math.sign(to - from);
  const sweep = sign > 0 ? 1 : 0;
  const r = BRIDGE_R;
  if (Math.abs(to - from) <= 2 * r) return `H${n(from)}A${r} ${r} 0 0 ${sweep} ${n(to)} ${n(y)}`;
  return (
    `H${n(from)}A${r} ${r} 0 0 ${sweep} ${n(from + sign * r)} ${n(y - r)}` +
    `H${n(to - sign * r)}A${r} ${r} 0 0 ${sweep} ${n(to)} ${n(y)}`
  );
}

/**
 * Path of a line: bends rounded, crossings jumped, its ends carried on to the edge of a dot, the last piece ending
 * inside the arrowhead.
 *
 * @param reach how far the drawn line goes on beyond its first and last point [px]
 */
export function drawPath(
  points: readonly Point[],
  bridges: ReadonlyMap<number, readonly number[]> | undefined,
  reach: readonly [number, number],
): DrawnPath {
  const last = points.length - 1;
  const first = toward(points[0]!, points[1]!);
  const final = toward(points[last - 1]!, points[last]!);
  const start: Point = [points[0]![0] - first[0] * reach[0], points[0]![1] - first[1] * reach[0]];
  const tip: Point = [points[last]![0] + final[0] * reach[1], points[last]![1] + final[1] * reach[1]];
  const end: Point = [tip[0] - final[0] * HEAD.covered, tip[1] - final[1] * HEAD.covered];
  let d = `M${n(start[0])} ${n(start[1])}`;
  for (let k = 0; k < last; k++) {
    const [x1] = points[k]!;
    const [x, y] = points[k + 1]!;
    for (const [a, b] of jumps(bridges?.get(k) ?? [], x > x1)) d += jump(a, b, y);
    if (k + 1 === last) break;
    const into = toward(points[k]!, points[k + 1]!);
    const out = toward(points[k + 1]!, points[k + 2]!);
    const r = Math.min(BEND_R, half(points[k]!, points[k + 1]!), half(points[k + 1]!, points[k + 2]!));
    d += `L${n(x - into[0] * r)} ${n(y - into[1] * r)}Q${n(x)} ${n(y)} ${n(x + out[0] * r)} ${n(y + out[1] * r)}`;
  }
  d += `L${n(end[0])} ${n(end[1])}`;
  return {
    d,
    head: arrowhead([n(tip[0]), n(tip[1])], final, HEAD.long, HEAD.half),
    arrow: { at: tip, side: sideOf(final) },
  };
}

const half = (a: Point, b: Point): number => (Math.abs(b[0] - a[0]) + Math.abs(b[1] - a[1])) / 2;
