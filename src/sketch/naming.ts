import type { Port, StreamId, UnitId } from '../engine/ids';
import type { KindCatalogue } from '../engine/units/types';
import { isThere, kindOf, type Registry } from './registry';
import type { Sketch, SketchStream, SketchUnit } from './types';

const FIRST_TAG = 101;
/** Numbers above this are names by chance (dates, serial numbers) and start no series. */
const LARGEST = 1_000_000;

/** One above the highest whole number in use; numbers of deleted things are not handed out again while higher ones stand. */
function nextNumber(used: Iterable<string>, first: number): number {
  let highest = first - 1;
  for (const text of used) {
    const n = /^\d{1,7}$/.test(text) ? Number(text) : 0;
    if (n > highest && n <= LARGEST) highest = n;
  }
  return highest + 1;
}

/** V-101, V-102 ... for equipment that is drawn with its tag; FEED-1, J-1 ... for identifiers. */
export function nextTag(units: readonly SketchUnit[], kind: KindCatalogue): string {
  const stem = `${kind.tag.letters}-`;
  const used = units.filter((u) => u.tag.startsWith(stem)).map((u) => u.tag.slice(stem.length));
  return `${stem}${nextNumber(used, kind.tag.drawn ? FIRST_TAG : 1)}`;
}

/** The next free stream number, as text. */
export const nextStreamNumber = (streams: readonly Pick<SketchStream, 'number'>[]): string =>
  String(
    nextNumber(
      streams.map((s) => s.number),
      1,
    ),
  );

function nextId(stem: string, records: readonly { readonly id: string }[]): string {
  const used = records.filter((r) => r.id.startsWith(stem)).map((r) => r.id.slice(stem.length));
  return `${stem}${nextNumber(used, 1)}`;
}
export const nextUnitId = (sketch: Pick<Sketch, 'units'>): UnitId => nextId('u', sketch.units) as UnitId;
export const nextStreamId = (streams: readonly { readonly id: string }[]): StreamId =>
  nextId('s', streams) as StreamId;
export const nextNoteId = (notes: readonly { readonly id: string }[]): string => nextId('n', notes);

/** The stream at a port, whichever end it has there. */
export const streamAt = (
  sketch: Pick<Sketch, 'streams'>,
  unit: UnitId,
  port: Port,
): SketchStream | undefined =>
  sketch.streams.find((s) => endsAt(s.from, unit, port) || endsAt(s.to, unit, port));

const endsAt = (end: SketchStream['from'], unit: UnitId, port: Port): boolean =>
  end?.[0] === unit && end[1] === port;

/** Ports of a unit that have a stream. */
export function usedPorts(sketch: Pick<Sketch, 'streams'>, unit: UnitId): readonly Port[] {
  return sketch.streams.flatMap((s) => [s.from, s.to].flatMap((end) => (end?.[0] === unit ? [end[1]] : [])));
}

/** New streams without a target for fixed outlets that have none, so that every result has a place to stand. */
export function hangingStreams(
  units: readonly SketchUnit[],
  streams: readonly SketchStream[],
  registry: Registry,
): readonly SketchStream[] {
  const added: SketchStream[] = [];
  const used = new Set(streams.flatMap((s) => (s.from ? [JSON.stringify(s.from)] : [])));
  for (const unit of units) {
    for (const port of kindOf(registry, unit.kind)?.ports ?? []) {
      const there = port.when ? isThere(port, unit.settings) : !port.optional;
      if (port.dir !== 'out' || port.numbered || !there) continue;
      const from: readonly [UnitId, Port] = [unit.id, port.name];
      if (used.has(JSON.stringify(from))) continue;
      const all = [...streams, ...added];
      added.push({ id: nextStreamId(all), number: nextStreamNumber(all), from });
    }
  }
  return added;
}
