import { bank } from '../data/bank';
import { answersDiffer } from '../report/compare';
import { dayOf } from '../report/day';
import type { ReportInput } from '../report/input';
import { writeSketch } from '../sketch/write';
import type { Stores } from '../store/react';
import { solveFromNothing } from './cleanSolve';
import { inStep } from './inStep';

declare const __APP_VERSION__: string;

const hex = (bytes: Uint8Array): string => Array.from(bytes, (b) => b.toString(16).padStart(2, '0')).join('');

/** First sixteen digits of the SHA-256 of the file's text, in groups of four. */
export async function fingerprint(text: string): Promise<string> {
  const digest = await crypto.subtle.digest('SHA-256', new TextEncoder().encode(text));
  return hex(new Uint8Array(digest))
    .slice(0, 16)
    .replace(/(.{4})(?=.)/g, '$1 ');
}

/** Everything a report needs, solved once more from nothing. Undefined while the sketch cannot be compiled. */
export async function cleanReportInput(
  stores: Stores,
  signal?: AbortSignal,
): Promise<ReportInput | undefined> {
  const { sketch, compiled } = await inStep(stores, signal);
  const { basis, problem, gaps, notes, assumptions } = compiled;
  if (!basis || !problem) return undefined;
  const live = new Map([...stores.results.getState().streams].map(([id, shown]) => [id, shown.latest]));
  const [clean, citations, print] = await Promise.all([
    solveFromNothing(basis, problem, signal),
    bank.sources(),
    fingerprint(writeSketch(sketch)),
  ]);
  return {
    sketch,
    basis,
    ...clean,
    findings: [...clean.findings, ...notes],
    gaps,
    assumptions,
    citations,
    sitePressure_Pa: problem.site.pressure_Pa,
    version: __APP_VERSION__,
    fingerprint: print,
    day: dayOf(new Date()),
    severalAnswers: answersDiffer(live, clean.streams),
  };
}
