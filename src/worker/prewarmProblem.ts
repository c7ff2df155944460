import type { ChemicalData } from '../engine/chemicals/types';
import type { StreamId, UnitId } from '../engine/ids';
import type { Basis, Problem, ProblemUnit } from '../engine/network/types';

/** Made-up chemicals, light to heavy: they only have to lead the code along its usual paths, and are never shown. */
const chemical = (
  id: string,
  MW_g_mol: number,
  Tc_K: number,
  Pc_Pa: number,
  omega: number,
): ChemicalData => ({
  id,
  name: id,
  MW_g_mol,
  Tc_K,
  Pc_Pa,
  omega,
  Hf_J_mol: 0,
  S0_J_molK: 200,
  elements: { C: 1 },
  corr: { ideal_gas_cp: [{ form: 'powers', of: 'Cp', c: [20 + MW_g_mol, 0.1] }] },
  sources: {},
});

export const WARMING: Basis = {
  id: 'prewarm',
  chemicals: [
    chemical('light', 20, 200, 46e5, 0.02),
    chemical('lighter', 44, 370, 42e5, 0.15),
    chemical('middling', 72, 470, 34e5, 0.25),
    chemical('heavy', 86, 507, 30e5, 0.3),
    chemical('heavier', 100, 540, 27e5, 0.35),
    chemical('heaviest', 142, 618, 21e5, 0.49),
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

/** Feed, cooler, drum, let-down, two columns, compressor, pump, join; the conditions change with the edit, so that nothing is reused. */
export function warmingProblem(edit: number): Problem {
  const moved = 1 + 1e-3 * (edit % 50);
  const parts = Float64Array.of(0.1, 0.15, 0.2, 0.2, 0.2, 0.15);
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
      unit('j join', 'in1=3 in2=9', 'out=13', { p: { drop: 0 } }),
      unit('s cooler', 'in=10', 'out=14', { p: { drop: 1e4 }, subcooling: 5 }),
      unit('q heater', 'in=12', 'out=15', { p: { drop: 1e4 }, duty: 2e4 }),
      unit('e product', 'in=13', '', {}),
    ],
  };
}
