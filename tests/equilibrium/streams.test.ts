import { describe, expect, test } from 'vitest';
import { makeStream, streamOfPhase } from '../../src/engine/equilibrium/stream';
import type { StreamState } from '../../src/engine/equilibrium/types';
import type { Outcome } from '../../src/engine/outcome';
import { bankModel } from '../robust/bankModels';

const IDS = ['nitrogen', 'methane', 'n-butane', 'n-hexane', 'benzene', 'n-decane'];
const work = () => ({ flash: new Map<string, unknown>() });
const got = (outcome: Outcome<StreamState>): StreamState => {
  if (outcome.state !== 'solved') throw new Error(outcome.findings[0].code);
  return outcome.value;
};
const sum = (values: Float64Array): number => values.reduce((a, b) => a + b, 0);

describe('streams over the full list', () => {
  test('only chemicals present take part; exact zeros stay zero, traces stay traces', async () => {
    const model = await bankModel(IDS);
    const n = Float64Array.from([0, 3, 2, 1e-12, 0, 1]);
    const stream = got(makeStream(model, n, { T_K: 300, P_Pa: 1e6 }, work()));
    expect(stream.phases.map((phase) => phase.kind)).toEqual(['vapour', 'liquid']);
    for (const phase of stream.phases) {
      expect(phase.x[0]).toBe(0);
      expect(phase.n_mol_s[4]).toBe(0);
      expect(phase.n_mol_s[3]).toBeGreaterThan(0);
    }
    const alone = await bankModel(['methane', 'n-butane', 'n-hexane', 'n-decane']);
    const same = got(makeStream(alone, Float64Array.from([3, 2, 1e-12, 1]), { T_K: 300, P_Pa: 1e6 }, work()));
    expect(stream.H_W).toBe(same.H_W);
    expect(stream.vapourFraction).toBe(same.vapourFraction);
  });

  test('the phases add up to the stream to the last digits', async () => {
    const model = await bankModel(IDS);
    const n = Float64Array.from([0.1, 3, 2, 1e-9, 5, 1e-14]);
    const stream = got(makeStream(model, n, { T_K: 290, P_Pa: 5e5 }, work()));
    for (let i = 0; i < n.length; i++) {
      const both = stream.phases[0]!.n_mol_s[i]! + stream.phases[1]!.n_mol_s[i]!;
      expect(Math.abs(both - n[i]!)).toBeLessThanOrEqual(4e-16 * n[i]!);
    }
    const H = stream.phases.reduce((h, phase) => h + sum(phase.n_mol_s) * phase.h_J_mol, 0);
    expect(Math.abs(H - stream.H_W)).toBeLessThan(1e-12 * Math.abs(stream.H_W));
  });

  test('twice the amounts give twice the enthalpy in the same state', async () => {
    const model = await bankModel(IDS);
    const n = Float64Array.from([0.5, 3, 2, 1, 0, 1]);
    const one = got(makeStream(model, n, { T_K: 310, P_Pa: 8e5 }, work()));
    const two = got(
      makeStream(
        model,
        n.map((v) => 2 * v),
        { T_K: 310, P_Pa: 8e5 },
        work(),
      ),
    );
    expect(two.H_W).toBe(2 * one.H_W);
    expect(two.phases[0]!.x).toEqual(one.phases[0]!.x);
  });

  test('an enthalpy flow that is given is carried to the last bit', async () => {
    const model = await bankModel(IDS);
    const n = Float64Array.from([0.5, 3, 2, 1, 0.7, 1]);
    const first = got(makeStream(model, n, { T_K: 310, P_Pa: 2e6 }, work()));
    const H_W = first.H_W + 12345.678901234567;
    const down = got(makeStream(model, n, { P_Pa: 3e5, H_W }, work()));
    expect(down.H_W).toBe(H_W);
    const H = down.phases.reduce((h, phase) => h + sum(phase.n_mol_s) * phase.h_J_mol, 0);
    expect(Math.abs(H - H_W)).toBeLessThan(1e-7);
  });

  test('a stream without flow has no phases and a temperature', async () => {
    const model = await bankModel(IDS);
    const stream = got(
      makeStream(model, new Float64Array(6), { P_Pa: 2e5, h_J_mol: 0 }, work(), { T_K: 321 }),
    );
    expect(stream).toMatchObject({ phases: [], H_W: 0, P_Pa: 2e5, T_K: 321 });
  });

  test('one chemical alone boils by the lever rule', async () => {
    const model = await bankModel(IDS);
    const n = Float64Array.from([0, 0, 4, 0, 0, 0]);
    const wet = got(makeStream(model, n, { P_Pa: 1e5, vapourFraction: 0 }, work()));
    const dry = got(makeStream(model, n, { P_Pa: 1e5, vapourFraction: 1 }, work()));
    const half = got(makeStream(model, n, { P_Pa: 1e5, H_W: 0.7 * wet.H_W + 0.3 * dry.H_W }, work()));
    expect(half.vapourFraction).toBeCloseTo(0.3, 12);
    expect(half.T_K).toBe(wet.T_K);
    // The incipient phase is there, without an amount.
    expect(wet.phases.map((phase) => [phase.kind, phase.fraction])).toEqual([
      ['vapour', 0],
      ['liquid', 1],
    ]);
    expect(sum(wet.phases[0]!.n_mol_s)).toBe(0);
    expect(wet.phases[0]!.x[2]).toBe(1);
  });

  test('a phase taken out is a saturated stream, without a flash', async () => {
    const model = await bankModel(IDS);
    const n = Float64Array.from([0.5, 3, 2, 1, 0, 1]);
    const whole = got(makeStream(model, n, { T_K: 310, P_Pa: 8e5 }, work()));
    const [vapour, liquid] = whole.phases.map((phase) => streamOfPhase(whole, phase));
    expect([vapour!.vapourFraction, liquid!.vapourFraction]).toEqual([1, 0]);
    expect(vapour!.phases).toHaveLength(1);
    expect(Math.abs(vapour!.H_W + liquid!.H_W - whole.H_W)).toBeLessThan(1e-12 * Math.abs(whole.H_W));
    const bubble = got(makeStream(model, liquid!.n_mol_s, { P_Pa: 8e5, vapourFraction: 0 }, work()));
    expect(Math.abs(bubble.T_K - 310)).toBeLessThan(1e-7);
  });

  test('a workspace that another model left behind is not used', async () => {
    const shared = work();
    const n = Float64Array.from([0, 1, 1, 0, 0, 0]);
    const one = got(makeStream(await bankModel(IDS), n, { T_K: 300, P_Pa: 1e6 }, shared));
    const ideal = got(
      makeStream(
        await bankModel(IDS, 'peng-robinson', { alpha: '1978', pairs: [] }),
        n,
        { T_K: 300, P_Pa: 1e6 },
        shared,
      ),
    );
    expect(one.vapourFraction).not.toBe(ideal.vapourFraction);
  });
});
