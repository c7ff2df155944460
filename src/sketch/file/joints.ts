import { word } from '../findings';
import { isObject, type JsonObject, own } from '../json';
import { kindOf, portSpec, type Registry } from '../registry';
import type { Json } from '../types';
import type { Problems } from './problem';

/**
 * Streams end at units and ports that exist, in their direction, one stream to a port. Ports of a kind that this
 * version does not know are taken as they stand. Expects shapes that were found right.
 */
export function checkJoints(raw: JsonObject, registry: Registry, problems: Problems): void {
  const units = new Map<string, string>();
  for (const unit of records(own(raw, 'units'))) units.set(String(unit.id), String(unit.kind));
  const taken = new Map<string, string>();
  records(own(raw, 'streams')).forEach((stream, k) => {
    for (const [key, dir] of [
      ['from', 'out'],
      ['to', 'in'],
    ] as const) {
      const end = own(stream, key);
      if (!Array.isArray(end)) continue;
      const [unit, port] = end as readonly string[] as [string, string];
      const path = `streams.${k}.${key}`;
      const kindName = units.get(unit);
      if (kindName === undefined) {
        problems.add(path, 'file/unknown-unit', word('unit', unit), word('stream', String(stream.number)));
        continue;
      }
      const kind = kindOf(registry, kindName);
      const spec = kind && portSpec(kind, port);
      if (kind && spec?.dir !== dir) {
        const code = spec ? 'file/wrong-direction' : 'file/unknown-port';
        problems.add(path, code, word('port', port), word('kind', kindName));
        continue;
      }
      const place = JSON.stringify([unit, port]);
      const other = taken.get(place);
      if (other !== undefined)
        problems.add(path, 'file/port-taken', word('port', port), word('stream', other));
      taken.set(place, String(stream.number));
    }
  });
}

const records = (value: Json | undefined): readonly JsonObject[] =>
  Array.isArray(value) ? (value as readonly Json[]).filter(isObject) : [];
