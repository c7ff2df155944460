import type { StreamId, UnitId } from '../engine/ids';
import type { Basis, Closure, Problem, StreamResult, UnitResult } from '../engine/network/types';
import type { Finding } from '../engine/outcome';
import { connectSolver } from '../store/solverClient';
import { takeWorker } from './solverWorker';

export interface CleanAnswer {
  readonly streams: ReadonlyMap<StreamId, StreamResult>;
  readonly units: ReadonlyMap<UnitId, UnitResult>;
  readonly closure: Closure | null;
  readonly findings: readonly Finding[];
}

/**
 * Solves once from nothing in a worker of its own: what leaves the app never rests on a warm start. Aborted, it ends the
 * worker and is refused with the signal's reason.
 */
export function solveFromNothing(basis: Basis, problem: Problem, signal?: AbortSignal): Promise<CleanAnswer> {
  return new Promise((resolve, reject) => {
    signal?.throwIfAborted();
    const streams = new Map<StreamId, StreamResult>();
    const units = new Map<UnitId, UnitResult>();
    const client = connectSolver(takeWorker, {
      results: (_edit, last, batch) => {
        for (const [id, result] of batch.streams) streams.set(id, result);
        for (const [id, result] of batch.units) units.set(id, result);
        if (!last) return;
        client.close();
        resolve({ streams, units, closure: batch.closure ?? null, findings: batch.findings });
      },
      at: () => undefined,
      answer: () => undefined,
      broke: (_edit, message) => {
        client.close();
        reject(new Error(message));
      },
    });
    signal?.addEventListener('abort', () => {
      client.close();
      reject(signal.reason);
    });
    client.solve(basis, problem, 'nothing');
  });
}
