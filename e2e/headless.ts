import { execFile } from 'node:child_process';
import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';
import { labelRows, type SolvedStream } from '../src/drawing/labelText';
import { measuresOf } from '../src/drawing/measures';
import type { Sketch } from '../src/sketch/types';

const ROOT = fileURLToPath(new URL('..', import.meta.url));
export const LET_DOWN_FILE = join(ROOT, 'public/examples/let-down.sketch.json');

type Streams = Readonly<Record<string, SolvedStream>>;

/** Streams of a sketch file by their number, solved from nothing by the headless command; all digits. */
export async function solvedByCommand(file: string): Promise<Streams> {
  const folder = await mkdtemp(join(tmpdir(), 'sketch-'));
  try {
    const out = join(folder, 'results.json');
    const args = ['--import', 'tsx', 'src/cli/solve.ts', file, '--json', out];
    await promisify(execFile)(process.execPath, args, { cwd: ROOT });
    return JSON.parse(await readFile(out, 'utf8')).streams;
  } finally {
    await rm(folder, { recursive: true });
  }
}

/** What the sheet's labels must read, by stream number. */
export async function labelsByCommand(file: string): Promise<ReadonlyMap<string, string>> {
  const sketch: Sketch = JSON.parse(await readFile(file, 'utf8'));
  const streams = await solvedByCommand(file);
  return new Map(
    Object.entries(streams).map(([number, result]) => {
      if (result.state !== 'solved') throw new Error(`stream ${number} is not solved`);
      const rows = labelRows(result, sketch.display.labels, measuresOf(sketch));
      return [number, rows.map((row) => row.number + row.unit).join('')];
    }),
  );
}
