import { evidence } from '../findings';
import type { FileProblem } from './problem';

type Decoded =
  | { readonly ok: true; readonly text: string }
  | { readonly ok: false; readonly problem: FileProblem };

const startsWith = (bytes: Uint8Array, mark: readonly number[]): boolean =>
  mark.every((byte, k) => bytes[k] === byte);

/**
 * The text of a file: UTF-8, or UTF-16 where a mark at the start says so. Bytes that are neither are refused with their
 * place; read as they come they would turn into question marks without a word.
 */
export function decode(bytes: Uint8Array): Decoded {
  const wide = startsWith(bytes, [0xff, 0xfe])
    ? 'utf-16le'
    : startsWith(bytes, [0xfe, 0xff])
      ? 'utf-16be'
      : '';
  const name = wide || 'utf-8';
  try {
    return { ok: true, text: new TextDecoder(name, { fatal: true }).decode(bytes) };
  } catch (error) {
    if (!(error instanceof TypeError)) throw error;
    return { ok: false, problem: { path: '', code: 'file/not-text', evidence: placeOf(bytes, name) } };
  }
}

/** Line and column (both from 1) up to which the bytes are text: the longest beginning that can be read. */
function placeOf(bytes: Uint8Array, name: string): ReturnType<typeof evidence>[] {
  const isText = (length: number): boolean => {
    try {
      // Cut in the middle of a letter is no fault: more may come.
      new TextDecoder(name, { fatal: true }).decode(bytes.subarray(0, length), { stream: true });
      return true;
    } catch (error) {
      if (error instanceof TypeError) return false;
      throw error;
    }
  };
  let [good, bad] = [0, bytes.length + 1];
  while (bad - good > 1) {
    const middle = (good + bad) >> 1;
    if (isText(middle)) good = middle;
    else bad = middle;
  }
  const before = new TextDecoder(name).decode(bytes.subarray(0, good), { stream: true });
  return [
    evidence('line', before.split('\n').length),
    evidence('column', before.length - before.lastIndexOf('\n')),
  ];
}
