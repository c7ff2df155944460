import { isBoundary, KNOWN_KINDS } from '../../src/engine/network/kinds';
import type { Basis, Problem, ProblemUnit, SolveBatch, StreamResult } from '../../src/engine/network/types';
import type { ColumnResults, EndResults } from '../../src/engine/units/column/results';
import type { ColumnSettings, FixedBy } from '../../src/engine/units/column/settings';
import { audit, worstOfAudit } from '../laws/audit';
import { lnPhiOf } from '../laws/secondPengRobinson';
import type { Random } from './random';

type Solved = Extract<StreamResult, { state: 'solved' }>;

/** What a referee looks at: what was asked, and what came out. */
interface Sheet {
  readonly basis: Basis;
  readonly problem: Problem;
  readonly streams: ReadonlyMap<string, StreamResult>;
  readonly units: ReadonlyMap<string, SolveBatch['units'][number][1]>;
}

const CLOSES = 1e-9;
const MEETS = 1e-8;

/**
 * What is wrong with a sheet that says it is solved, from its results alone; undefined when nothing is. Closure of every unit by
 * the auditor, everything physical, every column meeting what fixes it, and equilibrium on stages drawn at random by a second
 * implementation of the equation of state.
 */
export function faultOfSheet(
  basis: Basis,
  problem: Problem,
  batch: SolveBatch,
  random: Random,
): string | undefined {
  const sheet: Sheet = { basis, problem, streams: new Map(batch.streams), units: new Map(batch.units) };
  for (const [id, s] of sheet.streams) {
    const fault = s.state === 'solved' ? faultOfStream(s) : 'not solved';
    if (fault) return `stream ${id}: ${fault}`;
  }
  for (const unit of problem.units) {
    const fault = faultOfUnit(unit, sheet, random);
    if (fault) return `${unit.id} (${unit.kind}): ${fault}`;
  }
  return undefined;
}

function faultOfStream(s: Solved): string | undefined {
  if (!(s.T_K > 20 && s.T_K < 4000 && s.P_Pa > 0 && s.n_mol_s >= 0))
    return `T ${s.T_K}, P ${s.P_Pa}, n ${s.n_mol_s}`;
  if (s.z.some((x) => !(x >= 0))) return 'a fraction below zero';
  const fractions = s.phases.reduce((sum, p) => sum + p.fraction, 0);
  if (s.n_mol_s > 0 && Math.abs(fractions - 1) > 1e-10) return `phases sum to ${fractions}`;
  return undefined;
}

function streamsOf(sheet: Sheet, ports: ProblemUnit['in']): Solved[] {
  return Object.values(ports).map((id) => sheet.streams.get(id) as Solved);
}

function faultOfUnit(unit: ProblemUnit, sheet: Sheet, random: Random): string | undefined {
  const result = sheet.units.get(unit.id);
  if (result?.state !== 'solved') return `is ${result?.state}`;
  if (isBoundary(KNOWN_KINDS, unit.kind)) return undefined;
  const drawn = Object.values(result.drawn ?? {}) as Solved[];
  const closure = audit(
    [...streamsOf(sheet, unit.in), ...drawn],
    streamsOf(sheet, unit.out),
    result,
    sheet.basis.chemicals,
  );
  if (!(worstOfAudit(closure) <= CLOSES)) return `closure ${JSON.stringify(closure)}`;
  if (unit.kind !== 'column') return undefined;
  return faultOfColumn(unit, result.results as unknown as ColumnResults, sheet, random);
}

function faultOfColumn(
  unit: ProblemUnit,
  r: ColumnResults,
  sheet: Sheet,
  random: Random,
): string | undefined {
  const settings = unit.settings as ColumnSettings;
  for (const [k, fixed] of (settings.fixedBy ?? []).entries()) {
    const miss = missOf(fixed, k, unit, r, sheet);
    if (!(miss <= MEETS)) return `fixing ${k} (${fixed.fix}) missed by ${miss}`;
  }
  const stages = r.stages.T_K.length;
  for (let k = 0; k < stages; k++)
    if (!(r.stages.L_mol_s[k]! > 0 && r.stages.V_mol_s[k]! > 0)) return `stage ${k + 1} is dry`;
  const k = random.whole(0, stages - 1);
  const at = (of: Readonly<Record<string, Float64Array>>) => sheet.basis.chemicals.map((c) => of[c.id]![k]!);
  const here = { T_K: r.stages.T_K[k]!, P_Pa: r.stages.P_Pa[k]!, x: at(r.stages.x), y: at(r.stages.y) };
  const ends = [r.condenser, r.reboiler].flatMap((end) => (end ? [endOf(end, sheet)] : []));
  for (const place of [here, random.of(ends)]) {
    const gap = worstGap(place, sheet.basis);
    if (!(gap <= MEETS)) return `fugacities differ by ${gap} at ${place.T_K} K`;
  }
  return undefined;
}

interface Place {
  readonly T_K: number;
  readonly P_Pa: number;
  readonly x: readonly number[];
  readonly y: readonly number[];
}

const endOf = (end: EndResults, { basis }: Sheet): Place => ({
  T_K: end.T_K,
  P_Pa: end.P_Pa,
  x: basis.chemicals.map((c) => end.x[c.id]!),
  y: basis.chemicals.map((c) => end.y[c.id]!),
});

/** Largest difference of ln fugacity between a place's liquid and vapour, for chemicals that show. */
function worstGap({ T_K, P_Pa, x, y }: Place, { chemicals, model }: Basis): number {
  const all = chemicals.map((_, i) => i).filter((i) => x[i]! > 1e-30);
  const pure = all
    .map((i) => chemicals[i]!)
    .map((c) => ({ Tc_K: c.Tc_K!, Pc_Pa: c.Pc_Pa!, omega: c.omega! }));
  const kij = (a: number, b: number): number => {
    const [i, j] = [all[a]!, all[b]!];
    return model.pairs.find((p) => (p.i === i && p.j === j) || (p.i === j && p.j === i))?.kij ?? 0;
  };
  const of = (z: readonly number[]): number[] => all.map((i) => z[i]!);
  const liquid = lnPhiOf('liquid', T_K, P_Pa, of(x), pure, kij);
  const vapour = lnPhiOf('vapour', T_K, P_Pa, of(y), pure, kij);
  let worst = 0;
  let apart = 0;
  all.forEach((i, k) => {
    worst = Math.max(worst, Math.abs(Math.log(y[i]! / x[i]!) + vapour[k]! - liquid[k]!));
    apart = Math.max(apart, Math.abs(Math.log(y[i]! / x[i]!)));
  });
  // Both phases the same: fugacities agree, and there is no stage.
  return all.length > 1 && apart < 1e-4 ? Number.POSITIVE_INFINITY : worst;
}

/** How far the streams are from what was asked, relative. */
function missOf(fixed: FixedBy, k: number, unit: ProblemUnit, r: ColumnResults, sheet: Sheet): number {
  const { chemicals } = sheet.basis;
  const stream = (port: string): Solved => sheet.streams.get(unit.out[port]!) as Solved;
  switch (fixed.fix) {
    case 'refluxRatio':
      return Math.abs(r.refluxRatio! / fixed.value - 1);
    case 'purity': {
      const { z } = stream(fixed.product);
      const mass = (i: number): number => z[i]! * (fixed.basis === 'mole' ? 1 : chemicals[i]!.MW_g_mol);
      const all = chemicals.reduce((sum, _, i) => sum + mass(i), 0);
      return Math.abs(mass(fixed.chemical) / all - fixed.value) / Math.min(fixed.value, 1 - fixed.value);
    }
    case 'recovery': {
      const of = (s: Solved): number => s.n_mol_s * s.z[fixed.chemical]!;
      const fed = streamsOf(sheet, unit.in).reduce((sum, s) => sum + of(s), 0);
      return Math.abs(of(stream(fixed.product)) / fed - fixed.value) / Math.min(fixed.value, 1 - fixed.value);
    }
    case 'flow': {
      if (fixed.value.is !== 'share' || fixed.value.basis !== 'mole' || fixed.value.chemical !== undefined)
        throw new Error('the referee knows flows as molar shares');
      const read = sheet.problem.reads.find((x) => x.unit === unit.id && x.path === `fixedBy.${k}.value`);
      const whole = read
        ? (sheet.streams.get(read.stream) as Solved).n_mol_s
        : streamsOf(sheet, unit.in).reduce((sum, s) => sum + s.n_mol_s, 0);
      return Math.abs(stream(fixed.product).n_mol_s / whole / fixed.value.share - 1);
    }
    default:
      throw new Error(`the referee does not know "${fixed.fix}"`);
  }
}
