import { beforeAll, describe, expect, test } from 'vitest';
import type { StreamState } from '../../src/engine/equilibrium/types';
import { worstOf } from '../../src/engine/network/closure';
import { KNOWN_KINDS } from '../../src/engine/network/kinds';
import { makeMemory } from '../../src/engine/network/memory';
import { solveNetwork } from '../../src/engine/network/solve';
import type { Basis, ProblemUnit } from '../../src/engine/network/types';
import { solved } from '../../src/engine/outcome';
import { answerOf } from '../../src/engine/units/answer';
import type { AnyKind } from '../../src/engine/units/solvers';
import { scaledStream } from '../../src/engine/units/streams';
import type { Call, KindCatalogue } from '../../src/engine/units/types';
import { seeded } from '../numerics/seeded';
import {
  basisOf,
  finish,
  fresh,
  LET_DOWN,
  letDown,
  molar,
  parts,
  problemOf,
  solvedStream,
  streamId,
  unit,
  unitId,
  unitResult,
} from './fixtures';

let basis: Basis;
beforeAll(async () => {
  basis = await basisOf(LET_DOWN);
});

const plainFeed = (id: string, stream: string, n = 10): ProblemUnit =>
  unit(`${id} feed > out=${stream}`, {
    state: { T: 300, P: 10e5 },
    flow: molar(n),
    composition: parts(1, 1, 1, 1, 1, 1, 1),
  });

/** Two feeds, a join, a valve, a drum, heater and cooler behind it, a divide; one end hangs. */
const train = (P: number, duty: number): ProblemUnit[] => [
  plainFeed('f1', 'a'),
  plainFeed('f2', 'b', 5),
  unit('j join in1=a in2=b > out=c', { p: { drop: 0 } }),
  unit('v valve in=c > out=d', { p: { P } }),
  unit('d drum in1=d > vapour=e liquid=f', { p: { drop: 0 } }),
  unit('h heater in=f > out=g', { p: { drop: 1e4 }, duty }),
  unit('k cooler in=e > out=i', { p: { drop: 1e4 }, T: 290 }),
  unit('s divide in=g > out1=l out2=m', {
    shares: { out2: { is: 'share', share: 0.3, of: 'feed', basis: 'mole' } },
  }),
  unit('p1 product in=i', {}),
  unit('p2 product in=l', { to: 'storage' }),
];

describe('a sketch', () => {
  test('is solved upstream first, closes to 1e-11 overall and by unit, and counts a hanging end as leaving', () => {
    const batch = fresh(problemOf(basis, train(4e5, 2e4)), basis);
    const { closure } = batch;
    expect(batch.steps).toHaveLength(10);
    expect(batch.steps.indexOf('j')).toBeLessThan(batch.steps.indexOf('v'));
    expect(closure!.complete).toBe(true);
    expect(worstOf(closure!)).toBeLessThan(1e-11);
    expect(Object.keys(closure!.byUnit).sort()).toEqual(['d', 'h', 'j', 'k', 's', 'v']);
    for (const byUnit of Object.values(closure!.byUnit)) expect(worstOf(byUnit)).toBeLessThan(1e-11);
    // Derived: 15 mol/s come in by the feeds; they leave by both products and the hanging end m.
    const leaving = ['i', 'l', 'm'].reduce((sum, id) => sum + solvedStream(batch, id).n_mol_s, 0);
    expect(leaving).toBeCloseTo(15, 10);
    expect(closure!.energy.made).toBeCloseTo(
      ['h', 'k'].reduce((sum, id) => sum + unitResult(batch, id)!.heat_W!, 0),
      6,
    );
  });

  test('is solved again only where something changed, and hands out only that', () => {
    const memory = makeMemory(basis);
    finish(problemOf(basis, train(4e5, 2e4)), memory);
    const same = finish(problemOf(basis, train(4e5, 2e4), { edit: 2 }), memory);
    expect(same.steps).toEqual([]);
    expect([same.streams, same.units, same.gone]).toEqual([[], [], []]);
    const hotter = finish(problemOf(basis, train(4e5, 3e4), { edit: 3 }), memory);
    expect(hotter.steps).toEqual(['h', 's', 'p2']);
    expect(hotter.streams.map(([id]) => id).sort()).toEqual(['g', 'l', 'm']);
    expect(worstOf(hotter.closure!)).toBeLessThan(1e-11);
  });

  test('tells which records are gone', () => {
    const memory = makeMemory(basis);
    finish(problemOf(basis, train(4e5, 2e4)), memory);
    const shorter = train(4e5, 2e4).filter((u) => u.id !== 'p1' && u.id !== 'k');
    const batch = finish(problemOf(basis, shorter, { edit: 2 }), memory);
    expect(batch.gone).toHaveLength(3);
    expect(batch.gone).toEqual(expect.arrayContaining([{ stream: 'i' }, { unit: 'k' }, { unit: 'p1' }]));
    expect(worstOf(batch.closure!)).toBeLessThan(1e-11);
  });

  test.each([11, 12, 13])(
    'after any chain of edits shows what a solve from nothing shows (seed %d)',
    (seed) => {
      const random = seeded(seed);
      const memory = makeMemory(basis);
      for (let edit = 1; edit <= 25; edit++) {
        const units = train(2e5 + 7e5 * random(), 5e4 * random()).map((u) =>
          random() < 0.05 ? { ...u, settings: null } : u,
        );
        const problem = problemOf(basis, units, { edit });
        const live = finish(problem, memory);
        const clean = fresh(problem, basis);
        for (const [id, result] of clean.units) expect(memory.posted.units.get(id)!.state).toBe(result.state);
        for (const [id, result] of clean.streams) {
          const shown = memory.posted.streams.get(id)!;
          expect([id, shown.state]).toEqual([id, result.state]);
          if (shown.state !== 'solved' || result.state !== 'solved') continue;
          expect(Math.abs(shown.T_K - result.T_K)).toBeLessThan(1e-6);
          expect(Math.abs(shown.n_mol_s - result.n_mol_s)).toBeLessThanOrEqual(1e-9 * result.n_mol_s);
          for (let i = 0; i < result.z.length; i++) expect(shown.z[i]!).toBeCloseTo(result.z[i]!, 9);
        }
        expect(live.findings.map((f) => f.code)).toEqual(clean.findings.map((f) => f.code));
      }
    },
  );

  test('survives being broken off: the next solve ends where a fresh one does', () => {
    const memory = makeMemory(basis);
    const begun = solveNetwork(problemOf(basis, train(4e5, 2e4)), memory);
    for (let k = 0; k < 5; k++) begun.next();
    begun.return({ streams: [], units: [], gone: [], findings: [] });
    const next = problemOf(basis, train(5e5, 2e4), { edit: 2 });
    finish(next, memory);
    const clean = fresh(next, basis);
    for (const [id, result] of clean.streams) {
      const shown = memory.posted.streams.get(id)!;
      if (shown.state === 'solved' && result.state === 'solved')
        expect(Math.abs(shown.T_K - result.T_K)).toBeLessThan(1e-6);
      else expect(shown.state).toBe(result.state);
    }
  });

  test('solved from nothing agrees with the live answer and then says nothing', () => {
    const memory = makeMemory(basis);
    for (const P of [3e5, 5e5, 4e5]) finish(problemOf(basis, train(P, 2e4)), memory);
    const clean = finish(problemOf(basis, train(4e5, 2e4)), memory, { from: 'nothing' });
    expect(clean.steps).toHaveLength(10);
    expect(clean.findings.map((f) => f.code)).not.toContain('network/several-answers');
  });

  test.each([
    ['temperature', ({ T_K }: StreamState) => ({ T_K: T_K + 1 })],
    ['vapour fraction', ({ vapourFraction }: StreamState) => ({ vapourFraction: vapourFraction + 0.1 })],
  ])('says so when a solve from nothing finds another %s than the live one', (_, other) => {
    // A kind with two answers, of which it takes the one it started from.
    const catalogue: KindCatalogue = { ...KNOWN_KINDS.catalogue.valve!, kind: 'fickle' };
    const solver: AnyKind = {
      solve: (call: Call<never>) => {
        const out = scaledStream(call.in.in!, 1);
        const changed = call.warm === undefined ? out : { ...out, ...other(out) };
        return solved({ ...answerOf({ out: changed }, {} as never, []), warm: 'here' });
      },
      limits: () => [],
    };
    const kinds = {
      catalogue: { ...KNOWN_KINDS.catalogue, fickle: catalogue },
      solvers: { ...KNOWN_KINDS.solvers, fickle: solver },
    };
    const memory = makeMemory(basis);
    const units = (n: number) => [plainFeed('f', 'a', n), unit('x fickle in=a > out=b', {})];
    for (const n of [1, 2]) finish(problemOf(basis, units(n)), memory, { from: 'warm', kinds });
    const clean = finish(problemOf(basis, units(2)), memory, { from: 'nothing', kinds });
    expect(clean.findings).toContainEqual(
      expect.objectContaining({ code: 'network/several-answers', weight: 'caution', at: { stream: 'b' } }),
    );
  });
});

describe('a unit without an answer', () => {
  test('that needs a value makes what follows wait, and the rest is solved', () => {
    const units = train(4e5, 2e4).map((u) => (u.id === 'h' ? { ...u, settings: null } : u));
    const batch = fresh(problemOf(basis, units), basis);
    expect(unitResult(batch, 'h')!.state).toBe('needs-value');
    expect(unitResult(batch, 's')).toMatchObject({
      state: 'waiting',
      reasons: [{ code: 'network/waits-for', at: { stream: 'g' }, evidence: [{ text: 'h' }] }],
    });
    expect(unitResult(batch, 'k')!.state).toBe('solved');
    expect(batch.closure!.complete).toBe(false);
    expect(worstOf(batch.closure!)).toBeLessThan(1e-11);
  });

  test('without a solution names its reason and makes what follows wait', () => {
    const batch = fresh(problemOf(basis, letDown(-1)), basis);
    expect(unitResult(batch, 'v')).toMatchObject({
      state: 'no-solution',
      reasons: [{ code: 'pressure/not-positive', at: { unit: 'v', path: 'p.P' } }],
    });
    expect(unitResult(batch, 'd')!.state).toBe('waiting');
    expect(new Map(batch.streams).get(streamId('2'))).toEqual({ state: 'no-solution' });
    expect(new Map(batch.streams).get(streamId('3'))).toEqual({ state: 'waiting' });
    expect(batch.findings.map((f) => f.code)).toContain('pressure/not-positive');
  });

  test('because nothing comes in is said at the port or the stream', () => {
    const units = [
      unit('v valve > out=b', { p: { P: 1e5 } }),
      unit('w valve in=lost > out=c', { p: { P: 1e5 } }),
    ];
    const batch = fresh(problemOf(basis, units), basis);
    expect(unitResult(batch, 'v')).toMatchObject({
      state: 'needs-value',
      reasons: [{ code: 'network/inlet-missing', at: { port: 'in' } }],
    });
    expect(unitResult(batch, 'w')).toMatchObject({
      state: 'needs-value',
      reasons: [{ code: 'network/source-missing', at: { stream: 'lost' } }],
    });
  });

  test('that answers with something that does not close is refused', () => {
    const leaky: AnyKind = {
      solve: (call: Call<never>) =>
        solved(answerOf({ out: scaledStream(call.in.in!, 0.99) }, {} as never, [])),
      limits: () => [],
    };
    const kinds = {
      catalogue: { ...KNOWN_KINDS.catalogue, leaky: { ...KNOWN_KINDS.catalogue.valve!, kind: 'leaky' } },
      solvers: { ...KNOWN_KINDS.solvers, leaky },
    };
    const units = [plainFeed('f', 'a'), unit('x leaky in=a > out=b', {})];
    const batch = fresh(problemOf(basis, units), basis, { from: 'warm', kinds });
    expect(unitResult(batch, 'x')).toMatchObject({
      state: 'no-solution',
      reasons: [{ code: 'network/does-not-close' }],
    });
  });
});

describe('a read', () => {
  const share = (of: { stream: string }, more: object = {}) => ({
    is: 'share',
    share: 0.2,
    of,
    basis: 'mole',
    ...more,
  });
  const withShare = (settings: unknown, source = 'a'): ProblemUnit[] => [
    unit('g feed > out=z', settings),
    plainFeed('f', source),
    unit('v valve in=a > out=b', { p: { P: 2e5 } }),
  ];
  const second = (flow: unknown) => ({
    state: { T: 310, P: 5e5 },
    flow,
    composition: parts(1, 0, 0, 0, 0, 0, 1),
  });
  const read = { unit: unitId('g'), path: 'flow', stream: streamId('a') };

  test('of a share of a stream is solved after that stream, by mole, mass or one chemical', () => {
    const flow = (more: object, extra: object): number => {
      const settings = second(share({ stream: 'a' }, more));
      const reads = [{ ...read, of: 'mol', ...extra } as const];
      return solvedStream(fresh(problemOf(basis, withShare(settings), { reads }), basis), 'z').n_mol_s;
    };
    // Derived: 20 % of 10 mol/s; of its methane alone, a seventh.
    expect(flow({}, {})).toBeCloseTo(2, 12);
    expect(flow({ chemical: 0 }, { chemical: 0 })).toBeCloseTo(2 / 7, 12);
    // Derived: 20 % of the mass of 10 mol/s, over the molar mass of the second feed.
    const MW = basis.chemicals.map((c) => c.MW_g_mol);
    const mean = MW.reduce((a, b) => a + b, 0) / 7;
    expect(flow({ basis: 'mass' }, { of: 'mass' })).toBeCloseTo((2 * mean) / ((MW[0]! + MW[6]!) / 2), 10);
  });

  test('of something that has no answer waits for it', () => {
    const reads = [{ ...read, of: 'mol' } as const];
    const units = withShare(second(share({ stream: 'a' }))).map((u) =>
      u.id === 'f' ? { ...u, settings: null } : u,
    );
    const batch = fresh(problemOf(basis, units, { reads }), basis);
    expect(unitResult(batch, 'g')!.state).toBe('waiting');
  });
});

test('a kind that a test adds, with catalogue and solve alone, is solved like any other', () => {
  const catalogue: KindCatalogue = {
    kind: 'third',
    group: 'lines',
    tag: { letters: 'T', drawn: true },
    ports: [
      { name: 'in', dir: 'in' },
      { name: 'some', dir: 'out' },
      { name: 'rest', dir: 'out' },
    ],
    settings: {},
    results: { share: { dim: 'fraction' } },
    findings: [],
  };
  const solver: AnyKind = {
    solve: ({ in: inlets }: Call<never>) => {
      const out = { some: scaledStream(inlets.in!, 1 / 3), rest: scaledStream(inlets.in!, 2 / 3) };
      return solved(answerOf(out, { share: 1 / 3 } as never, []));
    },
    limits: () => [],
  };
  const kinds = {
    catalogue: { ...KNOWN_KINDS.catalogue, third: catalogue },
    solvers: { ...KNOWN_KINDS.solvers, third: solver },
  };
  const units = [
    plainFeed('f', 'a'),
    unit('t third in=a > some=b rest=c', {}),
    unit('v valve in=c > out=e', { p: { P: 2e5 } }),
  ];
  const batch = fresh(problemOf(basis, units), basis, { from: 'warm', kinds });
  expect(unitResult(batch, 't')).toMatchObject({ state: 'solved', results: { share: 1 / 3 } });
  expect(solvedStream(batch, 'b').n_mol_s).toBeCloseTo(10 / 3, 12);
  expect(solvedStream(batch, 'e').n_mol_s).toBeCloseTo(20 / 3, 12);
  expect(worstOf(batch.closure!)).toBeLessThan(1e-11);
});
