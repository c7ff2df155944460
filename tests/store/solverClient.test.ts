import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import type { Basis, Problem } from '../../src/engine/network/types';
import { connectSolver } from '../../src/store/solverClient';
import { problemOf, unitId } from '../network/fixtures';
import { Puppet } from './puppet';

const basis = (id: string): Basis => ({ id, chemicals: [], model: {} as Basis['model'] });
const problem = (edit: number, of = 'b1'): Problem => problemOf(basis(of), [], { edit });
const nothing = { streams: [], units: [], gone: [], findings: [] } as const;

let workers: Puppet[];
let answered: number[];
let broke: { edit: number; message: string; unit: string | null }[];
const connect = () =>
  connectSolver(
    () => {
      const made = new Puppet();
      workers.push(made);
      return made;
    },
    {
      results: (edit, last) => void (last && answered.push(edit)),
      at: () => undefined,
      broke: (edit, message, unit) => void broke.push({ edit, message, unit }),
      answer: () => undefined,
    },
  );
const now = (): Puppet => workers.at(-1)!;

beforeEach(() => {
  vi.useFakeTimers();
  [workers, answered, broke] = [[], [], []];
});
afterEach(() => {
  vi.useRealTimers();
});

describe('the page’s end of the line', () => {
  test('posts a basis only when its id is new', () => {
    const solver = connect();
    solver.solve(basis('b1'), problem(1), 'warm');
    solver.solve(basis('b1'), problem(2), 'warm');
    solver.solve(basis('b2'), problem(3, 'b2'), 'warm');
    expect(now().got.map((m) => m.say)).toEqual(['basis', 'solve', 'solve', 'basis', 'solve']);
  });

  test('waits for nothing after a stop, and hands on what comes of it all the same', () => {
    const solver = connect();
    solver.solve(basis('b1'), problem(1), 'warm');
    solver.stop();
    expect(now().got.at(-1)).toEqual({ say: 'stop' });
    vi.advanceTimersByTime(60_000);
    expect(workers).toHaveLength(1);
    now().say({ say: 'results', edit: 1, last: true, ...nothing });
    expect(answered).toEqual([1]);
    solver.solve(basis('b1'), problem(2), 'warm');
    expect(now().got.at(-1)).toMatchObject({ say: 'solve', problem: { edit: 2 } });
  });

  test('starts a silent worker anew and sends basis and problem again, asking it to name its units', () => {
    const solver = connect();
    solver.solve(basis('b1'), problem(1), 'warm');
    vi.advanceTimersByTime(2999);
    expect(workers).toHaveLength(1);
    vi.advanceTimersByTime(1);
    expect(workers).toHaveLength(2);
    expect(workers[0]!.ended).toBe(true);
    expect(now().got).toMatchObject([
      { say: 'basis' },
      { say: 'solve', announce: true, problem: { edit: 1 } },
    ]);
    now().say({ say: 'results', edit: 1, last: true, ...nothing });
    vi.advanceTimersByTime(60_000);
    expect(workers).toHaveLength(2);
    expect(answered).toEqual([1]);
    expect(broke).toEqual([]);
  });

  test('leaves a busy worker alone as long as it gives a sign of life', () => {
    const solver = connect();
    solver.solve(basis('b1'), problem(1), 'warm');
    for (let k = 0; k < 20; k++) {
      vi.advanceTimersByTime(2500);
      now().say({ say: 'at', edit: 1, unit: unitId('u') });
    }
    expect(workers).toHaveLength(1);
  });

  test('gives an edit up after two restarts, naming the unit, and serves the next edit', () => {
    const solver = connect();
    solver.solve(basis('b1'), problem(1), 'warm');
    for (let k = 0; k < 3; k++) {
      now().say({ say: 'at', edit: 1, unit: unitId('bad') });
      vi.advanceTimersByTime(3000);
    }
    expect(broke).toMatchObject([{ edit: 1, unit: 'bad' }]);
    vi.advanceTimersByTime(60_000);
    expect(workers).toHaveLength(3);
    solver.solve(basis('b1'), problem(2), 'warm');
    expect(now().got).toMatchObject([{ say: 'basis' }, { say: 'solve', problem: { edit: 2 } }]);
    now().say({ say: 'results', edit: 2, last: true, ...nothing });
    expect(answered).toEqual([2]);
  });

  test('does not start a worker for ever that dies at once, and tries again with the next edit', () => {
    const solver = connect();
    solver.solve(basis('b1'), problem(1), 'warm');
    for (let k = 0; k < 10; k++) now().crash('cannot load');
    expect(workers).toHaveLength(3);
    expect(broke).toMatchObject([{ edit: 1, message: 'cannot load' }]);
    solver.solve(basis('b1'), problem(2), 'warm');
    expect(workers).toHaveLength(4);
    expect(now().got.map((m) => m.say)).toEqual(['basis', 'solve']);
  });

  test('reports a mistake that the worker survived at once, and keeps the worker', () => {
    const solver = connect();
    solver.solve(basis('b1'), problem(1), 'warm');
    now().say({ say: 'broke', edit: 1, message: 'a mistake of ours' });
    expect(broke).toMatchObject([{ edit: 1, message: 'a mistake of ours' }]);
    solver.solve(basis('b1'), problem(2), 'warm');
    expect(workers).toHaveLength(1);
    expect(now().got.map((m) => m.say)).toEqual(['basis', 'solve', 'solve']);
  });

  test('hears nothing of a worker that it has ended', () => {
    const solver = connect();
    solver.solve(basis('b1'), problem(1), 'warm');
    vi.advanceTimersByTime(3000);
    workers[0]!.say({ say: 'results', edit: 1, last: true, ...nothing });
    expect(answered).toEqual([]);
    solver.close();
    now().say({ say: 'results', edit: 1, last: true, ...nothing });
    expect(answered).toEqual([]);
  });

  test('waits for the answer from nothing although the live one of the same edit came first', () => {
    const solver = connect();
    solver.solve(basis('b1'), problem(1), 'warm');
    solver.solve(basis('b1'), problem(1), 'nothing');
    now().say({ say: 'results', edit: 1, last: true, ...nothing });
    vi.advanceTimersByTime(3000);
    expect(workers).toHaveLength(2);
    expect(now().got.at(-1)).toMatchObject({ say: 'solve', from: 'nothing' });
  });
});
