import { isObject } from './json';
import type { Json, Sketch } from './types';

const ORDER = {
  sketch: [
    'format',
    'version',
    'id',
    'title',
    'site',
    'chemicals',
    'model',
    'units',
    'streams',
    'display',
    'notes',
    'limits',
    'revisions',
    'designBasis',
    'holds',
    'documents',
  ],
  unit: ['id', 'tag', 'name', 'kind', 'at', 'turn', 'mirror', 'byHand', 'material', 'settings'],
  stream: ['id', 'number', 'name', 'from', 'to', 'via'],
} as const;

/** Known keys first, in a fixed order; others after, in the order they came in. */
function ordered(value: Json, order: readonly string[]): Json {
  if (!isObject(value)) return value;
  const known = order.filter((key) => Object.hasOwn(value, key));
  const rest = Object.keys(value).filter((key) => !order.includes(key));
  return Object.fromEntries([...known, ...rest].map((key) => [key, value[key] as Json]));
}

const each = (value: Json | undefined, order: readonly string[]): Json =>
  Array.isArray(value) ? (value as readonly Json[]).map((item) => ordered(item, order)) : [];

/**
 * The sketch as file text: fixed order of keys, two spaces, ends with a line's end. Text that was typed stays as typed;
 * the same sketch always gives the same text.
 */
export function writeSketch(sketch: Sketch): string {
  const document = ordered(sketch as unknown as Json, ORDER.sketch) as { [key: string]: Json };
  const tidy = Object.fromEntries(
    Object.entries(document).map(([key, value]) => {
      if (key === 'units') return [key, each(value, ORDER.unit)];
      return key === 'streams' ? [key, each(value, ORDER.stream)] : [key, value];
    }),
  );
  return `${formatted(tidy, '')}\n`;
}

/** JSON with two spaces; a list of plain values (a place, the end of a stream) stands on one line. */
function formatted(value: Json, margin: string): string {
  const deeper = `${margin}  `;
  if (Array.isArray(value)) {
    const items = value as readonly Json[];
    if (items.every((item) => typeof item !== 'object' || item === null))
      return `[${items.map((item) => JSON.stringify(item)).join(', ')}]`;
    return `[\n${items.map((item) => deeper + formatted(item, deeper)).join(',\n')}\n${margin}]`;
  }
  if (!isObject(value)) return JSON.stringify(value);
  const entries = Object.entries(value).filter(([, v]) => v !== undefined);
  if (entries.length === 0) return '{}';
  const lines = entries.map(([key, v]) => `${deeper}${JSON.stringify(key)}: ${formatted(v, deeper)}`);
  return `{\n${lines.join(',\n')}\n${margin}}`;
}
