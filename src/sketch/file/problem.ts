import type { Evidence } from '../../engine/outcome';
import { word } from '../findings';

/** Why a file is not opened; the sentences live in wording/. */
export const FILE_PROBLEMS = [
  'file/empty',
  'file/not-text', // evidence: line, column
  'file/not-json', // evidence: line, column, found
  'file/repeated-key',
  'file/too-deep',
  'file/too-large',
  'file/not-a-sketch', // no or another format; evidence: found
  'file/newer-version',
  'file/not-migrated', // evidence: what, why
  'file/missing',
  'file/wrong-type', // evidence: wanted, found
  'file/not-one-of', // evidence: found, wanted
  'file/out-of-range',
  'file/empty-text',
  'file/repeated-id',
  'file/repeated-tag',
  'file/repeated-number',
  'file/repeated-chemical',
  'file/unknown-unit',
  'file/unknown-port',
  'file/wrong-direction',
  'file/port-taken',
  'file/too-few-coefficients',
  'file/form-does-not-fit',
  'file/more-problems', // evidence: how many were left out
] as const;

export type FileCode = (typeof FILE_PROBLEMS)[number];

/** One reason with its place: `units.2.tag`, list numbers from 0; empty for the whole file. */
export interface FileProblem {
  readonly path: string;
  readonly code: FileCode;
  readonly evidence: readonly Evidence[];
}

const MOST = 50;

/** Collects reasons; a hopeless file lists the first fifty and how many more there are. */
export class Problems {
  private readonly found: FileProblem[] = [];
  private left = 0;

  add(path: string, code: FileCode, ...evidence: readonly Evidence[]): void {
    if (this.found.length < MOST) this.found.push({ path, code, evidence });
    else this.left += 1;
  }
  wrongType(path: string, wanted: string, value: unknown): void {
    this.add(path, 'file/wrong-type', word('wanted', wanted), word('found', typeName(value)));
  }
  get none(): boolean {
    return this.found.length === 0;
  }
  list(): readonly FileProblem[] {
    if (this.left === 0) return this.found;
    const more: FileProblem = {
      path: '',
      code: 'file/more-problems',
      evidence: [{ name: 'count', value: this.left, dim: 'number' }],
    };
    return [...this.found, more];
  }
}

/** What a value is, in a file's words: null, list, text, number, boolean, object. */
export function typeName(value: unknown): string {
  if (value === null) return 'null';
  if (Array.isArray(value)) return 'list';
  return typeof value === 'string' ? 'text' : typeof value;
}
