import { boxOfPiece, overlaps } from './boxes';
import { APART, type Lane } from './grid';
import type { Box, Point } from './types';

/** How far a piece may be moved, nearest first [px]. */
const OFFSETS = [8, -8, 12, -12, 16, -16, 24, -24, 32, -32, 40, -40, 48, -48] as const;
/** Clear of symbols, as when the way was found [px]. */
const CLEAR = 6;
/** What is left of the straight piece at a port [px]. */
const SHORTEST_STUB = 8;

export interface Piece extends Lane {
  readonly line: number;
  /** Index of its first point. */
  readonly k: number;
}

export function piecesOf(lines: readonly (readonly Point[])[]): Piece[] {
  const pieces: Piece[] = [];
  lines.forEach((points, line) => {
    for (let k = 0; k + 1 < points.length; k++) pieces.push(pieceAt(points, line, k));
  });
  return pieces;
}

const piecesOfLine = (points: readonly Point[], line: number): readonly Piece[] =>
  Array.from({ length: points.length - 1 }, (_, k) => pieceAt(points, line, k));

export function pieceAt(points: readonly Point[], line: number, k: number): Piece {
  const [x1, y1] = points[k]!;
  const [x2, y2] = points[k + 1]!;
  const across = y1 === y2;
  return across
    ? { line, k, across, at: y1, lo: Math.min(x1, x2), hi: Math.max(x1, x2) }
    : { line, k, across, at: x1, lo: Math.min(y1, y2), hi: Math.max(y1, y2) };
}

const tooClose = (a: Piece, b: Piece, apart: number = APART): boolean =>
  a.line !== b.line &&
  a.across === b.across &&
  Math.abs(a.at - b.at) < apart &&
  a.lo < b.hi + 4 &&
  b.lo < a.hi + 4;

const cross = (a: Piece, b: Piece): boolean =>
  a.line !== b.line && a.across !== b.across && a.at > b.lo && a.at < b.hi && b.at > a.lo && b.at < a.hi;

/**
 * Lines that another line runs along, each with the lines it is too close to.
 *
 * @param apart nearer than this is too close [px]
 */
export function tangles(
  lines: readonly (readonly Point[])[],
  apart: number = APART,
): ReadonlyMap<number, ReadonlySet<number>> {
  const out = new Map<number, Set<number>>();
  const note = (line: number, other: number): void => {
    const near = out.get(line);
    if (near) near.add(other);
    else out.set(line, new Set([other]));
  };
  const pieces = piecesOf(lines);
  for (const across of [true, false]) {
    const side = pieces.filter((piece) => piece.across === across).sort((a, b) => a.at - b.at);
    for (let n = 0; n < side.length; n++) {
      const a = side[n]!;
      for (let m = n + 1; m < side.length && side[m]!.at - a.at < apart; m++) {
        if (!tooClose(a, side[m]!, apart)) continue;
        note(a.line, side[m]!.line);
        note(side[m]!.line, a.line);
      }
    }
  }
  return out;
}

/** How far two close pieces run along one another, so that a shorter stretch counts as progress [px]. */
const sharedLength = (a: Piece, b: Piece): number => Math.max(0, Math.min(a.hi, b.hi) - Math.max(a.lo, b.lo));

/** What running along another line counts for, against one for a crossing. */
export const TANGLE = 100;

/** Closeness and crossings of one line with all others: fewer is better. */
export function trouble(points: readonly Point[], line: number, others: readonly Piece[]): number {
  let sum = 0;
  for (let k = 0; k + 1 < points.length; k++) {
    const piece = pieceAt(points, line, k);
    for (const other of others) {
      if (tooClose(piece, other)) sum += TANGLE + sharedLength(piece, other) / 4;
      else if (cross(piece, other)) sum += 1;
    }
  }
  return sum;
}

function moved(points: readonly Point[], k: number, by: number): Point[] {
  const out = [...points];
  const [x1, y1] = points[k]!;
  const [x2, y2] = points[k + 1]!;
  if (y1 === y2) {
    out[k] = [x1, y1 + by];
    out[k + 1] = [x2, y2 + by];
  } else {
    out[k] = [x1 + by, y1];
    out[k + 1] = [x2 + by, y2];
  }
  return out;
}

/** A moved piece must not turn a neighbour round, eat up a stub or run into a symbol. */
function allowed(
  before: readonly Point[],
  after: readonly Point[],
  k: number,
  obstacles: readonly Box[],
): boolean {
  for (const n of [k - 1, k + 1]) {
    const [a, b, c, d] = [before[n]!, before[n + 1]!, after[n]!, after[n + 1]!];
    const was = b[0] - a[0] + (b[1] - a[1]);
    const is = d[0] - c[0] + (d[1] - c[1]);
    const least = n === 0 || n + 2 === after.length ? SHORTEST_STUB : 4;
    if (Math.sign(was) !== Math.sign(is) || Math.abs(is) < least) return false;
  }
  for (const n of [k - 1, k, k + 1]) {
    const [first, last] = [n === 0, n + 2 === after.length];
    // Of a piece at a port only what it gained: the rest leads into its own symbol.
    if ((first || last) && lengthAt(after, n) <= lengthAt(before, n)) continue;
    const from = first ? before[1]! : after[n]!;
    const to = last ? before[n]! : after[n + 1]!;
    const box = boxOfPiece(from, to, CLEAR);
    if (obstacles.some((o) => overlaps(o, box))) return false;
  }
  return true;
}

const lengthAt = (points: readonly Point[], n: number): number =>
  Math.abs(points[n + 1]![0] - points[n]![0]) + Math.abs(points[n + 1]![1] - points[n]![1]);

/**
 * Draws parallel pieces apart that would lie on or close to one another. Only pieces between two bends move; those
 * at ports stay. Of the free places the one with the fewest crossings is taken, the nearest among equals.
 *
 * @param fixed lines that keep their place (bends moved by hand)
 */
export function drawApart(
  lines: readonly (readonly Point[])[],
  obstacles: readonly Box[],
  fixed: readonly boolean[],
): readonly (readonly Point[])[] {
  const out = [...lines];
  const pieces = out.map((points, line) => piecesOfLine(points, line));
  for (let round = 0; round < 3; round++) {
    let changed = false;
    for (let line = 0; line < out.length; line++) {
      if (fixed[line]) continue;
      for (let k = 1; k + 2 < out[line]!.length; k++) {
        const better = shifted(out, pieces, line, k, obstacles);
        if (!better) continue;
        out[line] = better;
        pieces[line] = piecesOfLine(better, line);
        changed = true;
      }
    }
    if (!changed) break;
  }
  return out;
}

function shifted(
  lines: readonly (readonly Point[])[],
  pieces: readonly (readonly Piece[])[],
  line: number,
  k: number,
  obstacles: readonly Box[],
): Point[] | undefined {
  const points = lines[line]!;
  const piece = pieces[line]![k]!;
  if (!pieces.some((other) => other.some((p) => tooClose(piece, p)))) return undefined;
  const others = pieces.flat().filter((p) => p.line !== line);
  let least = trouble(points, line, others);
  let best: Point[] | undefined;
  for (const by of OFFSETS) {
    const candidate = moved(points, k, by);
    if (!allowed(points, candidate, k, obstacles)) continue;
    const left = trouble(candidate, line, others);
    if (left < least) {
      least = left;
      best = candidate;
    }
  }
  return best;
}
