import type { Phase } from '../equilibrium/types';
import { type PureChemical, preparePure } from '../thermo/pure/pure';
import type { Model } from '../thermo/types';

/** Pure curves by model, prepared when first asked for. */
const kept = new WeakMap<Model, readonly PureChemical[]>();

function pures(model: Model): readonly PureChemical[] {
  const known = kept.get(model);
  if (known) return known;
  const made = model.chemicals.map(preparePure);
  kept.set(model, made);
  return made;
}

/** Chemicals with data must make up this share of the phase, by mole. */
const COVERED = 0.95;
/** A curve is followed no further outside its range [K]. */
const REACH_K = 50;

interface Part {
  readonly x: number;
  readonly MW: number;
  readonly mu_Pa_s: number;
}

/** The phase's chemicals whose viscosity is known here, fractions renormalised; undefined when too much is not. */
function partsOf(phase: Phase, T_K: number, model: Model, gas: boolean): Part[] | undefined {
  const parts: Part[] = [];
  let covered = 0;
  pures(model).forEach((pure, i) => {
    const x = phase.x[i]!;
    const curve = gas ? pure.viscosityG : pure.viscosityL;
    if (x === 0 || !curve) return;
    if (pure.outside_K(gas ? 'gas_viscosity' : 'liquid_viscosity', T_K) > REACH_K) return;
    const mu_Pa_s = curve(T_K);
    if (!(mu_Pa_s > 0)) return;
    covered += x;
    parts.push({ x, MW: model.chemicals[i]!.MW_g_mol, mu_Pa_s });
  });
  if (covered < COVERED) return undefined;
  return parts.map((p) => ({ ...p, x: p.x / covered }));
}

/**
 * Gas mixture at low pressure: mu = sum_i x_i mu_i / sum_j x_j phi_ij.
 * Source: Wilke, J. Chem. Phys. 18 (1950) 517.
 */
export function wilke_Pa_s(parts: readonly Part[]): number {
  let mu = 0;
  for (const a of parts) {
    let below = 0;
    for (const b of parts) {
      const root = 1 + Math.sqrt(a.mu_Pa_s / b.mu_Pa_s) * (b.MW / a.MW) ** 0.25;
      below += (b.x * root * root) / Math.sqrt(8 * (1 + a.MW / b.MW));
    }
    mu += (a.x * a.mu_Pa_s) / below;
  }
  return mu;
}

/**
 * Liquid mixture: ln mu = sum x_i ln mu_i.
 * Source: Arrhenius, Z. phys. Chem. 1 (1887) 285.
 */
export const logMean_Pa_s = (parts: readonly Part[]): number =>
  Math.exp(parts.reduce((sum, p) => sum + p.x * Math.log(p.mu_Pa_s), 0));

/**
 * Viscosity of a phase and the key of the mixture rule behind it; undefined where the data do not reach, and for dense phases,
 * for which no rule is built.
 */
export function phaseViscosity(
  phase: Phase,
  T_K: number,
  model: Model,
): { readonly viscosity_Pa_s: number; readonly viscosityRule: string } | undefined {
  if (phase.kind === 'dense') return undefined;
  const gas = phase.kind === 'vapour';
  const parts = partsOf(phase, T_K, model, gas);
  if (!parts) return undefined;
  return gas
    ? { viscosity_Pa_s: wilke_Pa_s(parts), viscosityRule: 'viscosity/wilke' }
    : { viscosity_Pa_s: logMean_Pa_s(parts), viscosityRule: 'viscosity/log-mean' };
}
