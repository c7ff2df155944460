import type { Evidence } from '../engine/outcome';

/** Why a file is not opened: a code, a place in the file, evidence. */
export interface FileProblemLike {
  readonly path: string;
  readonly code: string;
  readonly evidence: readonly Evidence[];
}

const SAYS: Readonly<Record<string, string>> = {
  'file/empty': 'The file is empty.',
  'file/not-json': 'The file cannot be read as JSON from line {line}, column {column} on.',
  'file/repeated-key': 'A name stands twice: {found}.',
  'file/too-deep': 'The file is nested more deeply than a sketch ever is.',
  'file/too-large': 'The file holds more than a sketch can.',
  'file/not-a-sketch': 'This is not a sketch of this program.',
  'file/newer-version': 'The sketch was saved by a newer version of the program.',
  'file/missing': 'Something required is missing here.',
  'file/wrong-type': 'Expected: {wanted}; found: {found}.',
  'file/not-one-of': '“{found}” is none of: {wanted}.',
  'file/out-of-range': 'The number lies outside what is allowed: {found}.',
  'file/empty-text': 'A text is empty that must not be.',
  'file/repeated-id': 'The id “{found}” stands twice.',
  'file/repeated-tag': 'The tag “{found}” stands twice.',
  'file/repeated-number': 'The stream number “{found}” stands twice.',
  'file/repeated-chemical': 'The chemical “{found}” stands twice.',
  'file/unknown-unit': 'Stream {stream} refers to a unit “{unit}” that is not in the file.',
  'file/unknown-port': 'A {kind} has no port “{port}”.',
  'file/wrong-direction': 'The port “{port}” of a {kind} lies the other way round.',
  'file/port-taken': 'The port “{port}” already has stream {stream}.',
  'file/too-few-coefficients': 'A correlation has too few coefficients.',
  'file/form-does-not-fit': 'The form of a correlation does not fit this property.',
  'file/more-problems': 'There are {count} more problems.',
};

export const FILE_CODES = Object.keys(SAYS);

/** One line: the place in the file, then the reason. */
export function sayFileProblem({ path, code, evidence }: FileProblemLike): string {
  const says = SAYS[code] ?? `It cannot be read (${code}).`;
  const filled = says.replace(/\{(\w+)\}/g, (_, name: string) => {
    const seen = evidence.find((e) => e.name === name);
    return seen ? (seen.text ?? String(seen.value)) : '?';
  });
  return path === '' ? filled : `${path}: ${filled}`;
}
