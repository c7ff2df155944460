/**
 * What a chemical's data must agree on before it enters the bank.
 *
 * Passing shows that the values of one chemical fit together, not that they are right: that is for the comparisons
 * with second sources in the tests.
 */
import { isCas } from '../engine/chemicals/cas';
import { elementCounts, molarMass_g_mol, sameElements } from '../engine/chemicals/elements';
import type { ChemicalData, Corr, CorrProperty } from '../engine/chemicals/types';
import { preparePure } from '../engine/thermo/pure/pure';
import { corrFault } from '../engine/thermo/pure/usable';
import { R_J_molK } from '../engine/thermo/types';

/** Chemicals whose vapour dimerises or is a quantum gas: the slope of ln P says little about their heat of vaporisation. */
const NOT_BY_SLOPE = new Set([
  'helium',
  'acetic-acid',
  'formic-acid',
  'propionic-acid',
  'butyric-acid',
  'acrylic-acid',
  'methacrylic-acid',
]);
/** Its heat capacity falls where low-lying electronic levels fill up. */
const NOT_RISING = new Set(['nitric-oxide']);

/** Reasons why a correlation row cannot be used; empty when it can. Every row of the bank states its range. */
export function rowFaults(of: CorrProperty, corr: Corr): string[] {
  if (corr.Tmin === undefined || corr.Tmax === undefined) return ['no range'];
  const found = corrFault(of, [corr]);
  if (!found) return [];
  return [found.T_K === undefined ? found.fault : `${found.fault} at ${found.T_K.toFixed(2)} K`];
}

/** Reasons why a chemical is left out; empty when its data agree. */
export function chemicalFaults(c: ChemicalData): string[] {
  const faults: string[] = [];
  const say = (ok: boolean, what: string): void => {
    if (!ok) faults.push(what);
  };
  say(c.cas !== undefined && isCas(c.cas), 'CAS number');
  const counts = c.formula === undefined ? undefined : elementCounts(c.formula);
  say(counts !== undefined && c.elements !== undefined && sameElements(counts, c.elements), 'formula');
  const MW = counts && molarMass_g_mol(counts);
  say(MW !== undefined && Math.abs(c.MW_g_mol / MW - 1) < 1e-4, 'molar mass');

  const { Tb_K: Tb, Tc_K: Tc, Pc_Pa: Pc, Vc_m3_mol: Vc, omega } = c;
  if (Tb === undefined || Tc === undefined || Pc === undefined || Vc === undefined || omega === undefined) {
    return [...faults, 'a critical constant, omega or the boiling point is missing'];
  }
  const pure = preparePure(c);
  const { psat, dlnPsat_dT, hvap, rhoL, cpIdeal } = pure;
  if (c.Hf_J_mol === undefined) faults.push('no enthalpy of formation');
  if (!cpIdeal) return [...faults, 'no ideal-gas heat capacity'];
  if (!psat || !dlnPsat_dT || !hvap || !rhoL)
    return [...faults, 'no vapour pressure, heat of vaporisation or density'];

  // A chemical that sublimes at one atmosphere has no liquid there.
  const sublimes = c.Tm_K !== undefined && Tb < c.Tm_K + 4;
  if (!sublimes) {
    say(Math.abs(psat(Tb) / 101325 - 1) < 0.02, 'vapour pressure at the boiling point');
    say(
      slopeAgrees(c.id, Tb, Tc, Pc, omega, psat, dlnPsat_dT, hvap, rhoL),
      'heat of vaporisation against slope',
    );
  }
  say(Math.abs(psat(Tc) / Pc - 1) < 0.05, 'vapour pressure at the critical point');
  say(Math.abs(-1 - Math.log10(psat(0.7 * Tc) / Pc) - omega) < 0.02, 'acentric factor');
  const Zc = (Pc * Vc) / (R_J_molK * Tc);
  say(Zc > 0.14 && Zc < 0.32, 'critical compressibility');
  const mass = rhoL(Math.min(298.15, Tb)) * c.MW_g_mol * 1e-3;
  say(mass > (c.id === 'hydrogen' || c.id === 'helium' ? 50 : 400) && mass < 1700, 'liquid density');

  // 0.1 %: as much as two rows may part where they meet.
  let last = cpIdeal(200);
  for (let T = 200; T <= 1500; T += 10) {
    const cp = cpIdeal(T);
    say(cp > 0, `heat capacity at ${T} K`);
    say(NOT_RISING.has(c.id) || cp >= last * (1 - 1e-3), `heat capacity falls at ${T} K`);
    last = cp;
  }
  const rows = c.corr.ideal_gas_cp ?? [];
  rows.slice(1).forEach((row, k) => {
    const before = rows[k]!;
    say(before.Tmax === row.Tmin, 'heat-capacity rows do not meet');
    const at = (corr: Corr): number =>
      preparePure({ ...c, corr: { ideal_gas_cp: [corr] } }).cpIdeal!(row.Tmin ?? 0);
    say(Math.abs(at(before) / at(row) - 1) < 1e-3, `heat-capacity rows part at ${row.Tmin} K`);
  });
  return faults;
}

/**
 * Whether the tabulated heat of vaporisation agrees with Clapeyron's, Tb (v_gas - v_liquid) dP/dT at the normal boiling point,
 * within 4 %: gas by the second virial coefficient, liquid by its tabulated density.
 * Source of the coefficient: Tsonopoulos, AIChE J. 20 (1974) 263, his f(0) and f(1) for non-polar gases.
 */
function slopeAgrees(
  id: string,
  Tb: number,
  Tc: number,
  Pc: number,
  omega: number,
  psat: (T: number) => number,
  dln: (T: number) => number,
  hvap: (T: number) => number,
  rhoL: (T: number) => number,
): boolean {
  if (NOT_BY_SLOPE.has(id)) return true;
  const r = Tb / Tc;
  const f0 = 0.1445 - 0.33 / r - 0.1385 / r ** 2 - 0.0121 / r ** 3 - 0.000607 / r ** 8;
  const f1 = 0.0637 + 0.331 / r ** 2 - 0.423 / r ** 3 - 0.008 / r ** 8;
  const B = ((R_J_molK * Tc) / Pc) * (f0 + omega * f1);
  const P = psat(Tb);
  const dv = (R_J_molK * Tb) / P + B - 1 / rhoL(Tb);
  return Math.abs((Tb * dv * P * dln(Tb)) / hvap(Tb) - 1) < 0.04;
}
