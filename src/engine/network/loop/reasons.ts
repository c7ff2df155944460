import type { StreamId } from '../../ids';
import { type Evidence, type Finding, named, saw } from '../../outcome';
import type { ProblemUnit } from '../types';
import type { Change } from './advance';
import type { Ending, Loop } from './types';

const namesOf = (units: readonly ProblemUnit[]): Evidence[] => units.map((u) => named('unit', u.id));

/** The passes came to no end. */
export function unsettled({ plan, members }: Loop, passes: number, change: Change | undefined): Ending {
  const stream: StreamId = plan.tears[change?.tear ?? 0] ?? plan.tears[0] ?? plan.scalars[0]!.stream;
  const finding: Finding = {
    code: 'network/loop-unsettled',
    weight: 'beyond-limit',
    at: { stream },
    evidence: [
      saw('passes', passes, 'number'),
      saw('residual', change?.most ?? 1, 'number'),
      ...namesOf(members.map((m) => m.unit)),
    ],
  };
  return { is: 'no-solution', findings: [finding] };
}

/** From which pressure a tear came back how much lower. */
export interface Fall {
  /** By place in the plan. */
  readonly tear: number;
  readonly from_Pa: number;
  readonly by_Pa: number;
}

/** The pressure falls on every way round: nothing in the loop brings it up again, and nothing holds it. */
export function pressureFalls({ plan, members }: Loop, { tear, from_Pa, by_Pa }: Fall): Ending {
  const finding: Finding = {
    code: 'network/pressure-falls',
    weight: 'beyond-limit',
    at: { stream: plan.tears[tear]! },
    evidence: [
      saw('fall', by_Pa, 'pressureDifference'),
      saw('pressure', from_Pa, 'pressure'),
      ...namesOf(members.map((m) => m.unit)),
    ],
  };
  return { is: 'no-solution', findings: [finding] };
}

/** Nothing flows in the loop, or nothing comes in that could. */
export function nothingEnters({ plan, members }: Pick<Loop, 'plan' | 'members'>): Ending {
  const stream = plan.tears[0] ?? plan.scalars[0]!.stream;
  const finding: Finding = {
    code: 'network/nothing-enters',
    weight: 'beyond-limit',
    at: { stream },
    evidence: namesOf(members.map((m) => m.unit)),
  };
  return { is: 'needs-value', findings: [finding] };
}
