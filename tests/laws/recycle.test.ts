/** Loops against their closed form, or against one dense solve where they nest; closure by an auditor of its own. */
import { beforeAll, describe, expect, test } from 'vitest';
import { worstOf } from '../../src/engine/network/closure';
import { makeMemory } from '../../src/engine/network/memory';
import type { Basis, ProblemUnit, SolveBatch } from '../../src/engine/network/types';
import { luFactor, luSolve } from '../../src/engine/numerics/lu';
import {
  basisOf,
  finish,
  fresh,
  molar,
  parts,
  problemOf,
  solvedStream,
  unit,
  unitResult,
} from '../network/fixtures';
import { byShares, WITH_PARTING } from '../network/linearKinds';
import { seeded } from '../numerics/seeded';
import { audit, worstOfAudit } from './audit';

let basis: Basis;
beforeAll(async () => {
  basis = await basisOf(['nitrogen', 'propane', 'n-hexane']);
});
const kinds = { from: 'warm', kinds: WITH_PARTING } as const;

const feed = (id: string, stream: string, n: number, ...x: number[]): ProblemUnit =>
  unit(`${id} feed > out=${stream}`, { state: { T: 300, P: 1e5 }, flow: molar(n), composition: parts(...x) });
const amount = (batch: SolveBatch, id: string, i: number): number =>
  solvedStream(batch, id).z[i]! * solvedStream(batch, id).n_mol_s;

/** Every unit's closure from the shown results alone. */
function auditAll(batch: SolveBatch, units: readonly ProblemUnit[]): number {
  const of = (ports: ProblemUnit['in']) => Object.values(ports).map((s) => solvedStream(batch, s));
  return Math.max(
    ...units
      .filter((u) => u.kind !== 'feed')
      .map((u) => worstOfAudit(audit(of(u.in), of(u.out), unitResult(batch, u.id)!, basis.chemicals))),
  );
}

describe('a separator with a recycle and a purge', () => {
  /** These shares of the chemicals go towards the recycle, of which `purge` leaves. */
  const BACK = [0.999, 0.6, 0.02];
  const PART = byShares({ out1: BACK, out2: BACK.map((b) => 1 - b) });
  const loop = (purge: number, n: number): ProblemUnit[] => [
    feed('f', 'in', n, 1, 2, 3),
    unit('j join in1=in in2=back > out=all', { p: { drop: 0 } }),
    unit('s parting in1=all > out1=gas out2=product', {
      part: PART,
    }),
    unit('d divide in=gas > out1=back out2=purge', {
      shares: { out2: { is: 'share', share: purge, of: 'feed', basis: 'mole' } },
    }),
  ];

  test.each([0.5, 0.05, 0.01, 1e-3, 1e-5])('of %d carries f b (1 - p) / (1 - b (1 - p)) round', (purge) => {
    const units = loop(purge, 6);
    const batch = fresh(problemOf(basis, units), basis, kinds);
    for (const [i, f] of [1, 2, 3].entries()) {
      // Derived: back = (f + back) b (1 - p).
      const kept = BACK[i]! * (1 - purge);
      expect(amount(batch, 'back', i) / ((f * kept) / (1 - kept))).toBeCloseTo(1, 7);
    }
    expect(worstOf(batch.closure!)).toBeLessThan(1e-9);
    expect(auditAll(batch, units)).toBeLessThan(1e-9);
    // Derived: three chemicals go round at rates of their own, so three differences determine the loop.
    const { loop: how } = unitResult(batch, 'j')!;
    expect(how).toMatchObject({ tear: ['back'] });
    expect(how!.passes).toBeLessThanOrEqual(15);
  });

  test('is solved from the last answer after an edit, to the same numbers, and kept when nothing changed', () => {
    const memory = makeMemory(basis);
    const problem = (edit: number, n: number, purge: number) => problemOf(basis, loop(purge, n), { edit });
    finish(problem(1, 6, 0.01), memory, kinds);
    const kept = finish(problem(2, 6, 0.01), memory, kinds);
    expect([kept.steps, kept.streams, kept.units]).toEqual([[], [], []]);
    for (const [edit, n, purge] of [
      [3, 6.3, 0.01],
      [4, 6.3, 0.012],
      [5, 9, 0.5],
      [6, 6, 0.01],
    ] as const) {
      const live = finish(problem(edit, n, purge), memory, kinds);
      const clean = fresh(problem(edit, n, purge), basis, kinds);
      for (const id of ['back', 'purge', 'product'])
        for (const i of [0, 1, 2]) expect(amount(live, id, i) / amount(clean, id, i)).toBeCloseTo(1, 8);
      expect(worstOf(live.closure!)).toBeLessThan(1e-9);
    }
    const clean = finish(problem(6, 6, 0.01), memory, { ...kinds, from: 'nothing' });
    expect(clean.findings.map((f) => f.code)).not.toContain('network/several-answers');
  });

  test('does not carry on with a chemical that enters no more', () => {
    const memory = makeMemory(basis);
    const without = loop(0.01, 6).map((u) => (u.id === 'f' ? feed('f', 'in', 5, 0, 2, 3) : u));
    finish(problemOf(basis, loop(0.01, 6)), memory, kinds);
    const batch = finish(problemOf(basis, without, { edit: 2 }), memory, kinds);
    expect(amount(batch, 'back', 0)).toBe(0);
    expect(amount(batch, 'purge', 0)).toBe(0);
  });
});

describe('loops in loops of given shares', () => {
  /** Units in a row and streams from any to any, as random shares; what is left leaves. */
  function tangle(seed: number, count: number) {
    const random = seeded(seed);
    const share: number[][][] = [];
    for (let u = 0; u < count; u++) {
      const to = Array.from({ length: count }, (_, v) => (v === u + 1 || random() < 0.3 ? 1 : 0));
      share.push(
        [0, 1, 2].map(() => {
          const raw = to.map((t) => t * (0.05 + random()));
          const sum = raw.reduce((a, b) => a + b, 0);
          const leaves = 0.02 + 0.3 * random();
          return sum === 0 ? raw : raw.map((r) => (r * (1 - leaves)) / sum);
        }),
      );
    }
    return share;
  }

  test.each([1, 2, 3, 4, 5, 6, 7, 8])('give what one dense solve gives (seed %d)', (seed) => {
    const count = 3 + (seed % 5);
    const share = tangle(seed, count);
    const name = (u: number, v: number) => `${u}to${v}`;
    const joined = (u: number, v: number): boolean => share[u]![0]![v]! > 0;
    const all = Array.from({ length: count }, (_, v) => v);
    const units: ProblemUnit[] = [feed('f', 'in', 6, 1, 2, 3)];
    for (const u of all) {
      const ins = all.filter((v) => joined(v, u)).map((v, k) => `in${k + 2}=${name(v, u)}`);
      const targets = all.filter((v) => joined(u, v));
      const outs = targets.map((v, k) => `out${k + 2}=${name(u, v)}`);
      if (u === 0) ins.unshift('in1=in');
      const leaving = [0, 1, 2].map((i) => 1 - share[u]![i]!.reduce((a, b) => a + b, 0));
      const parted = Object.fromEntries(
        targets.map((v, k) => [`out${k + 2}`, [0, 1, 2].map((i) => share[u]![i]![v]!)]),
      );
      units.push(
        unit(`u${u} parting ${ins.join(' ')} > out1=off${u} ${outs.join(' ')}`, {
          part: byShares({ out1: leaving, ...parted }),
        }),
      );
    }
    const batch = fresh(problemOf(basis, units), basis, kinds);
    for (const [i, f] of [1, 2, 3].entries()) {
      // Derived: what passes unit v is its feed and the shares of what passes the others.
      const a = new Float64Array(count * count);
      for (const u of all) for (const v of all) a[v * count + u] = (u === v ? 1 : 0) - share[u]![i]![v]!;
      const through = Float64Array.from(all, (v) => (v === 0 ? f : 0));
      const pivot = new Int32Array(count);
      luFactor(a, count, pivot);
      luSolve(a, count, pivot, through);
      for (const u of all) {
        const leaves = 1 - share[u]![i]!.reduce((x, y) => x + y, 0);
        expect(amount(batch, `off${u}`, i)).toBeCloseTo(through[u]! * leaves, 7);
      }
    }
    expect(worstOf(batch.closure!)).toBeLessThan(1e-9);
    expect(auditAll(batch, units)).toBeLessThan(1e-9);
  });
});
