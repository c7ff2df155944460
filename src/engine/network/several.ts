import type { StreamId } from '../ids';
import { type Finding, saw } from '../outcome';
import { totalOf } from '../units/streams';
import type { StreamMemory } from './memory';

/** A live answer and one from nothing agree within this: relative in any flow, in kelvins, in vapour fraction. */
const FLOW = 1e-6;
const KELVIN = 1e-4;
const VAPOUR = 1e-4;
/** Flows below this share of the stream are compared against it. */
const TRACE = 1e-6;

/**
 * Streams in which a solve from nothing found another answer than the live one: network/several-answers, with the largest
 * relative difference of a component's flow [-], that of temperature [K] and that of vapour fraction [-], by which alone two
 * states of a boiling pure chemical differ.
 */
export function severalAnswers(
  live: ReadonlyMap<StreamId, StreamMemory>,
  clean: ReadonlyMap<StreamId, StreamMemory>,
): Finding[] {
  const found: Finding[] = [];
  for (const [stream, { state: b }] of clean) {
    const a = live.get(stream)?.state;
    if (!a) continue;
    const floor = TRACE * Math.max(totalOf(a.n_mol_s), totalOf(b.n_mol_s));
    let flow = 0;
    for (let i = 0; i < a.n_mol_s.length; i++) {
      const [x, y] = [a.n_mol_s[i]!, b.n_mol_s[i]!];
      if (x !== y) flow = Math.max(flow, Math.abs(x - y) / Math.max(x, y, floor));
    }
    const kelvin = Math.abs(a.T_K - b.T_K);
    const vapour = Math.abs(a.vapourFraction - b.vapourFraction);
    if (flow <= FLOW && kelvin <= KELVIN && vapour <= VAPOUR) continue;
    found.push({
      code: 'network/several-answers',
      weight: 'caution',
      at: { stream },
      evidence: [
        saw('flow', flow, 'fraction'),
        saw('temperature', kelvin, 'temperatureDifference'),
        saw('vapourFraction', vapour, 'fraction'),
      ],
    });
  }
  return found;
}
