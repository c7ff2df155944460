/** A reflux ratio and a purity that two columns meet: derived, by walking along the distillate. */
import { describe, expect, test } from 'vitest';
import type { ColumnResults } from '../../src/engine/units/column/results';
import type { ColumnSettings, FixedBy } from '../../src/engine/units/column/settings';
import { column } from '../../src/engine/units/column/solve';
import { sayFinding } from '../../src/wording';
import { bankModel } from '../robust/bankModels';
import { callOf, molar, scenarios, solveCall, streamOf } from './fixtures';

const model = await bankModel(['benzene', 'toluene', 'm-xylene']);
const feed = streamOf(model, [30, 40, 30], 100, { T_K: 375, P_Pa: 1.4e5 });
const REFLUX: FixedBy = { fix: 'refluxRatio', value: 3 };
const callWith = (...fixedBy: readonly FixedBy[]) => {
  const settings: ColumnSettings = {
    stages: 24,
    top: { distillate: 'liquid' },
    bottom: { reboiler: true },
    feeds: { feed1: { stage: 12 } },
    pressure: { top: 1.1e5, bottom: 1.3e5 },
    fixedBy,
  };
  return callOf(model, { feed1: feed }, settings);
};
const purity = (product: string, chemical: number, value: number): FixedBy => ({
  fix: 'purity',
  product,
  chemical,
  value,
  basis: 'mole',
});
const TOLUENE = purity('liquidDistillate', 1, 0.5);

/** Toluene in the distillate for a distillate flow [mol/s]. */
function tolueneAt(n: number): number {
  const a = solveCall(callWith(REFLUX, { fix: 'flow', product: 'liquidDistillate', value: molar(n) }));
  return a.out.liquidDistillate!.n_mol_s[1]! / n;
}

/** Distillate between two flows at which toluene is a half [mol/s]. */
function halfBetween(low: number, high: number): number {
  const rises = tolueneAt(low) < 0.5;
  expect(tolueneAt(high) < 0.5).toBe(!rises);
  let [a, b] = [low, high];
  for (let pass = 0; pass < 40; pass++) {
    const m = (a + b) / 2;
    if (tolueneAt(m) < 0.5 === rises) a = m;
    else b = m;
  }
  return (a + b) / 2;
}

describe('toluene between benzene and xylene, half of the distillate, at a reflux ratio of 3', () => {
  const smaller = halfBetween(40, 70);
  const larger = halfBetween(70, 95);

  test('is met by two columns, far apart', () => {
    expect(larger / smaller).toBeGreaterThan(1.2);
  });

  test('solves to one of the two, and a note says which', () => {
    const outcome = column.solve(callWith(REFLUX, TOLUENE));
    if (outcome.state !== 'solved') throw new Error('not solved');
    const found = outcome.value.out.liquidDistillate!.n_mol_s.reduce((a, b) => a + b, 0);
    const near = Math.abs(found - smaller) < Math.abs(found - larger) ? smaller : larger;
    expect(Math.abs(found / near - 1)).toBeLessThan(1e-8);
    const note = outcome.findings.find((f) => f.code === 'column/several-purities')!;
    expect(note.weight).toBe('note');
    const seen = Object.fromEntries(note.evidence.map((e) => [e.name, e.text ?? e.value]));
    expect(seen).toMatchObject({
      chemical: 'toluene',
      branch: near === smaller ? 'smaller' : 'larger',
      product: 'distillate',
    });
    expect(seen.flow as number).toBeCloseTo(found, 6);
    expect(sayFinding(note, { measures: 'metric' }).sentence).toMatch(
      /this is the answer with the (smaller|larger) distillate/,
    );
  });

  test('solved warm from the other column stays at the other, and the note says so', () => {
    const [a, b] = [smaller, larger].map((n) => {
      const by = solveCall(callWith(REFLUX, { fix: 'flow', product: 'liquidDistillate', value: molar(n) }));
      const outcome = column.solve({ ...callWith(REFLUX, TOLUENE), warm: by.warm });
      if (outcome.state !== 'solved') throw new Error('not solved');
      const note = outcome.findings.find((f) => f.code === 'column/several-purities')!;
      return note.evidence.find((e) => e.name === 'branch')!.text;
    });
    expect([a, b]).toEqual(['smaller', 'larger']);
  });

  test.each([
    ['the lightest in the distillate', purity('liquidDistillate', 0, 0.6)],
    ['the heaviest in the bottoms', purity('bottoms', 2, 0.6)],
    ['an impurity', purity('bottoms', 0, 0.01)],
  ])('no such note for %s', (_, fixed) => {
    const outcome = column.solve(callWith(REFLUX, fixed));
    expect(outcome.state).toBe('solved');
    expect(outcome.findings.map((f) => f.code)).not.toContain('column/several-purities');
  });
});

describe('a stage temperature at a given distillate', () => {
  const FLOW: FixedBy = { fix: 'flow', product: 'liquidDistillate', value: molar(50) };
  const atRatio = (value: number) => {
    const a = solveCall(callWith({ fix: 'refluxRatio', value }, FLOW));
    return (a.results as ColumnResults).stages.T_K[2]!;
  };
  const HIGH = 3;
  const wanted_K = atRatio(HIGH);

  test('is met by two columns, with little reflux and with much', () => {
    let [a, b] = [0.4, 1.2];
    expect(atRatio(a)).toBeGreaterThan(wanted_K);
    expect(atRatio(b)).toBeLessThan(wanted_K);
    for (let pass = 0; pass < 30; pass++) {
      const m = (a + b) / 2;
      if (atRatio(m) > wanted_K) a = m;
      else b = m;
    }
    expect(atRatio(a)).toBeCloseTo(wanted_K, 5);
    expect(HIGH / a).toBeGreaterThan(3);
  });

  test('solves to one of them, and a note says which', () => {
    const outcome = column.solve(callWith({ fix: 'temperature', stage: 3, value: wanted_K }, FLOW));
    if (outcome.state !== 'solved') throw new Error('not solved');
    const note = outcome.findings.find((f) => f.code === 'column/another-possible')!;
    expect(note.weight).toBe('note');
    const ratio = note.evidence.find((e) => e.name === 'refluxRatio')!.value;
    expect(atRatio(ratio)).toBeCloseTo(wanted_K, 6);
    expect(sayFinding(note, { measures: 'metric' }).sentence).toMatch(/with a reflux ratio of [0-9.]+ and/);
  });

  test('and a purity beside a boil-up carries the same note only for a chemical between others', () => {
    const codes = (...by: FixedBy[]) => {
      const outcome = column.solve(callWith(...by));
      expect(outcome.state).toBe('solved');
      return outcome.findings.map((f) => f.code);
    };
    const boilup: FixedBy = { fix: 'boilup', value: 4 };
    expect(codes(boilup, TOLUENE)).toContain('column/another-possible');
    expect(codes(boilup, purity('liquidDistillate', 0, 0.6))).not.toContain('column/another-possible');
    expect(codes(FLOW, purity('liquidDistillate', 1, tolueneAt(50)))).not.toContain(
      'column/another-possible',
    );
  });
});

test('a column without ends needs nothing fixed, and may leave the list out', async () => {
  const { call } = (await scenarios()).find((x) => x.name.startsWith('absorber'))!;
  const { fixedBy: _, ...settings } = call.settings;
  expect(column.solve({ ...call, settings }).state).toBe('solved');
});
