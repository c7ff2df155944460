import { rmSync } from 'node:fs';
import { join } from 'node:path';
import { build, preview } from 'vite';
import { killed, profile } from '../../e2e/kills';
import type { GroupReport } from './groups';

/** A new browser folder after so many trials: a sketch grows no older than that. */
const TRIALS_A_FOLDER = 10;

const seedOf = (seed: number, number: number): number =>
  (Math.imul(seed, 0x9e3779b1) ^ Math.imul(number + 1, 0x85ebca6b)) >>> 0;

/**
 * A browser (or, every other time, its page alone) ended in mid-edit at random moments, on the built page: at most the last
 * edit may be lost. Some five seconds each.
 */
export async function kills(seed: number, count: number): Promise<GroupReport> {
  const root = join(import.meta.dirname, '../..');
  await build({ root, logLevel: 'error' });
  const server = await preview({ root, logLevel: 'error', preview: { port: 0, host: '127.0.0.1' } });
  const address = server.resolvedUrls?.local[0];
  if (!address) throw new Error('the built page is not served');
  const cases: unknown[] = [];
  let folder = '';
  let lastLost = 0;
  let edits = 0;
  try {
    for (let k = 0; k < count; k += 1) {
      const first = k % TRIALS_A_FOLDER === 0;
      if (first) {
        if (folder) rmSync(folder, { recursive: true, force: true });
        folder = profile();
      }
      const by = k % 2 === 0 ? 'kill' : 'reload';
      const found = await killed(folder, address, { first, seed: seedOf(seed, k), by });
      edits += found.made;
      if (found.kept < found.made) lastLost += 1;
      if (found.fault) cases.push({ case: k, by, ...found });
    }
  } finally {
    await server.close();
    if (folder) rmSync(folder, { recursive: true, force: true });
  }
  const answered = count - cases.length;
  return {
    tried: count,
    answered,
    reasons: { 'the last edit lost': lastLost },
    wrong: cases.length,
    share: answered / count,
    wanted: 1,
    cases,
    more: { edits },
  };
}
