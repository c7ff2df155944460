import type { StreamId, UnitId } from '../../src/engine/ids';
import type { SolveBatch, StreamResult, UnitResult } from '../../src/engine/network/types';
import type { Finding } from '../../src/engine/outcome';
import { emptySketch } from '../../src/sketch/fresh';
import type { Sketch, SketchStream, SketchUnit } from '../../src/sketch/types';
import { createCompiledStore } from '../../src/store/compiledStore';
import type { Stores } from '../../src/store/react';
import { createResultsStore } from '../../src/store/resultsStore';
import { createSession } from '../../src/store/session';
import { createSketchStore } from '../../src/store/sketchStore';

export const unitId = (id: string): UnitId => id as UnitId;
export const streamId = (id: string): StreamId => id as StreamId;

export const unit = (
  id: string,
  tag: string,
  kind: string,
  at: readonly [number, number],
  more: Partial<SketchUnit> = {},
): SketchUnit => ({ id: unitId(id), tag, kind, at, settings: {}, ...more });

type End = readonly [string, string];
export const stream = (number: string, from?: End, to?: End): SketchStream => ({
  id: streamId(`s${number}`),
  number,
  ...(from ? { from: [unitId(from[0]), from[1]] as const } : {}),
  ...(to ? { to: [unitId(to[0]), to[1]] as const } : {}),
});

/** Feed, valve and drum on one line; vapour to a product, liquid with a loose end; a heater apart. */
export const letDown = (): Sketch => ({
  ...emptySketch('let-down'),
  units: [
    unit('u1', 'FEED-1', 'feed', [96, 320], { name: 'Live liquid' }),
    unit('u2', 'PV-101', 'valve', [256, 320]),
    unit('u3', 'V-101', 'drum', [432, 320]),
    unit('u4', 'PROD-1', 'product', [680, 160], { name: 'Flash gas' }),
    unit('u5', 'E-101', 'heater', [600, 520]),
  ],
  streams: [
    stream('1', ['u1', 'out'], ['u2', 'in']),
    stream('2', ['u2', 'out'], ['u3', 'in1']),
    stream('3', ['u3', 'vapour'], ['u4', 'in']),
    stream('4', ['u3', 'liquid']),
    stream('5', ['u5', 'out']),
  ],
});

export const storesOf = (sketch: Sketch): Stores => ({
  sketch: createSketchStore(sketch),
  results: createResultsStore(),
  session: createSession(),
  compiled: createCompiledStore(),
});

/** A solved stream; only what labels show differs from stream to stream. */
export const solvedStream = (
  more: Partial<Extract<StreamResult, { state: 'solved' }>> = {},
): StreamResult => ({
  state: 'solved',
  T_K: 313.15,
  P_Pa: 5e5,
  n_mol_s: 1000 / 36,
  m_kg_s: 1,
  MW_g_mol: 36,
  H_W: 1000,
  HfromIdeal_W: 0,
  h_J_mol: 36,
  vapourFraction: 0,
  vapourMassFraction: 0,
  z: new Float64Array([1]),
  volume_m3_s: 0.1,
  phases: [],
  ...more,
});

interface Answer {
  readonly streams?: Readonly<Record<string, StreamResult>>;
  readonly units?: Readonly<Record<string, UnitResult>>;
  readonly findings?: readonly Finding[];
}

/** The worker's word on an edit. */
export function answer(
  stores: Stores,
  edit: number,
  { streams = {}, units = {}, findings = [] }: Answer,
): void {
  const batch: SolveBatch = {
    streams: Object.entries(streams).map(([id, result]) => [streamId(id), result]),
    units: Object.entries(units).map(([id, result]) => [unitId(id), result]),
    gone: [],
    findings,
  };
  stores.results.take(edit, true, batch, 12);
}

/** Everything in the sketch solved. */
export function solveAll(stores: Stores, edit = 1): void {
  const { sketch } = stores.sketch.getState();
  answer(stores, edit, {
    streams: Object.fromEntries(sketch.streams.map((s) => [s.id, solvedStream()])),
    units: Object.fromEntries(sketch.units.map((u) => [u.id, { kind: u.kind, state: 'solved' as const }])),
  });
}
