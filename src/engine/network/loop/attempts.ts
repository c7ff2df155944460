import type { StreamState } from '../../equilibrium/types';
import { emptyStream, mixed, scaledStream, streamAt } from '../../units/streams';
import { seenBy } from '../reads';
import { sameData } from '../same';
import { warmIn } from '../solveUnit';
import type { SolveStep } from '../step';
import { iterate } from './iterate';
import type { LoopWarm, Torn } from './memory';
import { nothingEnters } from './reasons';
import type { Ending, Loop } from './types';

/** Passes of an attempt. */
const COLD_PASSES = 150;
const WARM_PASSES = 50;

/**
 * Solves a loop: from the tear of the last answer if there is one, else and then from empty tears, then from tears that carry
 * what enters.
 *
 * @returns  solved; or the reason of the attempt that says most: network/nothing-enters, network/no-way-out,
 *           network/pressure-falls, network/loop-unsettled, or a unit's own
 */
export function* attemptAll(loop: Loop, warm: LoopWarm | undefined): Generator<SolveStep, Ending, void> {
  const mix = entering(loop);
  if (!mix) return nothingEnters(loop);
  if (warm && sameData(warm.tears, loop.plan.tears) && sameData(warm.scalars, loop.plan.scalars)) {
    const { memory } = loop.run;
    const starts = new Map(loop.members.map(({ unit }) => [unit.id, warmIn(memory, unit)] as const));
    warm.slopes.leap();
    const ending = yield* iterate(loop, {
      torn: warm.torn,
      warm: starts,
      slopes: warm.slopes,
      passes: WARM_PASSES,
    });
    if (ending.is === 'solved') return ending;
    warm.slopes.forget();
  }
  const { MW_kg_mol } = loop.run.memory.data;
  const seen = loop.plan.scalars.map((read) => seenBy(read, mix, MW_kg_mol));
  const start = (stream: StreamState): Torn => ({ streams: loop.plan.tears.map(() => stream), seen });
  const cold = { warm: new Map(), passes: COLD_PASSES };
  const ending = yield* iterate(loop, { ...cold, torn: start(scaledStream(mix, 0)) });
  if (ending.is === 'solved' || isHopeless(ending)) return ending;
  const second = yield* iterate(loop, { ...cold, torn: start(mix) });
  return second.is === 'solved' || isHopeless(second) ? second : ending;
}

/** The loop as a whole cannot be, wherever it starts. */
const HOPELESS: ReadonlySet<string> = new Set(['network/no-way-out', 'network/pressure-falls']);
const isHopeless = (ending: Ending): boolean =>
  ending.is === 'no-solution' && HOPELESS.has(ending.findings[0].code);

/** All that enters the loop's units, together; undefined when no stream leads into it. */
function entering({ run, members, entering: known }: Loop): StreamState | undefined {
  const inlets = new Set(members.flatMap((m) => Object.values(m.unit.in)));
  const states = known.filter(([stream]) => inlets.has(stream));
  if (states.length === 0) return undefined;
  const { model, work } = run.memory;
  const { n_mol_s, P_Pa, T_K, H_W } = mixed(Object.fromEntries(states), model.nc);
  const unit = members[0]!.unit.id;
  const made = streamAt({ unit, model, work }, n_mol_s, { P_Pa, H_W }, { T_K });
  return made.state === 'solved' ? made.value : { ...emptyStream(model.nc, T_K, P_Pa), n_mol_s };
}
