/** What a reactor does. Expected values are derived beside the check. */
import { beforeAll, describe, expect, test } from 'vitest';
import type { Basis, ProblemUnit } from '../../src/engine/network/types';
import type { ReactorResults } from '../../src/engine/units/reactor/types';
import type { Json } from '../../src/sketch/types';
import { audit, worstOfAudit } from '../laws/audit';
import { basisOf, fresh, molar, parts, problemOf, solvedStream, unit, unitResult } from '../network/fixtures';
import { compiled, gapsOf, opened, settingsOf } from '../sketch/help';

const IDS = ['nitrogen', 'hydrogen', 'ammonia', 'methane', 'carbon-monoxide', 'water', 'carbon-dioxide'];
const at = Object.fromEntries(IDS.map((id, k) => [id, k])) as Record<string, number>;
let basis: Basis;
beforeAll(async () => {
  basis = await basisOf(IDS);
});

const reaction = (of: string, conversion: number, nu: Record<string, number>) => ({
  stoichiometry: Object.entries(nu).map(([id, value]) => ({ chemical: at[id]!, value })),
  of: at[of]!,
  conversion,
});
const AMMONIA = { nitrogen: -1, hydrogen: -3, ammonia: 2 };
const SHIFT = { 'carbon-monoxide': -1, water: -1, 'carbon-dioxide': 1, hydrogen: 1 };
const REFORM = { methane: -1, water: -1, 'carbon-monoxide': 1, hydrogen: 3 };

function react(
  reactions: readonly object[],
  feed: Record<string, number>,
  more: object = { h: { T: 700 } },
  of = basis,
) {
  const units: ProblemUnit[] = [
    unit('f feed > out=a', {
      state: { T: 600, P: 20e5 },
      flow: molar(10),
      composition: parts(...IDS.map((id) => feed[id] ?? 0)),
    }),
    unit('r reactor in1=a > out=b', { reactions, p: { drop: 0 }, ...more }),
  ];
  const batch = fresh(problemOf(of, units), of);
  const result = unitResult(batch, 'r')!;
  return {
    result,
    reason: result.reasons?.[0],
    ...(result.results as unknown as ReactorResults),
    of: (id: string) => solvedStream(batch, 'b').n_mol_s * solvedStream(batch, 'b').z[at[id]!]!,
    audit: () =>
      worstOfAudit(audit([solvedStream(batch, 'a')], [solvedStream(batch, 'b')], result, of.chemicals)),
  };
}

describe('a reactor', () => {
  test('converts what is asked and says how much reacted', () => {
    const r = react([reaction('nitrogen', 0.3, AMMONIA)], { nitrogen: 0.25, hydrogen: 0.75 });
    expect(r.extents_mol_s[0]).toBeCloseTo(0.75, 12);
    expect(r.of('ammonia')).toBeCloseTo(1.5, 12);
    expect(r.of('hydrogen')).toBeCloseTo(7.5 - 2.25, 12);
    // Derived: enthalpy of formation of ammonia, -45.9 kJ/mol (CODATA, recalled from memory), twice a turn.
    expect(Math.abs(r.heatOfReaction_W / 0.75 / 1e3 + 91.8)).toBeLessThan(1);
    expect(r.audit()).toBeLessThan(1e-11);
  });

  test('runs its reactions one after another, on what is left', () => {
    const feed = { methane: 0.2, water: 0.6, nitrogen: 0.2 };
    const r = react([reaction('methane', 0.9, REFORM), reaction('carbon-monoxide', 0.5, SHIFT)], feed);
    // Derived: 1.8 of methane make 1.8 of CO, half of which goes on.
    expect(r.extents_mol_s).toEqual([expect.closeTo(1.8, 12), expect.closeTo(0.9, 12)]);
    expect(r.of('water')).toBeCloseTo(6 - 2.7, 11);
    expect(r.of('hydrogen')).toBeCloseTo(5.4 + 0.9, 11);
    const turned = react([reaction('carbon-monoxide', 0.5, SHIFT), reaction('methane', 0.9, REFORM)], feed);
    expect(turned.extents_mol_s).toEqual([0, expect.closeTo(1.8, 12)]);
  });

  test('is adiabatic without a heat setting: the heat set free warms it', () => {
    const feed = { 'carbon-monoxide': 0.3, water: 0.6, nitrogen: 0.1 };
    const r = react([reaction('carbon-monoxide', 0.8, SHIFT)], feed, {});
    expect(r).not.toHaveProperty('duty_W');
    expect(r.result.heat_W).toBe(0);
    // Derived: 2.4 mol/s set free some 41 kJ/mol into 10 mol/s of about 34 J/(mol K).
    expect(r.T_K - 600).toBeGreaterThan(200);
    expect(r.T_K - 600).toBeLessThan(340);
    expect(r.audit()).toBeLessThan(1e-11);
    const back = react([reaction('carbon-monoxide', 0.8, SHIFT)], feed, { h: { T: r.T_K } });
    expect(Math.abs(back.duty_W!)).toBeLessThan(1e-3);
  });

  test('without reaction left is a mixer: no conversion changes nothing', () => {
    const r = react([reaction('nitrogen', 0, AMMONIA)], { nitrogen: 0.25, hydrogen: 0.75 }, {});
    expect(r.T_K).toBeCloseTo(600, 9);
  });

  test('uses a reactant up exactly', () => {
    const r = react([reaction('methane', 1, REFORM)], { methane: 0.3, water: 0.3, nitrogen: 0.4 });
    expect([r.of('methane'), r.of('water')]).toEqual([0, 0]);
    expect(r.audit()).toBeLessThan(1e-11);
  });
});

describe('a reactor refuses', () => {
  test('a reaction that does not balance, naming the element and by how much', () => {
    const { reason } = react([reaction('nitrogen', 0.3, { ...AMMONIA, ammonia: 1 })], {
      nitrogen: 0.25,
      hydrogen: 0.75,
    });
    expect(reason).toMatchObject({
      code: 'reactor/unbalanced',
      at: { unit: 'r', path: 'reactions.0.stoichiometry' },
      evidence: [{ value: 1 }, { name: 'element', text: 'N' }, { text: 'lost' }, { name: 'atoms', value: 1 }],
    });
  });

  test('a reactant that runs out, with what is needed, what is there and how far it goes', () => {
    const { reason } = react([reaction('methane', 0.9, REFORM)], { methane: 0.5, water: 0.3, nitrogen: 0.2 });
    const seen = (name: string) => reason!.evidence.find((e) => e.name === name)!;
    expect(reason).toMatchObject({ code: 'reactor/reactant-short', at: { path: 'reactions.0.conversion' } });
    expect(seen('chemical').text).toBe('water');
    expect(seen('needed').value).toBeCloseTo(4.5, 12);
    expect(seen('there').value).toBeCloseTo(3, 12);
    expect(seen('most').value).toBeCloseTo(0.6, 12);
    expect(
      react([reaction('methane', 0.6, REFORM)], { methane: 0.5, water: 0.3, nitrogen: 0.2 }).result.state,
    ).toBe('solved');
  });

  test('a conversion of what is not consumed, and chemicals whose heat of reaction is not known', () => {
    expect(react([reaction('ammonia', 0.5, AMMONIA)], { nitrogen: 1, hydrogen: 3 }).reason?.code).toBe(
      'reactor/key-not-consumed',
    );
    const bare: Basis = {
      ...basis,
      id: 'ammonia without enthalpy of formation',
      chemicals: basis.chemicals.map((c) => {
        const { Hf_J_mol: _, ...rest } = c;
        return c.id === 'ammonia' ? rest : c;
      }),
    };
    const { reason } = react([reaction('nitrogen', 0.3, AMMONIA)], { nitrogen: 1, hydrogen: 3 }, {}, bare);
    expect(reason).toMatchObject({ code: 'reaction/no-formation-enthalpy', at: { chemical: 'ammonia' } });
    // A bystander may lack it: it cancels.
    expect(
      react([reaction('carbon-monoxide', 0.3, SHIFT)], { 'carbon-monoxide': 1, water: 1 }, {}, bare).result
        .state,
    ).toBe('solved');
  });
});

test('reactions of a sketch reach the engine by their places', async () => {
  const reactions: Json = [
    { stoichiometry: { nitrogen: -1, hydrogen: -3, ammonia: 2 }, of: 'nitrogen', conversion: '25 %' },
  ];
  const sketch = (settings: { [key: string]: Json }) =>
    opened({
      format: 'splitwright.sketch',
      version: 1,
      chemicals: IDS,
      model: { kind: 'peng-robinson' },
      units: [
        {
          id: 'u1',
          tag: 'FEED-1',
          kind: 'feed',
          settings: {
            state: { T: '400 degC', P: '150 bar' },
            flow: '10 kmol/h',
            composition: { basis: 'mole', parts: { nitrogen: '25 %', hydrogen: '75 %' } },
          },
        },
        { id: 'u2', tag: 'R-101', kind: 'reactor', settings },
      ],
      streams: [{ id: 's1', number: '1', from: ['u1', 'out'], to: ['u2', 'in1'] }],
    });
  const c = await compiled(sketch({ reactions }));
  expect(gapsOf(c)).toEqual([]);
  expect(settingsOf(c, 1)).toMatchObject({
    reactions: [
      {
        stoichiometry: [
          { chemical: 0, value: -1 },
          { chemical: 1, value: -3 },
          { chemical: 2, value: 2 },
        ],
        of: 0,
        conversion: 0.25,
      },
    ],
  });
  expect(gapsOf(await compiled(sketch({})))).toEqual(['sketch/needs-value at reactions']);
});
