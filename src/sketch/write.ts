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
  ],
  unit: ['id', 'tag', 'name', 'kind', 'at', 'turn', 'mirror', 'material', 'settings'],
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
 * The sketch as file text: fixed order of keys, two spaces, a line's end at the end. Text that was typed stays as typed;
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
  return `${JSON.stringify(tidy, null, 2)}\n`;
}
