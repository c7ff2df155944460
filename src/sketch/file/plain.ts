import { evidence, word } from '../findings';
import { type Problems, typeName } from './problem';
import { DEEPEST } from './text';

const MOST_VALUES = 500_000;

/**
 * Whether a value is plain, finite, not endless JSON data, so that everything after may walk it freely.
 * Circular and shared structures end at the depth or at the number of values.
 */
export function checkPlain(root: unknown, problems: Problems): boolean {
  const waiting: { readonly value: unknown; readonly path: string; readonly depth: number }[] = [
    { value: root, path: '', depth: 0 },
  ];
  let count = 0;
  for (let next = waiting.pop(); next !== undefined; next = waiting.pop()) {
    const { value, path, depth } = next;
    count += 1;
    if (count > MOST_VALUES) {
      problems.add('', 'file/too-large', evidence('values', count));
      return false;
    }
    if (depth > DEEPEST) {
      problems.add(path, 'file/too-deep', evidence('depth', depth));
      return false;
    }
    if (typeof value === 'number' && !Number.isFinite(value)) problems.add(path, 'file/out-of-range');
    else if (typeof value === 'object' && value !== null) {
      if (Array.isArray(value) && value.length > MOST_VALUES) {
        problems.add(path, 'file/too-large', evidence('values', value.length));
        return false;
      }
      const inside = path === '' ? '' : `${path}.`;
      for (const key of Object.keys(value)) {
        const item: unknown = (value as Record<string, unknown>)[key];
        waiting.push({ value: item, path: `${inside}${key}`, depth: depth + 1 });
      }
    } else if (!['string', 'number', 'boolean', 'undefined'].includes(typeof value) && value !== null)
      problems.add(path, 'file/wrong-type', word('wanted', 'JSON'), word('found', typeName(value)));
  }
  return problems.none;
}
