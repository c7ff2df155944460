import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { solveSketch } from '../../src/cli/run';
import type { ReportInput } from '../../src/report/input';
import { openSketch } from '../../src/sketch/read';
import type { Sketch } from '../../src/sketch/types';

export const EXAMPLES = join(import.meta.dirname, '../../public/examples');

export function example(file: string): Sketch {
  const opened = openSketch(readFileSync(join(EXAMPLES, file), 'utf8'));
  if (!opened.ok) throw new Error(`${file} does not open`);
  return opened.sketch;
}

/** An example solved once from nothing, with a fixed day. */
export async function solvedExample(
  file: string,
  change: (s: Sketch) => Sketch = (s) => s,
): Promise<ReportInput> {
  const { input } = await solveSketch(change(example(file)));
  return { ...input, day: '2026-01-15' };
}
