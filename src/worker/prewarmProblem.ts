import { type ElementCounts, molarMass_g_mol } from '../engine/chemicals/elements';
import type { ChemicalData } from '../engine/chemicals/types';
import type { StreamId, UnitId } from '../engine/ids';
import type { Basis, Problem, ProblemUnit } from '../engine/network/types';

/** Made-up chemicals with rounded constants: they only have to lead the code along its usual paths, and are never shown. */
function chemical(
  id: string,
  elements: ElementCounts,
  Tc_K: number,
  Pc_Pa: number,
  omega: number,
  Hf_J_mol: number,
): ChemicalData {
  const MW_g_mol = molarMass_g_mol(elements) ?? Number.NaN;
  return {
    id,
    name: id,
    MW_g_mol,
    Tc_K,
    Pc_Pa,
    omega,
    Hf_J_mol,
    S0_J_molK: 200,
    elements,
    corr: { ideal_gas_cp: [{ form: 'powers', of: 'Cp', c: [20 + MW_g_mol, 0.02] }] },
    sources: {},
  };
}

/** Chemicals and model of the warm-up. */
export const WARMING: Basis = {
  id: 'prewarm',
  chemicals: [
    chemical('light', { C: 1, H: 4 }, 200, 46e5, 0.02, -75e3),
    chemical('lighter', { C: 3, H: 8 }, 370, 42e5, 0.15, -100e3),
    chemical('middling', { C: 5, H: 12 }, 470, 34e5, 0.25, -150e3),
    chemical('heavy', { C: 6, H: 14 }, 507, 30e5, 0.3, -170e3),
    chemical('heavier', { C: 7, H: 16 }, 540, 27e5, 0.35, -190e3),
    chemical('heaviest', { C: 10, H: 22 }, 618, 21e5, 0.49, -250e3),
    chemical('burning', { O: 2 }, 155, 50e5, 0.02, 0),
    chemical('idle', { N: 2 }, 126, 34e5, 0.04, 0),
    chemical('burnt', { C: 1, O: 2 }, 304, 74e5, 0.22, -390e3),
    chemical('wet', { H: 2, O: 1 }, 647, 220e5, 0.34, -240e3),
  ],
  model: {
    kind: 'peng-robinson',
    alpha: '1976',
    liquidH: 'psat-slope',
    liquidVolume: 'corrected',
    poynting: false,
    pairs: [
      { i: 0, j: 4, kij: 0.02, origin: 'predicted', source: '' },
      { i: 0, j: 5, kij: 0.04, origin: 'none', source: '' },
      { i: 0, j: 7, kij: 0.03, origin: 'fitted', source: '' },
    ],
  },
};

const streams = (words: string): Record<string, StreamId> =>
  Object.fromEntries(words.split(' ').map((pair) => pair.split('=') as [string, StreamId]));

/** A unit by 'id kind', its inlets and outlets as 'port=stream'. */
function unit(name: string, into: string, out: string, settings: unknown): ProblemUnit {
  const [id, kind] = name.split(' ') as [UnitId, string];
  return { id, kind, settings, in: into ? streams(into) : {}, out: out ? streams(out) : {} };
}

const column = (distillate: 'vapour' | 'liquid', share: number) => ({
  stages: 12,
  top: { distillate },
  bottom: { reboiler: true },
  feeds: { feed1: { stage: 6 } },
  pressure: { condenser: 1.9e5, top: 2e5, bottom: 2.2e5, reboiler: 2.2e5 },
  fixedBy: [
    { fix: 'refluxRatio', value: 2 },
    {
      fix: 'flow',
      product: `${distillate}Distillate`,
      value: { is: 'share', share, of: 'feed', basis: 'mole' },
    },
  ],
});

/** Feed, cooler, drum, combustion, let-down, two columns, machines, join; the conditions change with the edit, so that nothing is reused. */
export function warmingProblem(edit: number): Problem {
  const moved = 1 + 1e-3 * (edit % 50);
  const parts = Float64Array.of(0.1, 0.15, 0.2, 0.2, 0.2, 0.15, 0, 0, 0, 0);
  const air = Float64Array.of(0, 0, 0, 0, 0, 0, 0.21, 0.78, 0, 0.01);
  return {
    edit,
    basis: WARMING.id,
    site: { pressure_Pa: 101325, ambient_K: 293.15, coolingWater_K: 301.15 },
    reads: [],
    aims: [],
    limits: {},
    units: [
      unit('f feed', '', 'out=1', {
        state: { T: 380, P: 9e5 * moved },
        flow: { is: 'molar', n_mol_s: 10 },
        composition: { is: 'parts', basis: 'mole', parts },
      }),
      unit('c cooler', 'in=1', 'out=2', { p: { drop: 1e4 }, T: 320 }),
      unit('d drum', 'in1=2', 'vapour=3 liquid=4', { p: { drop: 0 } }),
      unit('v valve', 'in=4', 'out=5', { p: { P: 2.4e5 } }),
      unit('h heater', 'in=5', 'out=6', { p: { drop: 1e4 }, T: 340 }),
      unit('a column', 'feed1=6', 'vapourDistillate=7 bottoms=8', column('vapour', 0.3)),
      unit('k compressor', 'in=7', 'out=9', { p: { P: 6e5 }, efficiency: { isentropic: 0.75 } }),
      unit('b column', 'feed1=8', 'liquidDistillate=10 bottoms=11', column('liquid', 0.4)),
      unit('p pump', 'in=11', 'out=12', { p: { P: 8e5 }, efficiency: 0.7 }),
      unit('g feed', '', 'out=16', {
        state: { T: 300, P: 1e5 },
        flow: { is: 'molar', n_mol_s: 100 * moved },
        composition: { is: 'parts', basis: 'mole', parts: air },
      }),
      unit('n compressor', 'in=16', 'out=17', { p: { P: 1.2e5 }, efficiency: { isentropic: 0.7 } }),
      unit('o valve', 'in=3', 'out=18', { p: { P: 1.2e5 } }),
      unit('x chamber', 'fuel1=18 air=17', 'out=19', { p: { drop: 0 }, heat: { duty: 0 } }),
      unit('y cooler', 'in=19', 'out=20', { p: { drop: 5e3 }, T: 450 }),
      unit('s cooler', 'in=10', 'out=14', { p: { drop: 1e4 }, subcooling: 5 }),
      unit('j join', 'in1=9 in2=14', 'out=13', { p: { drop: 0 } }),
      unit('q heater', 'in=12', 'out=15', { p: { drop: 1e4 }, duty: 2e4 }),
      unit('e product', 'in=13', '', {}),
    ],
  };
}
