import type { StreamState } from '../../equilibrium/types';
import { noSolution, type Outcome, solved } from '../../outcome';
import { emptyStream, streamAt, totalOf, warmFrom, warmOf } from '../../units/streams';
import { idealDatum_W } from '../closure';
import type { Torn } from './memory';
import type { Loop } from './types';

/**
 * A tear as numbers: amounts of all chemicals [mol/s], enthalpy per mole above the ideal gas at 298.15 K [J/mol], pressure [Pa];
 * after the tears what is seen by torn reads. Enthalpy per mole stays a sensible one when amounts are changed by large factors.
 */
export interface Layout {
  readonly nc: number;
  readonly tears: number;
  /** Numbers of one tear. */
  readonly width: number;
  readonly length: number;
}

/** How many numbers a loop's tears and torn reads are. */
export function layoutOf({ run, plan }: Loop): Layout {
  const { nc } = run.memory.model;
  const width = nc + 2;
  return {
    nc,
    tears: plan.tears.length,
    width,
    length: plan.tears.length * width + plan.scalars.length,
  };
}

/** Writes what is torn into `out`. A stream without flow has enthalpy 0. */
export function pack(torn: Torn, { nc, tears, width }: Layout, loop: Loop, out: Float64Array): void {
  torn.streams.forEach((s, t) => {
    const at = t * width;
    out.set(s.n_mol_s, at);
    const total = totalOf(s.n_mol_s);
    out[at + nc] = total > 0 ? (s.H_W - idealDatum_W(s.n_mol_s, loop.run.memory.data)) / total : 0;
    out[at + nc + 1] = s.P_Pa;
  });
  out.set(torn.seen, tears * width);
}

/**
 * Streams with the amounts, enthalpy and pressure of `x`.
 *
 * @param near  states whose temperature and phases are near: start values
 * @returns no solution where no state has them
 */
export function unpack(x: Float64Array, near: Torn, layout: Layout, loop: Loop): Outcome<Torn> {
  const { nc, tears, width, length } = layout;
  const { model, work, data } = loop.run.memory;
  const streams: StreamState[] = [];
  for (let t = 0; t < tears; t++) {
    const at = t * width;
    const n_mol_s = x.slice(at, at + nc);
    const P_Pa = x[at + nc + 1]!;
    const total = totalOf(n_mol_s);
    const about = near.streams[t]!;
    if (total === 0) {
      streams.push(emptyStream(nc, about.T_K, P_Pa));
      continue;
    }
    const H_W = total * x[at + nc]! + idealDatum_W(n_mol_s, data);
    const unit = loop.members[0]!.unit.id;
    const made = streamAt(
      { unit, model, work },
      n_mol_s,
      { P_Pa, H_W },
      warmFrom(about.phases.length > 0 ? warmOf(about) : undefined, n_mol_s, about.T_K),
    );
    if (made.state !== 'solved') return noSolution(...made.findings);
    streams.push(made.value);
  }
  return solved({ streams, seen: [...x.subarray(tears * width, length)] });
}
