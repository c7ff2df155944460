import type { Port } from '../engine/ids';
import { CATALOGUE } from '../engine/units/catalogue';
import type { KindCatalogue, PortSpec } from '../engine/units/types';
import { isObject, own } from './json';
import type { Json } from './types';

/** The kinds of unit that are known, by name. An argument everywhere, so that a kind can be added without touching a file. */
export type Registry = Readonly<Record<string, KindCatalogue>>;

/** The kinds of this version. */
export const KNOWN_KINDS: Registry = CATALOGUE;

/** The kind's catalogue; undefined for a kind that this version does not know (names like "constructor" included). */
export const kindOf = (registry: Registry, kind: string): KindCatalogue | undefined =>
  Object.hasOwn(registry, kind) ? registry[kind] : undefined;

const NUMBERED = /^(.*?)([1-9]\d{0,3})$/;

/** What the kind says about a port by its full name ('in2'); a bare stem ('in') is not a port. */
export function portSpec(kind: KindCatalogue, port: Port): PortSpec | undefined {
  const whole = kind.ports.find((p) => p.name === port && p.numbered === undefined);
  if (whole) return whole;
  const stem = NUMBERED.exec(port)?.[1];
  return kind.ports.find((p) => p.name === stem && p.numbered !== undefined);
}

/** Whether this name belongs to a numbered port's family. */
export const isOneOf = (spec: PortSpec, port: Port): boolean =>
  spec.numbered === undefined ? port === spec.name : NUMBERED.exec(port)?.[1] === spec.name;

/** The number in a numbered port's name; 0 without one. */
export const portNumber = (port: Port): number => Number(NUMBERED.exec(port)?.[2] ?? 0);

/** The next name of a numbered port: one above the highest in use, so that a name is not taken over by another stream. */
export function nextPortName(spec: PortSpec, used: Iterable<Port>): Port {
  if (spec.numbered === undefined) return spec.name;
  let highest = 0;
  for (const port of used) if (isOneOf(spec, port)) highest = Math.max(highest, portNumber(port));
  return `${spec.name}${highest + 1}`;
}

/** Whether a port that depends on a setting is there; one that depends on none always is. */
export function isThere({ when }: PortSpec, settings: Json): boolean {
  if (!when) return true;
  let value: Json | undefined = settings;
  for (const key of when.path.split('.')) value = isObject(value) ? own(value, key) : undefined;
  return typeof value === 'string' && when.is.includes(value);
}
