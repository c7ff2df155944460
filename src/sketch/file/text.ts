import { evidence, word } from '../findings';
import type { FileProblem } from './problem';

/** Deeper nesting than any sketch needs; a limit, so that walking a file never exhausts the stack. */
export const DEEPEST = 64;

const NUMBER = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/y;
const WORD = /true|false|null/y;
const BLANK = ' \t\n\r';

type Fault = { readonly at: number; readonly code: 'file/not-json' | 'file/too-deep' | 'file/repeated-key' };
type Expect = 'value' | 'value-or-end' | 'key' | 'key-or-end' | 'colon' | 'comma-or-end' | 'end';

/**
 * Reads JSON text. JSON.parse tells no place that can be relied on, and takes the last of two equal keys in silence;
 * so the text is scanned first, without recursion.
 *
 * @returns the value, or one problem with line and column (both from 1) and the piece of text found there
 */
export function readJson(
  text: string,
): { readonly ok: true; readonly value: unknown } | { readonly ok: false; readonly problem: FileProblem } {
  const plain = text.startsWith('\ufeff') ? text.slice(1) : text;
  if (plain.trim() === '') return { ok: false, problem: { path: '', code: 'file/empty', evidence: [] } };
  const fault = scan(plain);
  if (fault === undefined) return { ok: true, value: JSON.parse(plain) };
  const before = plain.slice(0, fault.at);
  const line = before.split('\n').length;
  const column = fault.at - before.lastIndexOf('\n');
  const found = plain.slice(fault.at, fault.at + 20).split(/[\r\n]/)[0] ?? '';
  const place = [evidence('line', line), evidence('column', column), word('found', found)];
  return { ok: false, problem: { path: '', code: fault.code, evidence: place } };
}

/** The first place where the text is not JSON; undefined when it is. */
function scan(text: string): Fault | undefined {
  const open: { readonly list: boolean; readonly keys: Set<string> }[] = [];
  let expect: Expect = 'value';
  let i = 0;
  const broken = (at: number): Fault => ({ at, code: 'file/not-json' });
  const afterValue = (): Expect => (open.length === 0 ? 'end' : 'comma-or-end');

  for (;;) {
    while (i < text.length && BLANK.includes(text.charAt(i))) i += 1;
    const c = text.charAt(i);
    if (c === '') return expect === 'end' ? undefined : broken(i);
    const inside = open.at(-1);
    if (expect === 'end') return broken(i);
    if (expect === 'colon') {
      if (c !== ':') return broken(i);
      expect = 'value';
      i += 1;
    } else if (inside && c === (inside.list ? ']' : '}') && expect !== 'key' && expect !== 'value') {
      open.pop();
      expect = afterValue();
      i += 1;
    } else if (expect === 'comma-or-end') {
      if (c !== ',') return broken(i);
      expect = inside?.list ? 'value' : 'key';
      i += 1;
    } else if (expect === 'key' || expect === 'key-or-end') {
      const end = endOfString(text, i);
      if (end < 0) return broken(i);
      const key: unknown = JSON.parse(text.slice(i, end));
      if (typeof key === 'string' && inside) {
        if (inside.keys.has(key)) return { at: i, code: 'file/repeated-key' };
        inside.keys.add(key);
      }
      expect = 'colon';
      i = end;
    } else if (c === '{' || c === '[') {
      if (open.length >= DEEPEST) return { at: i, code: 'file/too-deep' };
      open.push({ list: c === '[', keys: new Set() });
      expect = c === '[' ? 'value-or-end' : 'key-or-end';
      i += 1;
    } else {
      const end = c === '"' ? endOfString(text, i) : endOfBare(text, i);
      if (end < 0) return broken(i);
      expect = afterValue();
      i = end;
    }
  }
}

/** Index after the closing quote of the string that begins at `start`; -1 when none does. */
function endOfString(text: string, start: number): number {
  if (text.charAt(start) !== '"') return -1;
  for (let i = start + 1; i < text.length; i += 1) {
    const c = text.charAt(i);
    if (c === '"') return i + 1;
    if (c < ' ') return -1;
    if (c === '\\') {
      const letter = text.charAt(i + 1);
      if (letter === 'u') {
        if (!/^[0-9a-fA-F]{4}$/.test(text.slice(i + 2, i + 6))) return -1;
        i += 5;
      } else if (letter !== '' && '"\\/bfnrt'.includes(letter)) i += 1;
      else return -1;
    }
  }
  return -1;
}

function endOfBare(text: string, start: number): number {
  for (const pattern of [NUMBER, WORD]) {
    pattern.lastIndex = start;
    const match = pattern.exec(text);
    if (match) return start + match[0].length;
  }
  return -1;
}
