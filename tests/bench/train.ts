/** The aromatic condensate train and what is changed in it, for the benches of the whole solve. */
import { readFileSync } from 'node:fs';
import { type Memory, makeMemory } from '../../src/engine/network/memory';
import { solveNetwork } from '../../src/engine/network/solve';
import type { Basis, Problem, SolveBatch } from '../../src/engine/network/types';
import { loadBankData } from '../../src/sketch/bank';
import { compile } from '../../src/sketch/compile';
import { setByPath } from '../../src/sketch/edits';
import { openSketch } from '../../src/sketch/read';

const FILE = new URL('../../public/examples/aromatic-condensate.sketch.json', import.meta.url);

/** Settings near the front, in the middle and of the columns, each with a value 1 % from the example's. */
export const CHANGES: readonly (readonly [string, string])[] = [
  ['FEED-1.flow', '186.85 kmol/h'],
  ['FEED-1.state.T', '122.21 degC'],
  ['E-101.T', '38.38 degC'],
  ['PV-102.p.P', '3.535 bar'],
  ['E-102.T', '82.82 degC'],
  ['C-101.fixedBy.0.value', '2.424'],
  ['C-101.fixedBy.1.value.share', '14.14 %'],
  ['C-102.fixedBy.0.value', '2.323'],
];

export interface Train {
  readonly basis: Basis;
  readonly asItIs: Problem;
  /** As CHANGES. */
  readonly changed: readonly Problem[];
}

export async function readTrain(): Promise<Train> {
  const opened = openSketch(readFileSync(FILE, 'utf8'));
  if (!opened.ok) throw new Error('the example does not open');
  const { sketch } = opened;
  const data = await loadBankData(sketch);
  const { basis, problem } = compile(sketch, data, 1);
  if (!basis) throw new Error('the example lacks a value');
  const changed = CHANGES.map(([path, text]) => {
    const edit = setByPath(sketch, path, text);
    if (!edit.ok) throw new Error(`${path} cannot be ${text}`);
    return compile(edit.sketch, data, 1).problem;
  });
  return { basis, asItIs: problem, changed };
}

let edits = 1;

/** A whole solve with closure, limits and findings; throws where something is not solved. */
export function solveAll(problem: Problem, memory: Memory, from: 'warm' | 'nothing'): SolveBatch {
  edits += 1;
  const steps = solveNetwork({ ...problem, edit: edits }, memory, { from });
  for (let step = steps.next(); ; step = steps.next()) {
    if (!step.done) continue;
    if (!step.value.closure?.complete) throw new Error('the example is not solved');
    return step.value;
  }
}

export const memoryOf = ({ basis }: Train): Memory => makeMemory(basis);
