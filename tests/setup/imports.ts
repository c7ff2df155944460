/** One place where a file names another. */
export interface Import {
  readonly target: string;
  /**
   * value: loaded at run time (static, re-export or side effect); type: erased by the compiler;
   * lazy: `import('...')`; worker: `new Worker(new URL('...', import.meta.url))`, a thread of its own.
   */
  readonly how: 'value' | 'type' | 'lazy' | 'worker';
}

/** A `/` after one of these begins a regular expression, not a division. */
const BEFORE_REGEX = '(,=:[!&|?{};\n';

/**
 * The source with its comments replaced by blanks; with `strings`, also what stands between quotes.
 * Lengths and line breaks stay. A quote ends at the end of its line, so an apostrophe in JSX text does no harm.
 */
export function blanked(source: string, strings: boolean): string {
  const out = source.split('');
  const blank = (from: number, to: number): void => {
    for (let k = from; k < to; k++) if (out[k] !== '\n') out[k] = ' ';
  };
  let before = '\n';
  let i = 0;
  while (i < source.length) {
    const c = source.charAt(i);
    const end = endOfToken(source, i, before);
    if (end > i + 1) {
      const comment = c === '/' && (source[i + 1] === '/' || source[i + 1] === '*');
      if (comment) blank(i, end);
      else if (strings) blank(i + 1, end - 1);
      if (!comment) before = c;
      i = end;
    } else {
      if (c.trim() !== '' || c === '\n') before = c;
      i++;
    }
  }
  return out.join('');
}

/** Where the comment, string or regular expression that begins at `i` ends; i + 1 when none begins there. */
function endOfToken(source: string, i: number, before: string): number {
  const c = source[i];
  const two = source.slice(i, i + 2);
  if (two === '//') return upTo(source, '\n', i);
  if (two === '/*') return Math.min(source.length, upTo(source, '*/', i + 2) + 2);
  if (c === "'" || c === '"') return closing(source, i, c, true);
  if (c === '`') return closing(source, i, c, false);
  if (c === '/' && BEFORE_REGEX.includes(before)) return closing(source, i, '/', true);
  return i + 1;
}

function upTo(source: string, mark: string, from: number): number {
  const at = source.indexOf(mark, from);
  return at < 0 ? source.length : at;
}

function closing(source: string, start: number, quote: string, oneLine: boolean): number {
  let inClass = false;
  for (let k = start + 1; k < source.length; k++) {
    const c = source[k];
    if (c === '\\') k++;
    else if (c === '\n' && oneLine) return k;
    else if (quote === '/' && c === '[') inClass = true;
    else if (quote === '/' && c === ']') inClass = false;
    else if (c === quote && !inClass) return k + 1;
  }
  return source.length;
}

const STATIC = /^[ \t]*(import|export)\s+(type\s+(?!from\b|,))?[\w$*{}\s,]+?\s*\bfrom\s*['"]([^'"\n]+)['"]/gm;
const SIDE_EFFECT = /^[ \t]*import\s*['"]([^'"\n]+)['"]/gm;
const LAZY = /\bimport\(\s*['"`]([^'"`\n]+)['"`]/g;
const WORKER = /\bnew\s+(?:Shared)?Worker\(\s*new\s+URL\(\s*['"`]([^'"`\n]+)['"`]\s*,\s*import\.meta\.url/g;

/** Every import, re-export, lazy import and worker start in a TypeScript source, in no particular order. */
export function importsOf(source: string): Import[] {
  const code = blanked(source, false);
  const found: Import[] = [];
  for (const m of code.matchAll(STATIC)) found.push({ target: m[3]!, how: m[2] ? 'type' : 'value' });
  for (const m of code.matchAll(SIDE_EFFECT)) found.push({ target: m[1]!, how: 'value' });
  for (const m of code.matchAll(LAZY)) {
    // `typeof import('...')` and `import('...').Name` in a type are rare; they count as lazy, the stricter reading.
    found.push({ target: m[1]!, how: 'lazy' });
  }
  for (const m of code.matchAll(WORKER)) found.push({ target: m[1]!, how: 'worker' });
  return found;
}
