import type { Port, StreamId } from '../../engine/ids';
import type { Finding } from '../../engine/outcome';
import type { KindCatalogue, PortSpec } from '../../engine/units/types';
import { evidence, finding, word } from '../findings';
import { isOneOf, nextPortName } from '../registry';
import type { SketchStream, SketchUnit } from '../types';

/** A unit's streams by port, and the stream-side facts that its settings depend on. */
export interface PortsRead {
  readonly in: Readonly<Record<Port, StreamId>>;
  readonly out: Readonly<Record<Port, StreamId>>;
  readonly used: readonly Port[];
}

/** A unit without any stream. */
export const NO_PORTS: PortsRead = { in: {}, out: {}, used: [] };

/** Every unit's ports from the list of streams, in one pass. */
export function portsOfAll(streams: readonly SketchStream[]): ReadonlyMap<string, PortsRead> {
  const found = new Map<string, { in: [Port, StreamId][]; out: [Port, StreamId][] }>();
  const at = (unit: string) => {
    const ends = found.get(unit) ?? { in: [], out: [] };
    found.set(unit, ends);
    return ends;
  };
  for (const { id, from, to } of streams) {
    if (from) at(from[0]).out.push([from[1], id]);
    if (to) at(to[0]).in.push([to[1], id]);
  }
  return new Map(
    [...found].map(([unit, ends]) => [
      unit,
      {
        in: Object.fromEntries(ends.in),
        out: Object.fromEntries(ends.out),
        used: [...ends.in, ...ends.out].map(([port]) => port),
      },
    ]),
  );
}

/** What is missing at a unit's ports: streams, and sources of the streams that end there. */
export function portGaps(
  unit: SketchUnit,
  kind: KindCatalogue,
  ports: PortsRead,
  sourceless: ReadonlySet<StreamId>,
): readonly Finding[] {
  const gaps = kind.ports.flatMap((spec) => missingAt(unit, spec, ports));
  for (const [port, stream] of Object.entries(ports.in))
    if (sourceless.has(stream))
      gaps.push(
        finding('sketch/needs-source', 'caution', { unit: unit.id, port, stream }, word('port', port)),
      );
  return gaps;
}

function missingAt(unit: SketchUnit, spec: PortSpec, ports: PortsRead): Finding[] {
  const count = ports.used.filter((port) => isOneOf(spec, port)).length;
  const most = spec.numbered?.max ?? 1;
  const fewest = spec.optional ? 0 : (spec.numbered?.min ?? 1);
  const port = nextPortName(spec, ports.used);
  const at = { unit: unit.id, port };
  if (count > most)
    return [finding('sketch/too-many', 'caution', at, word('port', spec.name), evidence('wanted', most))];
  if (count >= fewest) return [];
  const code = spec.dir === 'in' ? 'sketch/needs-inlet' : 'sketch/needs-outlet';
  return [finding(code, 'caution', at, word('port', port))];
}
