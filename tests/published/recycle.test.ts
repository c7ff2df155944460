/**
 * Evaporative crystallisation of potassium chromate with a recycled mother liquor: R. M. Felder and R. W. Rousseau, Elementary
 * Principles of Chemical Processes, example 4.5-2. Its figures stand here from memory (1470 kg/h crystals, 2950 kg/h evaporated,
 * 5640 kg/h recycled, rounded there to three digits); beside each stands the same figure derived by hand.
 * Only amounts count: a heavy hydrocarbon of the bank stands in for the salt, by mass.
 */
import { expect, test } from 'vitest';
import { worstOf } from '../../src/engine/network/closure';
import { basisOf, fresh, problemOf, solvedStream, unit, unitResult } from '../network/fixtures';
import { type Parting, WITH_PARTING } from '../network/linearKinds';

const H = 1 / 3600;

test('a crystalliser with recycled liquor gives the textbook’s crystals, vapour and recycle', async () => {
  const basis = await basisOf(['water', 'n-decane']);
  const MW = basis.chemicals.map((c) => c.MW_g_mol / 1e3);
  const masses = (n: Float64Array) => ({ water: n[0]! * MW[0]!, salt: n[1]! * MW[1]! });
  const amounts = (water: number, salt: number) => Float64Array.of(water / MW[0]!, salt / MW[1]!);
  /** Leaves 49.4 % salt. */
  const evaporator: Parting = (n) => {
    const { water, salt } = masses(n);
    const kept = Math.min(water, (salt * (1 - 0.494)) / 0.494);
    return { out1: amounts(water - kept, 0), out2: amounts(kept, salt) };
  };
  /** Liquor of 36.36 % salt; the cake is 95 % crystals and 5 % of that liquor. */
  const crystalliser: Parting = (n) => {
    const { water, salt } = masses(n);
    const liquor = water / (1 - 0.3636);
    const crystals = salt - 0.3636 * liquor;
    const wet = (crystals * 5) / 95;
    const cake = amounts(wet * (1 - 0.3636), crystals + wet * 0.3636);
    return { out1: cake, out2: n.map((v, i) => v - cake[i]!) };
  };
  const units = [
    unit('f feed > out=1', {
      state: { T: 300, P: 1e5 },
      flow: { is: 'mass', m_kg_s: 4500 * H },
      composition: { is: 'parts', basis: 'mass', parts: Float64Array.of(2 / 3, 1 / 3) },
    }),
    unit('j parting in1=1 in2=back > out1=2', { part: (n: Float64Array) => ({ out1: n }) }),
    unit('e parting in1=2 > out1=vapour out2=3', { part: evaporator }),
    unit('c parting in1=3 > out1=cake out2=back', { part: crystalliser }),
  ];
  const batch = fresh(problemOf(basis, units), basis, { from: 'warm', kinds: WITH_PARTING });
  const kg_h = (id: string) => solvedStream(batch, id).m_kg_s / H;
  const crystals = kg_h('cake') * 0.95;
  // Derived: 1500 = C + 0.3636 C / 19; W = 4500 - 20 C / 19; liquor = C (1 - 0.494) / (0.494 - 0.3636), less C / 19.
  const C = 1500 / (1 + 0.3636 / 19);
  expect(crystals / C).toBeCloseTo(1, 8);
  expect(kg_h('vapour') / (4500 - (20 / 19) * C)).toBeCloseTo(1, 8);
  expect(kg_h('back') / (C * (0.506 / 0.1304 - 1 / 19))).toBeCloseTo(1, 8);
  // From memory, to the textbook's three digits.
  expect(crystals / 1470).toBeCloseTo(1, 2);
  expect(kg_h('vapour') / 2950).toBeCloseTo(1, 2);
  expect(kg_h('back') / 5640).toBeCloseTo(1, 2);
  expect(worstOf(batch.closure!)).toBeLessThan(1e-9);
  expect(unitResult(batch, 'e')!.loop!.passes).toBeLessThanOrEqual(10);
});
