import { portOfShape } from '../drawing/transform';
import type { UnitShape } from '../drawing/types';
import type { Port, StreamId, UnitId } from '../engine/ids';
import { CATALOGUE } from '../engine/units/catalogue';
import type { PortSpec } from '../engine/units/types';
import type { Sketch, SketchStream, SketchUnit } from '../sketch/types';
import { isOneOf, isThere, nextPortName, whyNotConnect } from '../store/commands';
import { sayEditRefusal } from '../wording';
import type { PortRef, SheetState, Target } from './sheetStore';

/** A port of a unit on the sheet, and the stream that has an end at it. */
export interface StandingPort extends Target {
  readonly stream: SketchStream | undefined;
  readonly numbered: boolean;
}

function namesOf(spec: PortSpec, used: readonly Port[]): readonly Port[] {
  if (!spec.numbered) return [spec.name];
  const own = used.filter((port) => isOneOf(spec, port));
  return own.length < spec.numbered.max ? [...own, nextPortName(spec, used)] : own;
}

const endsAt = (end: SketchStream['from'], unit: UnitId, port: Port): boolean =>
  end?.[0] === unit && end[1] === port;

/** All ports of a drawn unit: of numbered ones those in use and the next free one. */
export function portsOf(
  sketch: Pick<Sketch, 'streams'>,
  unit: SketchUnit,
  shape: UnitShape | undefined,
): StandingPort[] {
  const kind = Object.hasOwn(CATALOGUE, unit.kind) ? CATALOGUE[unit.kind] : undefined;
  if (!kind || !shape) return [];
  const mine = sketch.streams.filter((s) => s.from?.[0] === unit.id || s.to?.[0] === unit.id);
  const used = mine.flatMap((s) => [s.from, s.to].flatMap((end) => (end?.[0] === unit.id ? [end[1]] : [])));
  return kind.ports.flatMap((spec) =>
    namesOf(spec, used).flatMap((port): StandingPort[] => {
      const place = portOfShape(shape, port);
      if (!place) return [];
      // A port that a setting took away is there only for the stream that it still has.
      if (!used.includes(port) && !isThere(spec, unit.settings)) return [];
      const stream = mine.find((s) => endsAt(spec.dir === 'out' ? s.from : s.to, unit.id, port));
      return [{ unit: unit.id, port, dir: spec.dir, place, stream, numbered: spec.numbered !== undefined }];
    }),
  );
}

/** The port that a stream comes from, as it stands on the sheet. */
export function sourcePort(
  sketch: Sketch,
  shapes: SheetState['units'],
  id: StreamId,
): StandingPort | undefined {
  const end = sketch.streams.find((stream) => stream.id === id)?.from;
  const unit = end && sketch.units.find((known) => known.id === end[0]);
  return unit && portsOf(sketch, unit, shapes.get(unit.id)).find((known) => known.port === end[1]);
}

/** Whether a stream can be pulled from a port: nothing is there yet, or a stream whose other end is loose. */
export const isFree = ({ dir, stream }: StandingPort): boolean =>
  stream === undefined || (dir === 'out' ? stream.to === undefined : stream.from === undefined);

/** Of numbered ports the next free one stands for all. */
const isOffered = ({ stream, numbered }: StandingPort): boolean => !numbered || stream === undefined;

/** Every port of the other units, with the reason where the stream cannot end there. */
export function targetsFor(sketch: Sketch, from: PortRef, shapes: SheetState['units']): Target[] {
  return sketch.units
    .filter((unit) => unit.id !== from.unit)
    .flatMap((unit) => portsOf(sketch, unit, shapes.get(unit.id)).filter(isOffered))
    .map(({ unit, port, dir, place }) => {
      const refused = whyNotConnect(sketch, [from.unit, from.port], [unit, port]);
      return { unit, port, dir, place, ...(refused ? { reason: sayEditRefusal(refused) } : {}) };
    });
}
