import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { buildScene } from '../../src/drawing/scene';
import { loadBankData } from '../../src/sketch/bank';
import { compile } from '../../src/sketch/compile';
import { FILE_PROBLEMS, type FileProblem } from '../../src/sketch/file/problem';
import { openSketch } from '../../src/sketch/read';
import type { Sketch } from '../../src/sketch/types';
import { writeSketch } from '../../src/sketch/write';
import { sayFileProblem } from '../../src/wording';
import type { GroupReport } from './groups';
import { lossesOf } from './loss';
import { makeRandom, type Random } from './random';
import { spoilBytes, spoilValues } from './spoil';

const FOLDERS = ['../../public/examples', '../sheets/v1'].map((name) => join(import.meta.dirname, name));

/** Longer than any step may take [ms]. */
const HANG_MS = 2000;

/** Reasons that concern the whole file and need no place. */
const WHOLE: readonly string[] = [
  'file/empty',
  'file/not-a-sketch',
  'file/newer-version',
  'file/too-large',
  'file/not-migrated',
  'file/more-problems',
];

const sources = (): readonly (readonly [name: string, bytes: Uint8Array])[] =>
  FOLDERS.flatMap((folder) =>
    readdirSync(folder)
      .filter((name) => name.endsWith('.sketch.json'))
      .sort()
      .map((name) => [name, new Uint8Array(readFileSync(join(folder, name)))] as const),
  );

const seedOf = (seed: number, number: number): number =>
  (Math.imul(seed, 0x9e3779b1) ^ Math.imul(number + 1, 0x85ebca6b)) >>> 0;

/** The settings of one unit, which compiling reads; the whole document where there are none. */
function settingsIn(raw: { [key: string]: unknown }, random: Random): { [key: string]: unknown } {
  const units = Array.isArray(raw.units) && raw.units.length > 0 ? (raw.units as readonly unknown[]) : [raw];
  const settings: unknown = (random.of(units) as { settings?: unknown } | null)?.settings;
  const isRecord = typeof settings === 'object' && settings !== null && Object.keys(settings).length > 0;
  return isRecord ? (settings as { [key: string]: unknown }) : raw;
}

/** A spoilt file and what was done to it. */
function spoilt(
  bytes: Uint8Array,
  random: Random,
): { readonly how: readonly string[]; readonly file: Uint8Array } {
  const how: string[] = [];
  const times = random.of([1, 1, 2, 5]);
  if (random.next() < 0.6) {
    const raw = JSON.parse(new TextDecoder().decode(bytes)) as { [key: string]: unknown };
    for (let k = 0; k < times; k += 1)
      how.push(spoilValues(random.next() < 0.5 ? settingsIn(raw, random) : raw, random));
    return { how, file: new TextEncoder().encode(JSON.stringify(raw)) };
  }
  let file = bytes;
  for (let k = 0; k < times; k += 1) {
    const [name, next] = spoilBytes(file, random);
    how.push(name);
    file = next;
  }
  return { how, file };
}

/** What is wrong with a reason: it must be a known one, have a place, and make a sentence. */
function faultOfReason(problem: FileProblem): string | undefined {
  const { code, path, evidence } = problem;
  if (!FILE_PROBLEMS.includes(code)) return `unknown reason ${code}`;
  const hasPlace = path !== '' || evidence.some((e) => e.name === 'line');
  if (!hasPlace && !WHOLE.includes(code)) return `${code} has no place`;
  const words = sayFileProblem(problem);
  return /undefined|NaN|\[object/.test(words.replaceAll(path, '')) ? `the reason reads ${words}` : undefined;
}

function firstNotFinite(value: unknown, path = ''): string | undefined {
  if (typeof value === 'number') return Number.isFinite(value) ? undefined : path;
  if (typeof value !== 'object' || value === null) return undefined;
  for (const [key, item] of Object.entries(value)) {
    const found = firstNotFinite(item, `${path}.${key}`);
    if (found) return found;
  }
  return undefined;
}

/** What is wrong with a file that was opened: compiling, drawing, saving and opening again. */
async function faultOfOpened(
  file: Uint8Array,
  sketch: Sketch,
  notes: Parameters<typeof lossesOf>[2],
): Promise<string | undefined> {
  const compiled = compile(sketch, await loadBankData(sketch));
  for (const unit of compiled.problem.units) {
    const place = firstNotFinite(unit.settings);
    if (place) return `${unit.id}${place} is compiled to no finite number`;
    if (unit.settings === null && compiled.gaps.length === 0)
      return `${unit.id} has no settings and nobody says why`;
  }
  const drawn = { states: new Map(), limits: new Map(), labels: new Map(), duties: new Map() };
  const place = firstNotFinite(buildScene(sketch, drawn));
  if (place) return `the scene is not finite at ${place}`;
  const saved = writeSketch(sketch);
  const again = openSketch(saved);
  if (!again.ok) return `saved, it is refused: ${again.problems.map(sayFileProblem).join(' ')}`;
  if (writeSketch(again.sketch) !== saved) return 'saved and opened again it is another document';
  const losses = lossesOf(new TextDecoder().decode(file), saved, notes);
  return losses.length > 0 ? `lost without a word: ${losses.slice(0, 3).join(', ')}` : undefined;
}

/**
 * Spoilt files, each refused with place and reason or opened; what opens is compiled, drawn, saved, opened again and compared
 * with what stood in the file.
 *
 * @param only  this case and no other
 */
export async function files(seed: number, count: number, only?: number): Promise<GroupReport> {
  const reasons: Record<string, number> = {};
  const cases: unknown[] = [];
  const known = sources();
  const numbers = only === undefined ? Array.from({ length: count }, (_, k) => k) : [only];
  let opens = 0;
  let slowest_ms = 0;
  for (const number of numbers) {
    const random = makeRandom(seedOf(seed, number));
    const [name, bytes] = random.of(known);
    const { how, file } = spoilt(bytes, random);
    const begun = performance.now();
    let fault: string | undefined;
    try {
      const result = openSketch(file, { newId: () => 'new' });
      if (result.ok) {
        opens += 1;
        fault = await faultOfOpened(file, result.sketch, result.notes);
      } else {
        const [{ code }] = result.problems;
        reasons[code] = (reasons[code] ?? 0) + 1;
        fault = result.problems.map(faultOfReason).find((found) => found !== undefined);
      }
    } catch (error) {
      fault = `thrown: ${error instanceof Error ? error.stack?.split('\n').slice(0, 4).join(' | ') : String(error)}`;
    }
    const ms = performance.now() - begun;
    slowest_ms = Math.max(slowest_ms, ms);
    if (ms > HANG_MS) fault ??= `it takes ${ms.toFixed(0)} ms`;
    if (fault) cases.push({ case: number, file: name, how, fault });
  }
  const tried = numbers.length;
  const answered = tried - cases.length;
  return {
    tried,
    answered,
    reasons,
    wrong: cases.length,
    share: answered / tried,
    wanted: 1,
    cases,
    more: { opened: opens, refused: tried - opens, slowest_ms },
  };
}
