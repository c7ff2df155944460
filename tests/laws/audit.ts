/** An auditor of its own: closure recomputed from shown results alone, by the definitions of closure, without the engine's code. */
import type { ChemicalData } from '../../src/engine/chemicals/types';
import type { StreamResult, UnitResult } from '../../src/engine/network/types';

type Solved = Extract<StreamResult, { state: 'solved' }>;

export interface Audit {
  readonly mass: number;
  readonly energy: number;
  readonly chemicals: number;
  readonly elements: number;
}

const sum = (list: readonly number[]): number => list.reduce((a, b) => a + b, 0);

/** Largest relative misses around one unit: streams in, streams out, heat and power into it. */
export function audit(
  ins: readonly Solved[],
  outs: readonly Solved[],
  unit: Pick<UnitResult, 'heat_W' | 'power_W' | 'made_mol_s'>,
  chemicals: readonly ChemicalData[],
): Audit {
  const n = (side: readonly Solved[], i: number): number => sum(side.map((s) => s.n_mol_s * s.z[i]!));
  const mass = (side: readonly Solved[]): number => sum(side.map((s) => s.m_kg_s));
  const enthalpy = (side: readonly Solved[]): number => sum(side.map((s) => s.n_mol_s * s.h_J_mol));
  const sensible = (side: readonly Solved[]): number =>
    sum(
      side.map((s) =>
        Math.abs(s.H_W - sum(chemicals.map((c, i) => s.n_mol_s * s.z[i]! * (c.Hf_J_mol ?? 0)))),
      ),
    );
  const total = Math.max(sum(ins.map((s) => s.n_mol_s)), sum(outs.map((s) => s.n_mol_s)));
  const Q = unit.heat_W ?? 0;
  const W = unit.power_W ?? 0;
  const miss = (a: number, b: number, least: number): number =>
    a === b ? 0 : Math.abs(a - b) / Math.max(a, b, least);
  const elements = new Set(chemicals.flatMap((c) => Object.keys(c.elements ?? {})));
  const atoms = (side: readonly Solved[], e: string): number =>
    sum(chemicals.map((c, i) => (c.elements?.[e] ?? 0) * n(side, i)));
  return {
    mass: miss(mass(ins), mass(outs), 0),
    energy:
      Math.abs(enthalpy(ins) + Q + W - enthalpy(outs)) /
      (Math.max(sensible(ins), sensible(outs), Math.abs(Q) + Math.abs(W), total * 1e3) || 1),
    chemicals: Math.max(
      ...chemicals.map((_, i) => miss(n(ins, i) + (unit.made_mol_s?.[i] ?? 0), n(outs, i), 1e-6 * total)),
    ),
    elements: Math.max(...[...elements].map((e) => miss(atoms(ins, e), atoms(outs, e), 1e-6 * total))),
  };
}

export const worstOfAudit = (a: Audit): number => Math.max(a.mass, a.energy, a.chemicals, a.elements);
