/** What a chamber does. Expected values are derived beside the check; published figures stand in tests/published. */
import { beforeAll, describe, expect, test } from 'vitest';
import type { Basis, ProblemUnit } from '../../src/engine/network/types';
import type { ChamberResults } from '../../src/engine/units/chamber/types';
import { audit, worstOfAudit } from '../laws/audit';
import {
  basisOf,
  fresh,
  molar,
  parts,
  problemOf,
  type SolvedStream,
  solvedStream,
  unit,
  unitResult,
} from '../network/fixtures';

const IDS = [
  'methane',
  'n-hexane',
  'hydrogen-sulfide',
  'nitrogen',
  'oxygen',
  'argon',
  'carbon-dioxide',
  'water',
  'sulfur-dioxide',
];
let basis: Basis;
beforeAll(async () => {
  basis = await basisOf(IDS);
});

const stream = (id: string, port: string, n: number, x: Record<string, number>, of = basis): ProblemUnit =>
  unit(`${id} feed > out=${port}`, {
    state: { T: 310, P: 1.2e5 },
    flow: molar(n),
    composition: parts(...of.chemicals.map((c) => x[c.id] ?? 0)),
  });
const FUEL = { methane: 0.7, 'n-hexane': 0.05, nitrogen: 0.25 };
const DRY = { is: 'preset', preset: 'dry air', relativeHumidity: 0 };
const air = (more: object) => ({ T: 293.15, P: 1.2e5, composition: DRY, ...more });
const settings = (more: object) => ({ p: { drop: 0 }, heat: { duty: 0 }, ...more });

function burn(
  more: object,
  {
    fuel = FUEL as Record<string, number>,
    joined = undefined as undefined | Record<string, number>,
    air: n = 100,
    of = basis,
  } = {},
) {
  const units = [
    stream('f', 'a', 10, fuel, of),
    ...(joined ? [stream('g', 'i', n, joined, of)] : []),
    unit(`c chamber fuel1=a ${joined ? 'air=i' : ''} > out=b`, settings(more)),
  ];
  const batch = fresh(problemOf(of, units), of);
  const result = unitResult(batch, 'c')!;
  return {
    result,
    reason: result.reasons?.[0],
    ...(result.results as unknown as ChamberResults),
    codes: batch.findings.map((f) => f.code).filter((c) => c.startsWith('chamber/')),
    out: () => solvedStream(batch, 'b'),
    of: (id: string) =>
      solvedStream(batch, 'b').n_mol_s *
      solvedStream(batch, 'b').z[of.chemicals.findIndex((c) => c.id === id)]!,
    audit: () =>
      worstOfAudit(
        audit(
          [
            solvedStream(batch, 'a'),
            ...(joined ? [solvedStream(batch, 'i')] : []),
            ...(Object.values(result.drawn ?? {}) as SolvedStream[]),
          ],
          [solvedStream(batch, 'b')],
          result,
          of.chemicals,
        ),
      ),
  };
}

// Derived: 7 mol/s of methane take 14 of oxygen, 0.5 of hexane 4.75.
const THEORETICAL = 18.75;
const OXYGEN = 0.2095;

describe('a chamber', () => {
  test('draws the air for an excess, and burns everything', () => {
    const c = burn({ air: air({ excess: 0.15 }) });
    expect(c.theoreticalO2_mol_s).toBeCloseTo(THEORETICAL, 10);
    expect(c.air_mol_s).toBeCloseTo((1.15 * THEORETICAL) / OXYGEN, 9);
    expect(c.excess).toBeCloseTo(0.15, 12);
    expect([c.of('methane'), c.of('n-hexane')]).toEqual([0, 0]);
    const CO2 = 7 + 3 + 0.0004 * c.air_mol_s!;
    expect(c.of('carbon-dioxide')).toBeCloseTo(CO2, 9);
    expect(c.of('water')).toBeCloseTo(14 + 3.5, 9);
    expect(c.of('oxygen')).toBeCloseTo(0.15 * THEORETICAL, 9);
    expect(c.CO2_kg_s).toBeCloseTo(CO2 * 44.009e-3, 9);
    const dry = c.out().n_mol_s - 17.5;
    expect(c.O2Dry).toBeCloseTo((0.15 * THEORETICAL) / dry, 9);
    expect(c.CO2Dry).toBeCloseTo(CO2 / dry, 9);
    expect(c.O2Wet).toBeCloseTo((0.15 * THEORETICAL) / (dry + 17.5), 9);
    expect(c.audit()).toBeLessThan(1e-11);
  });

  test('shows the air it draws as a stream of its own', () => {
    const drawn = burn({ air: air({ excess: 0.15 }) }).result.drawn?.air;
    expect(drawn).toMatchObject({ state: 'solved', T_K: 293.15, P_Pa: 1.2e5 });
  });

  test('comes back: excess, oxygen in the dry flue gas and flow lead to the same flame', () => {
    const a = burn({ air: air({ excess: 0.4 }) });
    for (const more of [
      { stackO2Dry: a.O2Dry },
      { flow: molar(a.air_mol_s!) },
      { flow: { is: 'share', share: a.air_mol_s! / 10, of: 'feed', basis: 'mole' } },
    ]) {
      const b = burn({ air: air(more) });
      expect(b.excess).toBeCloseTo(0.4, 9);
      expect(b.T_K).toBeCloseTo(a.T_K, 6);
    }
  });

  test('with a stream joined has its excess as a result, and leaves the setting out with a note', () => {
    const n = (1.6 * THEORETICAL) / 0.21;
    const c = burn({}, { joined: { nitrogen: 0.79, oxygen: 0.21 }, air: n });
    expect(c.excess).toBeCloseTo(0.6, 10);
    expect(c).not.toHaveProperty('air_mol_s');
    expect(c.audit()).toBeLessThan(1e-11);
    const idle = burn({ air: air({ excess: 0.1 }) }, { joined: { nitrogen: 0.79, oxygen: 0.21 }, air: n });
    expect(idle.T_K).toBe(c.T_K);
    expect(idle.codes).toContain('chamber/air-setting-idle');
  });

  test('short of air says by how much, and what 15 % excess takes', () => {
    const n = 70;
    const { reason } = burn({}, { joined: { nitrogen: 0.79, oxygen: 0.21 }, air: n });
    expect(reason).toMatchObject({ code: 'chamber/air-short', at: { unit: 'c', port: 'air' } });
    const seen = (name: string) => reason!.evidence.find((e) => e.name === name)!.value;
    expect(seen('short')).toBeCloseTo(THEORETICAL / 0.21 - n, 8);
    expect(seen('enough')).toBeCloseTo((1.15 * THEORETICAL) / 0.21, 8);
    expect(burn({}, { joined: { nitrogen: 1 } }).reason).toMatchObject({ code: 'chamber/no-oxygen' });
    expect(burn({ air: air({ flow: molar(20) }) }).reason).toMatchObject({
      code: 'chamber/air-short',
      at: { path: 'air' },
    });
  });

  test('with just enough oxygen leaves none', () => {
    const c = burn({ air: air({ excess: 0 }) });
    expect(c.of('oxygen')).toBe(0);
    expect(c.audit()).toBeLessThan(1e-11);
  });

  test('loses heat as a duty, as a share of the lower heating value, or down to a temperature', () => {
    const adiabatic = burn({ air: air({ excess: 1 }) });
    const loss = burn({ air: air({ excess: 1 }), heat: { lossOfLHV: 0.05 } });
    expect(loss.duty_W).toBeCloseTo(-0.05 * adiabatic.LHV_W, 6);
    expect(loss.T_K).toBeLessThan(adiabatic.T_K - 30);
    const duty = burn({ air: air({ excess: 1 }), heat: { duty: loss.duty_W } });
    expect(duty.T_K).toBeCloseTo(loss.T_K, 7);
    const T = burn({ air: air({ excess: 1 }), heat: { T: loss.T_K } });
    expect(T.duty_W / loss.duty_W).toBeCloseTo(1, 8);
    expect(burn({ air: air({ excess: 1 }), heat: { T: 1800 } }).codes).toContain('chamber/takes-heat');
  });

  test('has a lower heating value that its flame shows: cooled to 25 degC it gives it back', () => {
    // Derived: with fuel and air at 25 degC as ideal gases and water kept as gas (a temperature above its dew point, plus the
    // sensible heat between) the duty is the heating value. At 150 degC the flue gas still holds its sensible heat.
    const c = burn({ air: air({ excess: 1, T: 298.15 }), heat: { T: 298.15 } });
    // Most of the water condenses: the heat lies between the two heating values.
    expect(-c.duty_W).toBeGreaterThan(c.LHV_W);
    expect(-c.duty_W).toBeLessThan(c.HHV_W);
  });

  test('burns sulphur to SO2 and lets what cannot burn pass', () => {
    const c = burn(
      { air: air({ excess: 0.5 }) },
      {
        fuel: {
          'hydrogen-sulfide': 0.5,
          'sulfur-dioxide': 0.1,
          'carbon-dioxide': 0.2,
          argon: 0.1,
          water: 0.1,
        },
      },
    );
    expect(c.of('sulfur-dioxide')).toBeCloseTo(6, 10);
    expect(c.of('water')).toBeCloseTo(6, 10);
    expect(c.theoreticalO2_mol_s).toBeCloseTo(7.5, 10);
    expect(c.audit()).toBeLessThan(1e-11);
  });

  test('draws humid air with its water', () => {
    const composition = { is: 'preset', preset: 'humid air', relativeHumidity: 0.6 };
    const c = burn({ air: air({ excess: 0.2, composition }) });
    expect(c.excess).toBeCloseTo(0.2, 12);
    expect(c.of('water')).toBeGreaterThan(17.5 + 0.009 * c.air_mol_s!);
    const wet = burn({
      air: air({ excess: 0.2, T: 385, composition: { ...composition, relativeHumidity: 1 } }),
    });
    expect(wet.reason).toMatchObject({
      code: 'feed/humidity-above-saturation',
      at: { path: 'air.composition' },
    });
  });

  test('counts oxygen that the fuels bring', () => {
    const fuel = { methane: 0.5, oxygen: 0.2, nitrogen: 0.3 };
    const c = burn({ air: air({ excess: 0.1 }) }, { fuel });
    // Derived: 11 of oxygen are wanted, 2 are there.
    expect(c.air_mol_s).toBeCloseTo(9 / OXYGEN, 9);
    expect(burn({ air: air({ excess: 0.1 }) }, { fuel: { methane: 0.1, oxygen: 0.9 } }).reason?.code).toBe(
      'chamber/oxygen-without-air',
    );
    expect(burn({ air: air({ stackO2Dry: 0.3 }) }).reason?.code).toBe('chamber/stack-oxygen-out-of-reach');
  });

  test('refuses an air flow below zero, as a value', () => {
    expect(burn({ air: air({ flow: molar(-5) }) }).reason).toMatchObject({
      code: 'chamber/air-below-zero',
      at: { unit: 'c', path: 'air.flow' },
      evidence: [{ name: 'flow', value: -5, dim: 'molarFlow' }],
    });
  });

  test('says of air that is water alone that its dry part has no oxygen', () => {
    const composition = parts(...IDS.map((id) => (id === 'water' ? 1 : 0)));
    expect(burn({ air: air({ stackO2Dry: 0.03, composition }) }).reason).toMatchObject({
      code: 'chamber/stack-oxygen-out-of-reach',
      evidence: [{ value: 0.03 }, { name: 'air', value: 0 }],
    });
  });

  test('without anything that burns mixes, and says so', () => {
    const c = burn({ air: air({ excess: 0.1 }) }, { fuel: { nitrogen: 1 } });
    expect(c.result.state).toBe('solved');
    expect(c.codes).toContain('chamber/nothing-burns');
    expect(c).not.toHaveProperty('excess');
  });
});

test.each([{ excess: 0.2 }, { stackO2Dry: 0.03 }, { flow: molar(5) }])(
  'without any fuel a chamber with %j stays solved',
  (more) => {
    const batch = fresh(
      problemOf(basis, [
        stream('f', 'a', 10, FUEL),
        unit('d drum in1=a > vapour=v liquid=l', { p: { drop: 0 } }),
        unit('c chamber fuel1=l > out=b', settings({ air: air(more) })),
        unit('r reactor in1=l > out=e', {
          reactions: [
            {
              stoichiometry: [
                { chemical: 0, value: -1 },
                { chemical: 4, value: -2 },
                { chemical: 6, value: 1 },
                { chemical: 7, value: 2 },
              ],
              of: 0,
              conversion: 0.5,
            },
          ],
          p: { drop: 0 },
        }),
      ]),
      basis,
    );
    expect(solvedStream(batch, 'l').n_mol_s).toBe(0);
    expect(unitResult(batch, 'c')).toMatchObject({ state: 'solved', heat_W: 0 });
    expect(solvedStream(batch, 'b').n_mol_s).toBeCloseTo('flow' in more ? 5 : 0, 12);
    expect(unitResult(batch, 'r')).toMatchObject({ state: 'solved', heat_W: 0 });
    expect(batch.findings.map((f) => f.code)).toContain('chamber/nothing-burns');
  },
);

describe('a chamber refuses by name', () => {
  const burnOf = async (id: string, change: (b: Basis) => Basis = (b) => b) => {
    const of = change(await basisOf([id, ...IDS]));
    return burn({ air: air({ excess: 0.5 }) }, { of, fuel: { methane: 0.9, [id]: 0.1 } }).reason;
  };
  const without =
    (id: string, key: 'elements' | 'Hf_J_mol') =>
    (b: Basis): Basis => ({
      ...b,
      id: `${id} without ${key}`,
      chemicals: b.chemicals.map((c) => {
        if (c.id !== id) return c;
        const { [key]: _, ...rest } = c;
        return rest;
      }),
    });

  test('elements that it does not know what becomes of', async () => {
    expect(await burnOf('r134a')).toMatchObject({
      code: 'chamber/element-not-burnt',
      evidence: [{ text: 'r134a' }, { text: 'F' }],
    });
  });

  test('chemicals without formula, without enthalpy of formation, with another molar mass', async () => {
    expect((await burnOf('benzene', without('benzene', 'elements')))?.code).toBe('reaction/no-formula');
    expect(await burnOf('benzene', without('benzene', 'Hf_J_mol'))).toMatchObject({
      code: 'reaction/no-formation-enthalpy',
      at: { chemical: 'benzene' },
    });
    const heavy = (b: Basis): Basis => ({
      ...b,
      id: 'heavy benzene',
      chemicals: b.chemicals.map((c) => (c.id === 'benzene' ? { ...c, MW_g_mol: 78.11 } : c)),
    });
    expect((await burnOf('benzene', heavy))?.code).toBe('reaction/molar-mass');
  });

  test('chlorine without a place for HCl, and more of it than hydrogen can take', async () => {
    expect(await burnOf('carbon-tetrachloride')).toMatchObject({
      code: 'chamber/product-missing',
      evidence: [{ text: 'carbon-tetrachloride' }, { text: 'HCl' }],
    });
    const of = await basisOf(['carbon-tetrachloride', 'hydrogen-chloride', ...IDS]);
    const reasonOf = (share: number) =>
      burn(
        { air: air({ excess: 0.5 }) },
        { of, fuel: { methane: 1 - share, 'carbon-tetrachloride': share } },
      );
    expect(reasonOf(0.7).reason?.code).toBe('chamber/chlorine-without-hydrogen');
    const burnt = reasonOf(0.2);
    expect(burnt.of('hydrogen-chloride')).toBeCloseTo(8, 9);
    expect(burnt.audit()).toBeLessThan(1e-11);
  });
});

describe('limits of a chamber', () => {
  test.each([
    [600, ['chamber/cold']],
    [900, []],
    [1350, ['chamber/hot']],
    [1560, ['chamber/hot', 'chamber/dissociation-neglected']],
    [1700, ['chamber/too-hot-for-lining', 'chamber/dissociation-neglected']],
  ])('at %d degC', (t, codes) => {
    const c = burn({ air: air({ excess: 0.3 }), heat: { T: t + 273.15 } });
    expect(c.codes.filter((code) => code !== 'chamber/takes-heat')).toEqual(codes);
  });

  test('little oxygen in the dry flue gas is a caution', () => {
    expect(burn({ air: air({ stackO2Dry: 0.019 }), heat: { T: 1300 } }).codes).toEqual([
      'chamber/little-oxygen',
    ]);
    expect(burn({ air: air({ stackO2Dry: 0.021 }), heat: { T: 1300 } }).codes).toEqual([]);
  });

  test('air that is drawn below the pressure of the chamber is said at its port', () => {
    const batch = fresh(
      problemOf(basis, [
        stream('f', 'a', 10, FUEL),
        unit(
          'c chamber fuel1=a > out=b',
          settings({ p: { P: 1.2e5 }, air: air({ excess: 0.3, P: 101325 }) }),
        ),
      ]),
      basis,
    );
    expect(batch.findings).toContainEqual(
      expect.objectContaining({ code: 'pressure/enters-below', at: { unit: 'c', port: 'air' } }),
    );
  });
});
