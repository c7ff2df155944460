/** Columns against textbook cases and the classical shortcut methods. */
import { describe, expect, test } from 'vitest';
import type { Model } from '../../src/engine/thermo/types';
import { callOf, molar, solveCall, streamOf } from '../column/fixtures';
import { bankModel } from '../robust/bankModels';

/** Benzene and toluene by mass: kg of benzene in 100 kg to mole fraction. */
const moleFraction = (mass: number): number => mass / 78.11 / (mass / 78.11 + (100 - mass) / 92.14);

describe('a binary column drawn by McCabe and Thiele', () => {
  // McCabe, Smith & Harriott, Unit Operations of Chemical Engineering, the benzene-toluene example of the chapter on
  // distillation (recalled from memory): 30,000 kg/h of 40 mass % benzene, products 97 and 2 mass % benzene, 1 atm,
  // reflux ratio 3.5. Feed 350, distillate 153.4, bottoms 196.6 kmol/h. Feed boiling liquid: 11 ideal stages and a
  // reboiler, feed on the fifth; two thirds vapour: 12 ideal stages and a reboiler, feed on the sixth.
  const F = 350e3 / 3600;
  const D = 153.4e3 / 3600;
  const z = moleFraction(40);

  const run = (model: Model, stages: number, feed: number, vapourFraction: number) =>
    solveCall(
      callOf(
        model,
        { feed1: streamOf(model, [z, 1 - z], F, { P_Pa: 101325, vapourFraction }) },
        {
          stages,
          top: { distillate: 'liquid' },
          bottom: { reboiler: true },
          feeds: { feed1: { stage: feed } },
          pressure: { top: 101325, bottom: 101325 },
          fixedBy: [
            { fix: 'refluxRatio', value: 3.5 },
            { fix: 'flow', product: 'liquidDistillate', value: molar(D) },
          ],
        },
      ),
    );
  const top = (a: ReturnType<typeof run>): number => {
    const { n_mol_s } = a.out.liquidDistillate!;
    return n_mol_s[0]! / (n_mol_s[0]! + n_mol_s[1]!);
  };

  test.each([
    ['boiling liquid', 11, 5, 0],
    ['two thirds vapour', 12, 6, 2 / 3],
  ] as const)('makes the product asked with the stages drawn: feed %s', async (_, stages, feed, vapour) => {
    const model = await bankModel(['benzene', 'toluene'], 'raoult');
    const have = top(run(model, stages, feed, vapour));
    // The drawing counts whole stages and its diagram is not this vapour pressure: one stage either way brackets it.
    const wanted = moleFraction(97);
    expect(top(run(model, stages - 1, feed, vapour))).toBeLessThan(wanted);
    expect(top(run(model, stages + 1, feed, vapour))).toBeGreaterThan(wanted - 0.002);
    expect(Math.abs(have - wanted)).toBeLessThan(0.006);
  });

  test('needs as much vapour as its balance says', async () => {
    const model = await bankModel(['benzene', 'toluene'], 'raoult');
    const a = run(model, 11, 5, 0);
    // Constant molar overflow: V = D (R + 1) = 690.3 kmol/h; unequal heats of vaporisation bend it by some per cent.
    for (const V of a.results.stages.V_mol_s) expect(Math.abs((V * 3.6) / 690.3 - 1)).toBeLessThan(0.08);
    expect((a.results.stages.V_mol_s[0]! * 3.6) / 690.3).toBeCloseTo(1, 4);
  });
});

describe('a multicomponent column against the shortcut', () => {
  // Fenske (1932), Underwood (1948), Gilliland (1940) in Eduljee's form (1975); volatilities are means of top and bottom.
  test('of Fenske, Underwood and Gilliland: stages agree within 15 %', async () => {
    const ids = ['n-butane', 'n-pentane', 'n-hexane', 'n-heptane', 'n-octane'];
    const model = await bankModel(ids, 'raoult');
    const parts = [0.1, 0.25, 0.3, 0.2, 0.15];
    const F = 100;
    const stages = 22;
    const R = 1.6;
    const a = solveCall(
      callOf(
        model,
        { feed1: streamOf(model, parts, F, { P_Pa: 2e5, vapourFraction: 0 }) },
        {
          stages,
          top: { distillate: 'liquid' },
          bottom: { reboiler: true },
          feeds: { feed1: { stage: 11 } },
          pressure: { top: 2e5, bottom: 2e5 },
          fixedBy: [
            { fix: 'refluxRatio', value: R },
            { fix: 'flow', product: 'liquidDistillate', value: molar(35) },
          ],
        },
      ),
    );
    const d = Array.from(a.out.liquidDistillate!.n_mol_s);
    const b = Array.from(a.out.bottoms!.n_mol_s);
    const ratios = (T: number): number[] => ids.map((_, i) => model.of([i]).saturationP_Pa(0, T)! / 2e5);
    const [Kt, Kb] = [ratios(a.results.stages.T_K[0]!), ratios(a.results.reboiler!.T_K)];
    const heavy = 2;
    const alpha = ids.map((_, i) => Math.sqrt((Kt[i]! / Kt[heavy]!) * (Kb[i]! / Kb[heavy]!)));
    const least = Math.log((d[1]! / b[1]!) * (b[heavy]! / d[heavy]!)) / Math.log(alpha[1]!);
    // Underwood's root between the keys' volatilities; boiling feed, so the sum is 0.
    let low = 1 + 1e-9;
    let high = alpha[1]! - 1e-9;
    for (let k = 0; k < 200; k++) {
      const t = (low + high) / 2;
      const sum = parts.reduce((s, x, i) => s + (alpha[i]! * x) / (alpha[i]! - t), 0);
      if (sum > 0) high = t;
      else low = t;
    }
    const D = d.reduce((x, y) => x + y, 0);
    const Rmin = d.reduce((s, x, i) => s + (alpha[i]! * x) / D / (alpha[i]! - low), 0) - 1;
    const X = (R - Rmin) / (R + 1);
    const Y = 0.75 * (1 - X ** 0.5668);
    const predicted = (least + Y) / (1 - Y);
    // The reboiler is an equilibrium stage; the total condenser is none.
    expect(Rmin).toBeGreaterThan(0.3);
    expect(Rmin).toBeLessThan(R);
    expect(Math.abs(predicted / (stages + 1) - 1)).toBeLessThan(0.15);
    console.info(
      `Fenske ${least.toFixed(2)}, Rmin ${Rmin.toFixed(3)}, predicted ${predicted.toFixed(1)} of ${stages + 1}`,
    );
  });
});

describe('an absorber against Kremser', () => {
  // Kremser, Nat. Petrol. News 22(21) (1930) 42; Souders & Brown, Ind. Eng. Chem. 24 (1932) 519:
  // share absorbed = (A^(N+1) - A) / (A^(N+1) - 1), A = L/(K V).
  test.each([
    [4, 0.8],
    [6, 1],
    [10, 1.3],
  ])(
    '%d stages at an absorption factor near %d absorb what it says, dilute and ideal',
    async (stages, wanted) => {
      const ids = ['nitrogen', 'n-pentane', 'n-decane'];
      const model = await bankModel(ids, 'raoult');
      const T = 300;
      const P = 3e5;
      const V = 100;
      const K = model.of([1]).saturationP_Pa(0, T)! / P;
      const L = wanted * K * V;
      const a = solveCall(
        callOf(
          model,
          {
            feed1: streamOf(model, [0, 0, 1], L, { T_K: T, P_Pa: P }),
            feed2: streamOf(model, [1, 1e-5, 0], V, { T_K: T, P_Pa: P }),
          },
          {
            stages,
            top: { distillate: 'none' },
            bottom: { reboiler: false },
            feeds: { feed1: { stage: 1 }, feed2: { stage: stages } },
            pressure: { top: P, bottom: P },
            fixedBy: [],
          },
        ),
      );
      const s = a.results.stages;
      // The factor where it is: the mean over the stages, since a little nitrogen dissolves and cools nothing.
      const factors = Array.from(
        s.L_mol_s,
        (l, k) => l / ((s.y['n-pentane']![k]! / s.x['n-pentane']![k]!) * s.V_mol_s[k]!),
      );
      const A = Math.exp(factors.reduce((sum, f) => sum + Math.log(f), 0) / stages);
      const kremser =
        Math.abs(A - 1) < 1e-6 ? stages / (stages + 1) : (A ** (stages + 1) - A) / (A ** (stages + 1) - 1);
      const fed = (V * 1e-5) / (1 + 1e-5);
      const absorbed = a.out.bottoms!.n_mol_s[1]! / fed;
      expect(Math.abs(absorbed / kremser - 1)).toBeLessThan(5e-3);
      expect(A).toBeGreaterThan(0.9 * wanted);
      expect(A).toBeLessThan(1.15 * wanted);
    },
  );
});
