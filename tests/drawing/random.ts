import type { Sketch } from '../../src/sketch/types';
import { sheetOf } from './sheets';

/** A small generator of repeatable numbers in 0..1 (mulberry32, public domain). */
export function seeded(seed: number): () => number {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = Math.imul(a ^ (a >>> 15), 1 | a);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

const KINDS = ['valve', 'heater', 'cooler', 'drum', 'join', 'divide'] as const;
const INS: Readonly<Record<string, readonly string[]>> = {
  product: ['in'],
  valve: ['in'],
  heater: ['in'],
  cooler: ['in'],
  drum: ['in1', 'in2'],
  join: ['in1', 'in2', 'in3'],
  divide: ['in'],
};
const OUTS: Readonly<Record<string, readonly string[]>> = {
  feed: ['out'],
  valve: ['out'],
  heater: ['out'],
  cooler: ['out'],
  drum: ['vapour', 'liquid'],
  join: ['out'],
  divide: ['out1', 'out2', 'out3'],
};

/** Units on a coarse grid, no two in one place, their outlets joined to inlets at random; what is left hangs. */
export function randomSheet(seed: number, count = 6 + (seed % 12)): Sketch {
  const next = seeded(seed);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(next() * list.length)]!;
  const columns = 6;
  const cells = Array.from({ length: columns * 4 }, (_, k) => k);
  const units: Parameters<typeof sheetOf>[0][number][] = [];
  for (let k = 0; k < count; k++) {
    const cell = cells.splice(Math.floor(next() * cells.length), 1)[0]!;
    const kind = k < 2 ? 'feed' : k < 4 ? 'product' : pick(KINDS);
    const x = 120 + 200 * (cell % columns) + 8 * Math.floor(next() * 5);
    const y = 120 + 200 * Math.floor(cell / columns) + 8 * Math.floor(next() * 5);
    const turn = next() < 0.2 ? pick([90, 180, 270] as const) : 0;
    units.push([
      kind,
      `${kind.slice(0, 2).toUpperCase()}-${k + 1}`,
      x,
      y,
      { turn, ...(next() < 0.2 ? { mirror: true } : {}) },
    ]);
  }
  const ends = (ports: Readonly<Record<string, readonly string[]>>): string[] =>
    units.flatMap(([kind, tag]) => (ports[kind] ?? []).map((port) => `${tag}.${port}`));
  const inlets = ends(INS);
  const streams: [string, string, string][] = [];
  for (const outlet of ends(OUTS)) {
    const fits = inlets.filter((inlet) => inlet.split('.')[0] !== outlet.split('.')[0]);
    const target = next() < 0.85 && fits.length > 0 ? pick(fits) : '';
    if (target) inlets.splice(inlets.indexOf(target), 1);
    streams.push([`${streams.length + 1}`, outlet, target]);
  }
  for (const inlet of inlets.slice(0, 2)) streams.push([`${streams.length + 1}`, '', inlet]);
  return sheetOf(units, streams);
}
