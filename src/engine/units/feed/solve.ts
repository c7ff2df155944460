import type { Condition } from '../../equilibrium/types';
import { type FindingCode, noSolution, type Outcome, solved } from '../../outcome';
import { airFractions } from '../air';
import { answerOf } from '../answer';
import { streamAt, totalOf, warmFrom } from '../streams';
import type { Answer, Call, CompositionSI, FlowSI, UnitKind } from '../types';

export interface FeedSettings {
  /** Exactly two. */
  readonly state: {
    readonly T?: number;
    readonly P?: number;
    readonly vapourFraction?: number;
    /** Molar, elements datum. */
    readonly enthalpy?: number;
    readonly entropy?: number;
  };
  /** Absent when the composition is given by component flows. */
  readonly flow?: FlowSI;
  readonly composition: CompositionSI;
}

/** The two conditions under the engine's names. */
function conditionOf(s: FeedSettings['state']): Condition {
  const named = {
    T_K: s.T,
    P_Pa: s.P,
    vapourFraction: s.vapourFraction,
    h_J_mol: s.enthalpy,
    s_J_molK: s.entropy,
  };
  const given = Object.entries(named).filter(([, value]) => value !== undefined);
  if (given.length !== 2)
    throw new Error('a feed has exactly two conditions: compile lets nothing else through');
  return Object.fromEntries(given) as unknown as Condition;
}

const refused = <T>(call: Call<FeedSettings>, code: FindingCode, path: string): Outcome<T> =>
  noSolution({ code, weight: 'beyond-limit', at: { unit: call.unit, path }, evidence: [] });

/** Mole fractions over the full list; mass fractions are divided by molar mass first. */
function moleFractions(call: Call<FeedSettings>): Outcome<Float64Array> {
  const c = call.settings.composition;
  if (c.is === 'preset') return airFractions(call, c, call.settings.state);
  const raw =
    c.is === 'flows'
      ? c.n_mol_s
      : c.basis === 'mole'
        ? c.parts
        : c.parts.map((w, i) => w / call.model.chemicals[i]!.MW_g_mol);
  const sum = totalOf(raw);
  return sum > 0 ? solved(raw.map((x) => x / sum)) : refused(call, 'feed/no-components', 'composition');
}

/** Component flows [mol/s]. */
function flows(call: Call<FeedSettings>): Outcome<Float64Array> {
  const { composition, flow } = call.settings;
  if (composition.is === 'flows')
    return totalOf(composition.n_mol_s) > 0
      ? solved(composition.n_mol_s)
      : refused(call, 'feed/no-components', 'composition');
  if (flow === undefined) return refused(call, 'feed/flow-missing', 'flow');
  if (flow.is === 'share') return refused(call, 'feed/share-without-stream', 'flow');
  const z = moleFractions(call);
  if (z.state !== 'solved') return z;
  let total = 0;
  if (flow.is === 'molar') total = flow.n_mol_s;
  else {
    let MW = 0;
    z.value.forEach((x, i) => {
      MW += x * call.model.chemicals[i]!.MW_g_mol;
    });
    total = (flow.m_kg_s * 1e3) / MW;
  }
  return total > 0 ? solved(z.value.map((x) => x * total)) : refused(call, 'feed/flow-not-positive', 'flow');
}

function solve(call: Call<FeedSettings>): Outcome<Answer<Record<string, never>>> {
  const n = flows(call);
  if (n.state !== 'solved') return noSolution(...n.findings);
  const made = streamAt(
    call,
    n.value,
    conditionOf(call.settings.state),
    warmFrom(call.warm, n.value, 298.15),
  );
  if (made.state !== 'solved') return noSolution(...made.findings);
  return solved(answerOf({ out: made.value }, {}, [made.value]), made.findings);
}

/**
 * What enters the sketch: component flows [mol/s] from flow and composition, flashed at two conditions.
 *
 * Gives feed/no-components, feed/flow-missing, feed/flow-not-positive, feed/share-without-stream, what airFractions gives, or
 * the flash's reason why there is no such state.
 */
export const feed: UnitKind<FeedSettings, Record<string, never>> = { solve, limits: () => [] };
