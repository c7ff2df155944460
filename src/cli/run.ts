import { createHash } from 'node:crypto';
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { basename, join } from 'node:path';
import { bank } from '../data/bank';
import { type Kinds, KNOWN_KINDS } from '../engine/network/kinds';
import { makeMemory } from '../engine/network/memory';
import { solveNetwork } from '../engine/network/solve';
import type { SolveBatch } from '../engine/network/types';
import type { Finding } from '../engine/outcome';
import { writeCsv } from '../report/csv';
import { dayOf } from '../report/day';
import type { ReportInput } from '../report/input';
import { buildReport } from '../report/model';
import { sheetSvgFile } from '../report/picture';
import { resultsJson } from '../report/resultsJson';
import { findingWords } from '../report/words';
import { loadBankData } from '../sketch/bank';
import { compile } from '../sketch/compile';
import { setByPath } from '../sketch/edits';
import { openSketch } from '../sketch/read';
import type { Sketch } from '../sketch/types';
import { writeSketch } from '../sketch/write';
import { sayEditRefusal, sayFileProblem } from '../wording';
import { type Orders, readOrders, USAGE } from './args';

/** 0 solved; 1 no solution, or something needs a value; 2 bad file or arguments. */
export type ExitCode = 0 | 1 | 2;

export interface Voice {
  out(line: string): void;
  err(line: string): void;
}

const HERE = join(import.meta.dirname, '../..');
const version = (): string => JSON.parse(readFileSync(join(HERE, 'package.json'), 'utf8')).version;
const font = (name: string): string => join(HERE, 'public/fonts', name);

/** Runs the headless command: every solve from nothing, all digits printed. */
export async function run(args: readonly string[], voice: Voice): Promise<ExitCode> {
  const read = readOrders(args);
  if (!read.ok) {
    voice.err(`${read.why}\n${USAGE}`);
    return 2;
  }
  let worst: ExitCode = 0;
  for (const file of read.orders.files) {
    const code = await runFile(file, read.orders, voice);
    if (code > worst) worst = code;
  }
  return worst;
}

async function runFile(file: string, orders: Orders, voice: Voice): Promise<ExitCode> {
  const sketch = readSketch(file, orders, voice);
  if (!sketch) return 2;
  const begun = performance.now();
  const { input, available } = await solveSketch(sketch);
  const seconds = (performance.now() - begun) / 1000;
  for (const problem of available) voice.err(`${file}: ${problem}`);
  if (available.length > 0) return 2;
  const results = resultsJson(input, seconds) as { readonly solved: boolean };
  try {
    await writeAll(file, orders, input, results);
  } catch (error) {
    voice.err(`${file}: ${error instanceof Error ? error.message : String(error)}`);
    return 2;
  }
  const report = buildReport(input);
  voice.out(`${file}: ${report.state.text} (${seconds.toFixed(3)} s)`);
  if (!results.solved) for (const line of whyNot(input)) voice.err(`  ${line}`);
  if (!results.solved) return 1;
  return orders.strict && input.findings.some((f) => f.weight === 'beyond-limit') ? 1 : 0;
}

/** Why units have no answer, once each; those that only wait say nothing. */
function whyNot(input: ReportInput): readonly string[] {
  const reasons = [
    ...input.gaps,
    ...[...input.units.values()].flatMap(({ state, reasons = [] }) => (state === 'waiting' ? [] : reasons)),
  ];
  const lines = reasons.map((reason) => {
    const { where, sentence, next = '' } = findingWords(reason, input);
    return `${where ? `${where}: ` : ''}${sentence} ${next}`.trim();
  });
  return [...new Set(lines)];
}

function readSketch(file: string, orders: Orders, voice: Voice): Sketch | undefined {
  let bytes: Uint8Array;
  try {
    bytes = readFileSync(file);
  } catch (error) {
    voice.err(`${file}: ${error instanceof Error ? error.message : String(error)}`);
    return undefined;
  }
  const opened = openSketch(bytes);
  if (!opened.ok) {
    for (const problem of opened.problems) voice.err(`${file}: ${sayFileProblem(problem)}`);
    return undefined;
  }
  let { sketch } = opened;
  for (const [place, value] of orders.sets) {
    const edit = setByPath(sketch, place, value);
    if (!edit.ok) {
      voice.err(`--set ${place}: ${sayEditRefusal(edit)}`);
      return undefined;
    }
    sketch = edit.sketch;
  }
  return sketch;
}

const NOT_AVAILABLE = ['sketch/kind-not-available', 'sketch/model-not-available'];

/** Compiles and solves once, from nothing, with the kinds of unit that are known. `available` lists kinds or models that this version does not have. */
export async function solveSketch(
  sketch: Sketch,
  kinds: Kinds = KNOWN_KINDS,
): Promise<{ readonly input: ReportInput; readonly available: readonly string[] }> {
  const { basis, problem, gaps, notes, assumptions } = compile(
    sketch,
    await loadBankData(sketch, kinds.catalogue),
    1,
    { registry: kinds.catalogue },
  );
  const missing = [...gaps, ...notes].filter((f) => NOT_AVAILABLE.includes(f.code)).map(missingText);
  const empty: SolveBatch = { streams: [], units: [], gone: [], findings: [] };
  const batch = basis ? solveAll(basis, problem, kinds) : empty;
  const input: ReportInput = {
    sketch,
    basis: basis ?? { id: '', chemicals: [], model: NO_MODEL },
    streams: new Map(batch.streams),
    units: new Map(batch.units),
    closure: batch.closure ?? null,
    findings: [...batch.findings, ...notes],
    gaps,
    assumptions,
    citations: await bank.sources(),
    sitePressure_Pa: problem.site.pressure_Pa,
    kinds: kinds.catalogue,
    version: version(),
    fingerprint: fingerprint(writeSketch(sketch)),
    day: process.env.SPLITWRIGHT_DAY ?? dayOf(new Date()),
  };
  return { input, available: missing };
}

const NO_MODEL = {
  kind: 'peng-robinson',
  alpha: '1976',
  liquidH: 'psat-slope',
  liquidVolume: 'corrected',
  poynting: false,
  pairs: [],
} as const;

const missingText = (finding: Finding): string =>
  `"${finding.evidence.find((e) => e.text)?.text ?? ''}" is not available in this version`;

function solveAll(
  basis: NonNullable<ReturnType<typeof compile>['basis']>,
  problem: ReturnType<typeof compile>['problem'],
  kinds: Kinds,
): SolveBatch {
  const steps = solveNetwork(problem, makeMemory(basis), { from: 'nothing', kinds });
  let step = steps.next();
  while (!step.done) step = steps.next();
  return step.value;
}

const fingerprint = (text: string): string =>
  createHash('sha256')
    .update(text)
    .digest('hex')
    .slice(0, 16)
    .replace(/(.{4})(?=.)/g, '$1 ');

async function writeAll(file: string, orders: Orders, input: ReportInput, results: unknown): Promise<void> {
  const json = `${JSON.stringify(results, null, 1)}\n`;
  if (orders.json) writeFileSync(orders.json, json);
  if (orders.jsonDir) {
    mkdirSync(orders.jsonDir, { recursive: true });
    const stem = basename(file).replace(/(\.sketch)?\.json$/, '');
    writeFileSync(join(orders.jsonDir, `${stem}.results.json`), json);
  }
  if (orders.csv) writeFileSync(orders.csv, writeCsv(buildReport(input)));
  if (orders.xlsx) {
    const { writeXlsx } = await import('../report/xlsx');
    writeFileSync(orders.xlsx, await writeXlsx(buildReport(input)));
  }
  const fonts = {
    normal: font('SourceSans3-Regular.ttf'),
    bold: font('SourceSans3-SemiBold.ttf'),
    italics: font('SourceSans3-Italic.ttf'),
  };
  if (orders.svg) {
    const files = {
      normal: readFileSync(fonts.normal),
      bold: readFileSync(fonts.bold),
      italics: readFileSync(fonts.italics),
    };
    writeFileSync(orders.svg, `${sheetSvgFile(input, files)}\n`);
  }
  if (orders.pdf) {
    const { writePdf } = await import('../report/pdf/write');
    writeFileSync(orders.pdf, await writePdf(input, fonts));
  }
}
