/** What a loop says when it cannot be solved, or not yet; how far it is while it is solved; reads that close a circle. */
import { beforeAll, describe, expect, test } from 'vitest';
import { worstOf } from '../../src/engine/network/closure';
import { KNOWN_KINDS as KINDS } from '../../src/engine/network/kinds';
import { makeMemory } from '../../src/engine/network/memory';
import { solveNetwork } from '../../src/engine/network/solve';
import type { Basis, LoopProgress, ProblemUnit } from '../../src/engine/network/types';
import { solved } from '../../src/engine/outcome';
import { answerOf } from '../../src/engine/units/answer';
import type { AnyKind } from '../../src/engine/units/solvers';
import { streamAt } from '../../src/engine/units/streams';
import type { Call } from '../../src/engine/units/types';
import {
  basisOf,
  finish,
  fresh,
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
  basis = await basisOf(['nitrogen', 'n-hexane']);
});

const share = (value: number, of: 'feed' | { stream: string } = 'feed') => ({
  is: 'share',
  share: value,
  of,
  basis: 'mole',
});
const feed = (id: string, stream: string, n: number, ...x: number[]): ProblemUnit =>
  unit(`${id} feed > out=${stream}`, { state: { T: 330, P: 2e5 }, flow: molar(n), composition: parts(...x) });

/** Hexane is condensed out of nitrogen, which goes round by a compressor; some of it is purged. */
const gasLoop = (purge: number, T = 265): ProblemUnit[] => [
  feed('f', 'a', 5, 1, 9),
  unit('j join in1=a in2=back > out=b', { p: { drop: 0 } }),
  unit('c cooler in=b > out=d', { p: { drop: 1e4 }, T }),
  unit('v drum in1=d > vapour=g liquid=l', { p: { drop: 0 } }),
  unit('x divide in=g > out1=r out2=p', { shares: { out2: share(purge) } }),
  unit('k compressor in=r > out=back', { p: { P: 2e5 }, efficiency: { isentropic: 0.7 } }),
  unit('w product in=l', {}),
];

describe('a gas loop with drum, divide and compressor', () => {
  test.each([
    [0.05, 12],
    [0.01, 12],
  ])('and a purge of %d closes within %i passes, and says so on its units', (purge, most) => {
    const batch = fresh(problemOf(basis, gasLoop(purge)), basis);
    expect(worstOf(batch.closure!)).toBeLessThan(1e-9);
    expect(batch.closure!.complete).toBe(true);
    const { loop } = unitResult(batch, 'k')!;
    expect(loop).toMatchObject({ tear: ['back'] });
    expect(loop!.passes).toBeLessThanOrEqual(most);
    expect(loop!.residual).toBeLessThan(1e-9);
    for (const id of ['f', 'w']) expect(unitResult(batch, id)!.loop).toBeUndefined();
    // Derived: what nitrogen enters leaves by the purge or dissolved.
    const n2 = (id: string) => solvedStream(batch, id).n_mol_s * solvedStream(batch, id).z[0]!;
    expect(n2('p') + n2('l')).toBeCloseTo(0.5, 9);
    expect(n2('back') / n2('p')).toBeCloseTo((1 - purge) / purge, 6);
  });

  test('is solved again in a few passes after a small change, and thresholds alone solve nothing', () => {
    const memory = makeMemory(basis);
    finish(problemOf(basis, gasLoop(0.01)), memory);
    const warm = finish(problemOf(basis, gasLoop(0.0101), { edit: 2 }), memory);
    expect(unitResult(warm, 'k')!.loop!.passes).toBeLessThanOrEqual(7);
    const limits = { 'cooling/below-cooling-water': 1 };
    const other = finish(problemOf(basis, gasLoop(0.0101), { edit: 3, limits }), memory);
    expect(other.steps).toEqual([]);
    expect(other.units).toEqual([]);
  });

  test('tells while it runs which loop, which tear, which pass and how far', () => {
    const seen: LoopProgress[] = [];
    const solve = solveNetwork(problemOf(basis, gasLoop(0.05)), makeMemory(basis));
    for (let step = solve.next(); !step.done; step = solve.next())
      if (step.value.loop) seen.push(step.value.loop);
    expect(seen[0]).toMatchObject({ stream: 'back', pass: 1 });
    expect(seen[0]!.residual).toBeUndefined();
    expect([...seen[0]!.units].sort()).toEqual(['c', 'j', 'k', 'v', 'x']);
    const told = seen.flatMap((s) => s.residual ?? []);
    expect(told.at(-1)!).toBeLessThan(told[0]!);
    const passes = seen.map((s) => s.pass);
    expect(passes).toEqual([...passes].sort((a, b) => a - b));
  });

  test('may be broken off in a pass: the next solve ends where a fresh one does', () => {
    const memory = makeMemory(basis);
    finish(problemOf(basis, gasLoop(0.05)), memory);
    const begun = solveNetwork(problemOf(basis, gasLoop(0.2), { edit: 2 }), memory);
    for (let k = 0; k < 8; k++) begun.next();
    begun.return({ streams: [], units: [], gone: [], findings: [] });
    const next = problemOf(basis, gasLoop(0.03), { edit: 3 });
    const live = finish(next, memory);
    const clean = fresh(next, basis);
    expect(solvedStream(live, 'back').n_mol_s / solvedStream(clean, 'back').n_mol_s).toBeCloseTo(1, 8);
  });

  test('that was cut and is drawn again has its answer back, not what its units had in between', () => {
    const memory = makeMemory(basis);
    const cut = gasLoop(0.05).map((u) =>
      u.id === 'j' ? unit('j join in1=a > out=b', { p: { drop: 0 } }) : u,
    );
    const first = finish(problemOf(basis, gasLoop(0.05)), memory);
    const open = finish(problemOf(basis, cut, { edit: 2 }), memory);
    expect(unitResult(open, 'k')!.loop).toBeUndefined();
    const again = finish(problemOf(basis, gasLoop(0.05), { edit: 3 }), memory);
    expect(worstOf(again.closure!)).toBeLessThan(1e-9);
    expect(again.steps).toEqual(['w']);
    for (const id of ['back', 'p', 'l']) expect(solvedStream(again, id)).toEqual(solvedStream(first, id));
  });

  test('without a purge says which chemical has no way out, and where a purge takes most of it', () => {
    const batch = fresh(problemOf(basis, gasLoop(0, 230)), basis);
    const found = batch.findings.filter((f) => f.code === 'network/no-way-out');
    expect(found).toHaveLength(1);
    expect(found[0]).toMatchObject({ at: { chemical: 'nitrogen' }, weight: 'beyond-limit' });
    // Derived: after the drum the gas is richest in nitrogen; the stream after it, the divide's and the compressor's are that gas.
    expect(['g', 'r', 'back']).toContain(found[0]!.at.stream);
    for (const id of ['j', 'c', 'v', 'x', 'k']) expect(unitResult(batch, id)!.state).toBe('no-solution');
    expect(unitResult(batch, 'f')!.state).toBe('solved');
    expect(unitResult(batch, 'w')!.state).toBe('waiting');
  });

  test('finds its way again when a purge is drawn after that, and back', () => {
    const memory = makeMemory(basis);
    const states = [0.05, 0, 0.05, 0].map((purge, k) => {
      finish(problemOf(basis, gasLoop(purge, 230), { edit: k + 1 }), memory);
      return memory.posted.units.get(unitId('k'))!.state;
    });
    expect(states).toEqual(['solved', 'no-solution', 'solved', 'no-solution']);
    const same = finish(problemOf(basis, gasLoop(0, 230), { edit: 9 }), memory);
    expect([same.steps, same.units]).toEqual([[], []]);
    expect(same.findings.map((f) => f.code)).toContain('network/no-way-out');
  });
});

describe('a loop that cannot be solved', () => {
  const closed = [
    unit('k compressor in=a > out=b', { p: { P: 3e5 }, efficiency: { isentropic: 0.7 } }),
    unit('c cooler in=b > out=d', { p: { drop: 0 }, T: 300 }),
    unit('v valve in=d > out=a', { p: { P: 1e5 } }),
  ];

  test('because nothing enters asks for its circulating flow, once', () => {
    const batch = fresh(problemOf(basis, closed), basis);
    for (const id of ['k', 'c', 'v']) expect(unitResult(batch, id)!.state).toBe('needs-value');
    const found = batch.findings.filter((f) => f.code === 'network/nothing-enters');
    expect(found).toHaveLength(1);
    expect(found[0]!.evidence.map((e) => e.text).sort()).toEqual(['c', 'k', 'v']);
    expect(batch.closure!.complete).toBe(false);
  });

  test('because something enters and nothing leaves names every chemical', () => {
    const units = [
      feed('f', 'in', 1, 1, 1),
      unit('j join in1=in in2=a2 > out=a', { p: { P: 1e5 } }),
      ...closed.map((u) => (u.id === 'v' ? unit('v valve in=d > out=a2', { p: { P: 1e5 } }) : u)),
    ];
    const batch = fresh(problemOf(basis, units), basis);
    const found = batch.findings.find((f) => f.code === 'network/no-way-out')!;
    const named = found.evidence.filter((e) => e.name === 'chemical').map((e) => e.text);
    expect(named.sort()).toEqual(['n-hexane', 'nitrogen']);
  });

  test('because one of its units needs a value makes the others wait for that one', () => {
    const units = gasLoop(0.05).map((u) => (u.id === 'c' ? { ...u, settings: null } : u));
    const batch = fresh(problemOf(basis, units), basis);
    expect(unitResult(batch, 'c')!.state).toBe('needs-value');
    for (const id of ['j', 'v', 'x', 'k'])
      expect(unitResult(batch, id)).toMatchObject({
        state: 'waiting',
        reasons: [{ code: 'network/waits-for', at: { unit: id, stream: 'd' }, evidence: [{ text: 'c' }] }],
      });
    expect(batch.findings.map((f) => f.code)).not.toContain('network/nothing-enters');
  });

  test('because what enters has no answer waits for that', () => {
    const units = gasLoop(0.05).map((u) => (u.id === 'f' ? { ...u, settings: null } : u));
    const batch = fresh(problemOf(basis, units), basis);
    for (const id of ['j', 'c', 'v', 'x', 'k'])
      expect(unitResult(batch, id)).toMatchObject({
        state: 'waiting',
        reasons: [{ code: 'network/waits-for', at: { stream: 'a' }, evidence: [{ text: 'f' }] }],
      });
  });

  test('because one of its units has no solution names that unit’s reason', () => {
    // The compressor ends so low that nothing is left after the cooler.
    const units = gasLoop(0.05).map((u) =>
      u.id === 'k'
        ? unit('k compressor in=r > out=back', { p: { P: 1e4 }, efficiency: { isentropic: 0.7 } })
        : u,
    );
    const batch = fresh(problemOf(basis, units), basis);
    expect(unitResult(batch, 'c')).toMatchObject({
      state: 'no-solution',
      reasons: [{ code: 'pressure/not-positive', at: { unit: 'c', path: 'p.drop' } }],
    });
    expect(batch.findings.map((f) => f.code)).toContain('pressure/not-positive');
    expect(unitResult(batch, 'v')).toMatchObject({ state: 'waiting', reasons: [{ at: { stream: 'd' } }] });
  });

  test.each([
    ['drops', { drop: 0.3e5 }],
    ['ratios', { ratio: 0.9 }],
  ])('because its pressure falls by %s on every way round says so, and by how much', (_, p) => {
    const units = [
      feed('f', 'in', 10, 1, 9),
      unit('j join in1=in in2=back > out=a', { p: { drop: 0 } }),
      unit('v valve in=a > out=b', { p }),
      unit('x divide in=b > out1=back out2=out', { shares: { out2: share(0.2) } }),
    ];
    const batch = fresh(problemOf(basis, units), basis);
    const found = batch.findings.filter((f) => f.code === 'network/pressure-falls');
    expect(found).toHaveLength(1);
    const of = (name: string) => found[0]!.evidence.find((e) => e.name === name)!.value;
    // Derived: one valve stands in the loop.
    const lost = 'drop' in p ? p.drop : (1 - p.ratio!) * of('pressure');
    expect(of('fall') / lost).toBeCloseTo(1, 6);
    expect(found[0]!.evidence.flatMap((e) => e.text ?? []).sort()).toEqual(['j', 'v', 'x']);
    for (const id of ['j', 'v', 'x']) expect(unitResult(batch, id)!.state).toBe('no-solution');
    // A unit that holds a pressure ends the fall: the same loop with a pump in it is solved.
    const pumped = units.map((u) =>
      u.id === 'x' ? unit('x divide in=b > out1=r out2=out', { shares: { out2: share(0.2) } }) : u,
    );
    pumped.push(unit('k compressor in=r > out=back', { p: { P: 2e5 }, efficiency: { isentropic: 0.7 } }));
    expect(fresh(problemOf(basis, pumped), basis).closure!.complete).toBe(true);
  });

  test('because a unit answers every time with something else gives up, and says how far it was', () => {
    let n = 0;
    const odd = {
      catalogue: { ...KINDS.catalogue, odd: { ...KINDS.catalogue.valve!, kind: 'odd' } },
      solvers: {
        ...KINDS.solvers,
        odd: {
          solve: (call: Call<never>) => {
            const T_K = 300 + 40 * ((n++ * 0.618) % 1);
            const made = streamAt(call, call.in.in!.n_mol_s, { T_K, P_Pa: 1.9e5 });
            if (made.state !== 'solved') return made as never;
            const duty = made.value.H_W - call.in.in!.H_W;
            return solved(answerOf({ out: made.value }, {} as never, [], duty));
          },
          limits: () => [],
        } as AnyKind,
      },
    };
    const units = gasLoop(0.05).map((u) => (u.id === 'c' ? unit('c odd in=b > out=d', {}) : u));
    const batch = fresh(problemOf(basis, units), basis, { from: 'warm', kinds: odd });
    const found = batch.findings.filter((f) => f.code === 'network/loop-unsettled');
    expect(found).toHaveLength(1);
    const value = (name: string) => found[0]!.evidence.find((e) => e.name === name)!.value;
    expect(value('passes')).toBeGreaterThan(20);
    expect(value('residual')).toBeGreaterThan(1e-6);
    expect(found[0]!.at.stream).toBe('back');
  });
});

describe('a read that closes a circle', () => {
  const second = (flow: unknown) =>
    unit('g feed > out=z', { state: { T: 330, P: 2e5 }, flow, composition: parts(1, 0) });
  const units = (value: number, more: object = {}): ProblemUnit[] => [
    feed('f', 'a', 6, 1, 9),
    second({ ...share(value, { stream: 'b' }), ...more }),
    unit('j join in1=a in2=z > out=b', { p: { drop: 0 } }),
  ];
  const read = { unit: unitId('g'), path: 'flow', stream: streamId('b') };

  test('is solved as one number: a make-up of 20 % of what it makes', () => {
    const reads = [{ ...read, of: 'mol' } as const];
    const batch = fresh(problemOf(basis, units(0.2), { reads }), basis);
    // Derived: z = 0.2 (6 + z).
    expect(solvedStream(batch, 'z').n_mol_s).toBeCloseTo(1.5, 8);
    expect(unitResult(batch, 'j')!.loop).toMatchObject({ tear: ['b'] });
    expect(worstOf(batch.closure!)).toBeLessThan(1e-9);
    expect(batch.closure!.complete).toBe(true);
  });

  test('by mass, and by one chemical', () => {
    const byMass = fresh(
      problemOf(basis, units(0.2, { basis: 'mass' }), { reads: [{ ...read, of: 'mass' } as const] }),
      basis,
    );
    expect(solvedStream(byMass, 'z').m_kg_s / solvedStream(byMass, 'b').m_kg_s).toBeCloseTo(0.2, 8);
    const one = fresh(
      problemOf(basis, units(0.5, { chemical: 0 }), {
        reads: [{ ...read, of: 'mol', chemical: 0 } as const],
      }),
      basis,
    );
    // Derived: z = 0.5 (0.6 + z).
    expect(solvedStream(one, 'z').n_mol_s).toBeCloseTo(0.6, 8);
  });

  test('of all that it makes itself is refused: nothing else enters', () => {
    const alone = [second(share(0.2, { stream: 'b' })), unit('v valve in=z > out=b', { p: { P: 1e5 } })];
    const batch = fresh(problemOf(basis, alone, { reads: [{ ...read, of: 'mol' } as const] }), basis);
    expect(batch.findings.map((f) => f.code)).toContain('network/nothing-enters');
  });

  test('and cannot be met does not settle on a number', () => {
    const reads = [{ ...read, of: 'mol' } as const];
    // Derived: z = 1.2 (6 + z) has no positive answer.
    const batch = fresh(problemOf(basis, units(1.2), { reads }), basis);
    expect(unitResult(batch, 'j')!.state).not.toBe('solved');
    expect(batch.findings.some((f) => f.weight === 'beyond-limit')).toBe(true);
  });

  test('beside a torn stream follows it: a purge of a share of what enters', () => {
    const loop = gasLoop(0.05).map((u) =>
      u.id === 'x'
        ? unit('x divide in=g > out1=r out2=p', { shares: { out2: share(0.05, { stream: 'b' }) } })
        : u,
    );
    const reads = [{ unit: unitId('x'), path: 'shares.out2', stream: streamId('b'), of: 'mol' } as const];
    const batch = fresh(problemOf(basis, loop, { reads }), basis);
    expect(solvedStream(batch, 'p').n_mol_s / solvedStream(batch, 'b').n_mol_s).toBeCloseTo(0.05, 8);
    expect(worstOf(batch.closure!)).toBeLessThan(1e-9);
  });
});
