import type { StreamState } from '../equilibrium/types';
import { type Model, T0_K } from '../thermo/types';
import type { ClosureEntry, UnitClosure } from './types';

/** What closure must know of the chemicals, read once. */
export interface ClosureData {
  readonly nc: number;
  readonly MW_kg_mol: Float64Array;
  /** Enthalpy as ideal gas at 298.15 K, elements datum [J/mol]. */
  readonly hIdeal_J_mol: Float64Array;
  /** Atoms by element over the full list; NaN where a chemical has no formula. */
  readonly elements: readonly (readonly [string, Float64Array])[];
}

/** What closure asks of the chemicals, from the model's full list. */
export function closureData(model: Model): ClosureData {
  const { chemicals, nc } = model;
  const names = new Set(chemicals.flatMap((c) => Object.keys(c.elements ?? {})));
  return {
    nc,
    MW_kg_mol: Float64Array.from(chemicals, (c) => c.MW_g_mol * 1e-3),
    hIdeal_J_mol: Float64Array.from(chemicals, (_, i) => model.of([i]).hIdeal_J_mol(0, T0_K)),
    elements: [...names].map((name) => [
      name,
      Float64Array.from(chemicals, (c) => (c.elements ? (c.elements[name] ?? 0) : Number.NaN)),
    ]),
  };
}

/** No chemical, element or mass counts as less than this share of the total flow. */
const FLOOR = 1e-6;
/** Energy is measured against no less than this per mole [J/mol]. */
const LEAST_ENERGY_J_MOL = 1e3;

/** Enthalpy of the same components as ideal gas at 298.15 K [W]: what a stream's enthalpy is measured from. */
export function idealDatum_W(n_mol_s: Float64Array, data: ClosureData): number {
  let H = 0;
  for (let i = 0; i < data.nc; i++) if (n_mol_s[i] !== 0) H += n_mol_s[i]! * data.hIdeal_J_mol[i]!;
  return H;
}

interface Side {
  readonly n_mol_s: Float64Array;
  readonly total_mol_s: number;
  readonly mass_kg_s: number;
  readonly H_W: number;
  /** Sum of |H - H as ideal gas at 298.15 K| [W]. */
  readonly sensible_W: number;
}

function sideOf(streams: readonly StreamState[], data: ClosureData): Side {
  const n_mol_s = new Float64Array(data.nc);
  let total_mol_s = 0;
  let mass_kg_s = 0;
  let H_W = 0;
  let sensible_W = 0;
  for (const s of streams) {
    for (let i = 0; i < data.nc; i++) {
      const n = s.n_mol_s[i]!;
      n_mol_s[i]! += n;
      total_mol_s += n;
      mass_kg_s += n * data.MW_kg_mol[i]!;
    }
    H_W += s.H_W;
    sensible_W += Math.abs(s.H_W - idealDatum_W(s.n_mol_s, data));
  }
  return { n_mol_s, total_mol_s, mass_kg_s, H_W, sensible_W };
}

/** Of what is not there at all. */
const NONE: ClosureEntry = Object.freeze({ in: 0, out: 0, made: 0, relative: 0 });

const entry = (into: number, out: number, made: number, scale: number): ClosureEntry => {
  if (into === 0 && out === 0 && made === 0) return NONE;
  const missing = Math.abs(into + made - out);
  return { in: into, out, made, relative: missing === 0 ? 0 : missing / scale };
};

const atoms = (n: Float64Array, count: Float64Array): number => {
  let sum = 0;
  for (let i = 0; i < n.length; i++) if (n[i] !== 0) sum += n[i]! * count[i]!;
  return sum;
};

/**
 * Closure over an envelope, from its streams, heat, power and what reactions made; nothing else is asked.
 *
 * Mass, chemicals, elements: |in + made - out| relative to the larger of in and out; chemicals and elements to no less than
 * 1e-6 of the total flow. Energy: |H in - H out + Q + W| relative to the largest of: sum of n |h - h as ideal gas at 298.15 K|
 * (the larger side), |Q| + |W|, n * 1 kJ/mol; never to formation enthalpies, which would hide errors. Its `made` is Q + W.
 * Elements are left out when a chemical that flows has no formula.
 *
 * @param heat_W, power_W  into the envelope [W]
 * @param made_mol_s       full list, below zero for what is consumed [mol/s]
 */
export function closureOf(
  ins: readonly StreamState[],
  outs: readonly StreamState[],
  heat_W: number,
  power_W: number,
  made_mol_s: Float64Array | undefined,
  data: ClosureData,
): UnitClosure {
  const a = sideOf(ins, data);
  const b = sideOf(outs, data);
  const total = Math.max(a.total_mol_s, b.total_mol_s);
  const mass = Math.max(a.mass_kg_s, b.mass_kg_s);
  const energy = Math.max(
    a.sensible_W,
    b.sensible_W,
    Math.abs(heat_W) + Math.abs(power_W),
    total * LEAST_ENERGY_J_MOL,
  );
  const chemicals: ClosureEntry[] = [];
  for (let i = 0; i < data.nc; i++) {
    const [into, out] = [a.n_mol_s[i]!, b.n_mol_s[i]!];
    chemicals.push(entry(into, out, made_mol_s?.[i] ?? 0, Math.max(into, out, FLOOR * total)));
  }
  const elements: Record<string, ClosureEntry> = {};
  for (const [name, count] of data.elements) {
    const [into, out] = [atoms(a.n_mol_s, count), atoms(b.n_mol_s, count)];
    if (Number.isNaN(into) || Number.isNaN(out)) continue;
    elements[name] = entry(into, out, 0, Math.max(into, out, FLOOR * total));
  }
  return {
    mass: entry(a.mass_kg_s, b.mass_kg_s, 0, mass),
    energy: entry(a.H_W, b.H_W, heat_W + power_W, energy),
    chemicals,
    elements,
  };
}

/** The worst relative figure of an envelope [-]; NaN when one is not a number. */
export function worstOf(c: UnitClosure): number {
  let worst = Math.max(c.mass.relative, c.energy.relative);
  for (const e of c.chemicals) worst = Math.max(worst, e.relative);
  for (const e of Object.values(c.elements)) worst = Math.max(worst, e.relative);
  return worst;
}
