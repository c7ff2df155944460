import type { Port, UnitId } from '../../engine/ids';
import type { JsonObject } from '../json';
import { hangingStreams } from '../naming';
import { isThere, kindOf, type Registry } from '../registry';
import type { Sketch, SketchUnit } from '../types';
import { withUnit } from './edited';

/** Outlets without a number that depend on a setting, and are there with these settings. */
function dependent(unit: SketchUnit, settings: JsonObject, registry: Registry): readonly Port[] {
  const ports = kindOf(registry, unit.kind)?.ports ?? [];
  return ports
    .filter((p) => p.dir === 'out' && !p.numbered && p.when && isThere(p, settings))
    .map((p) => p.name);
}

/**
 * The sketch with other settings of a unit. Where the settings take an outlet away and bring another, its stream moves over;
 * an outlet that appears without one gets a stream, so that every result has a place to stand.
 */
export function withSettings(
  sketch: Sketch,
  unit: SketchUnit,
  settings: JsonObject,
  registry: Registry,
): Sketch {
  const next = withUnit(sketch, unit.id, (u) => ({ ...u, settings }));
  const before = dependent(unit, unit.settings, registry);
  const after = dependent(unit, settings, registry);
  const gone = before.filter((port) => !after.includes(port));
  const come = after.filter((port) => !before.includes(port));
  if (come.length === 0) return next;
  const isAt = (from: readonly [UnitId, Port] | undefined, port: Port): boolean =>
    from?.[0] === unit.id && from[1] === port;
  const open = come.filter((port) => !next.streams.some((s) => isAt(s.from, port)));
  const streams = next.streams.map((s) => {
    const k = gone.findIndex((port) => isAt(s.from, port));
    const port = k < 0 ? undefined : open[k];
    return port === undefined ? s : { ...s, from: [unit.id, port] as const };
  });
  const moved = next.units.find((u) => u.id === unit.id)!;
  return { ...next, streams: [...streams, ...hangingStreams([moved], streams, registry)] };
}
