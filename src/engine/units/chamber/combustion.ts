import { type ElementCounts, sameElements } from '../../chemicals/elements';
import { type GasKey, gasPlaces } from '../../chemicals/gases';
import type { ChemicalData } from '../../chemicals/types';
import { type Finding, named, noSolution, type Outcome, solved } from '../../outcome';
import type { Model } from '../../thermo/types';
import { whyNotReacting } from '../reaction/check';
import type { Call } from '../types';

/**
 * Heat of vaporisation of water at 25 degC [J/mol]: the difference of the enthalpies of formation of the gas, -241 826, and of
 * the liquid, -285 830.
 * Source: Cox, Wagman & Medvedev, CODATA Key Values for Thermodynamics (1989); not checked against the printed table. Steam
 * tables: 43.99 kJ/mol.
 */
export const WATER_CONDENSES_J_MOL = 44004;

/** Elements that burn or come out of what burns. */
const BURNT: ReadonlySet<string> = new Set(['C', 'H', 'O', 'N', 'S', 'Cl']);
/** What passes unchanged. */
const PASSES: readonly ElementCounts[] = [
  { O: 2 },
  { C: 1, O: 2 },
  { H: 2, O: 1 },
  { N: 2 },
  { Ar: 1 },
  { S: 1, O: 2 },
  { N: 1, O: 1 },
  { N: 1, O: 2 },
  { H: 1, Cl: 1 },
];

/** One mole of a chemical, completely burnt; all zero for what passes. */
export interface Burning {
  readonly burns: boolean;
  /** Oxygen that it takes [mol/mol]. */
  readonly O2: number;
  readonly made: Readonly<Partial<Record<GasKey, number>>>;
  /** Heat set free with all products as gas at 25 degC, fuel as ideal gas at 25 degC [J/mol]. */
  readonly LHV_J_mol: number;
}

const PASSING: Burning = { burns: false, O2: 0, made: {}, LHV_J_mol: 0 };

/** Complete combustion of this composition over the full list. */
export interface Combustion {
  readonly places: Readonly<Record<GasKey, number>>;
  readonly of: readonly Burning[];
}

const because = (
  call: Pick<Call<unknown>, 'unit'>,
  code: 'chamber/element-not-burnt' | 'chamber/product-missing',
  c: ChemicalData,
  what: string,
): Finding => ({
  code,
  weight: 'beyond-limit',
  at: { unit: call.unit, chemical: c.id },
  evidence: [
    named('chemical', c.id),
    named(code === 'chamber/product-missing' ? 'product' : 'element', what),
  ],
});

/**
 * What becomes of each chemical that is there: C to CO2, H to H2O and HCl, S to SO2, bound N to N2, Cl to HCl. Oxygen that is
 * taken: C + (H - Cl)/4 + S - O/2 [mol/mol].
 *
 * @param present  whether each chemical of the full list flows
 * @returns        over the full list; or one finding for each chemical that cannot be burnt: reaction/...,
 *                 chamber/element-not-burnt, chamber/product-missing
 */
export function combustionOf(
  call: Pick<Call<unknown>, 'unit' | 'model'>,
  present: (i: number) => boolean,
): Outcome<Combustion> {
  const key = call.model.chemicals.map((_, i) => (present(i) ? '1' : '0')).join('');
  const known = kept.get(call.model)?.get(key);
  if (known) return solved(known);
  const made = workOut(call, present);
  if (made.state === 'solved') {
    const those = kept.get(call.model) ?? new Map<string, Combustion>();
    kept.set(call.model, those.set(key, made.value));
  }
  return made;
}

/** By the chemicals that flow; of a basis there are few such sets. */
const kept = new WeakMap<Model, Map<string, Combustion>>();

function workOut(
  call: Pick<Call<unknown>, 'unit' | 'model'>,
  present: (i: number) => boolean,
): Outcome<Combustion> {
  const { chemicals }: Pick<Model, 'chemicals'> = call.model;
  const places = gasPlaces(chemicals);
  const hf = (key: GasKey): number => chemicals[places[key]]?.Hf_J_mol ?? Number.NaN;
  const faults: Finding[] = [];
  const of = chemicals.map((c, i): Burning => {
    if (!present(i)) return PASSING;
    const fault = whyNotReacting(call, c);
    if (fault) {
      faults.push(fault);
      return PASSING;
    }
    const atoms = c.elements!;
    if (PASSES.some((p) => sameElements(p, atoms))) return PASSING;
    const strange = Object.keys(atoms).find((e) => !BURNT.has(e) && atoms[e] !== 0);
    if (strange !== undefined) {
      faults.push(because(call, 'chamber/element-not-burnt', c, strange));
      return PASSING;
    }
    const { C = 0, H = 0, O = 0, N = 0, S = 0, Cl = 0 } = atoms;
    const all: readonly (readonly [GasKey, number])[] = [
      ['CO2', C],
      ['H2O', (H - Cl) / 2],
      ['SO2', S],
      ['N2', N / 2],
      ['HCl', Cl],
    ];
    const made = all.filter(([, n]) => n !== 0);
    const absent = made.find(([key]) => places[key] < 0)?.[0] ?? (places.O2 < 0 ? 'O2' : undefined);
    if (absent !== undefined) faults.push(because(call, 'chamber/product-missing', c, absent));
    const after = made.reduce((h, [key, n]) => h + n * hf(key), 0);
    return {
      burns: true,
      O2: C + (H - Cl) / 4 + S - O / 2,
      made: Object.fromEntries(made),
      LHV_J_mol: c.Hf_J_mol! - after,
    };
  });
  const [first, ...rest] = faults;
  return first ? noSolution(first, ...rest) : solved({ places, of });
}

/** What amounts need, give and set free when they burn. */
export interface Sums {
  /** Oxygen for all that burns, theoretical [mol/s]. */
  readonly theoreticalO2: number;
  /** Oxygen that they bring along [mol/s]. */
  readonly O2: number;
  /** All gas but water after complete combustion without any of the oxygen [mol/s]. */
  readonly dryRest: number;
  readonly LHV_W: number;
  readonly waterMade: number;
}

/**
 * Oxygen needed and brought, dry gas made, heat set free by these amounts.
 *
 * @param n_mol_s  full list [mol/s]; per mole of a mixture just as well
 */
export function sumsOf({ of, places }: Combustion, n_mol_s: Float64Array): Sums {
  let theoreticalO2 = 0;
  let dryRest = 0;
  let LHV_W = 0;
  let waterMade = 0;
  for (let i = 0; i < n_mol_s.length; i++) {
    const n = n_mol_s[i]!;
    const b = of[i]!;
    if (n === 0) continue;
    if (b.burns) {
      theoreticalO2 += n * b.O2;
      LHV_W += n * b.LHV_J_mol;
      for (const [key, made] of Object.entries(b.made)) {
        if (key === 'H2O') waterMade += n * made;
        else dryRest += n * made;
      }
    } else if (i !== places.O2 && i !== places.H2O) dryRest += n;
  }
  const O2 = places.O2 < 0 ? 0 : n_mol_s[places.O2]!;
  return { theoreticalO2, O2, dryRest, LHV_W, waterMade };
}

/**
 * Amounts after complete combustion over the full list [mol/s]; the oxygen may come out negative when it is short.
 * What is left of oxygen by rounding alone counts as none.
 */
export function burnt({ of, places }: Combustion, n_mol_s: Float64Array): Float64Array {
  const out = Float64Array.from(n_mol_s, (n, i) => (of[i]!.burns ? 0 : n));
  let taken = 0;
  for (let i = 0; i < n_mol_s.length; i++) {
    const n = n_mol_s[i]!;
    const b = of[i]!;
    if (n === 0 || !b.burns) continue;
    taken += n * b.O2;
    for (const [key, made] of Object.entries(b.made)) out[places[key as GasKey]]! += n * made;
  }
  if (places.O2 >= 0) {
    const left = out[places.O2]! - taken;
    out[places.O2] = Math.abs(left) <= 1e-12 * Math.abs(taken) ? 0 : left;
  }
  return out;
}
