import type { StreamId, UnitId } from '../../ids';
import type { Finding } from '../../outcome';
import { atUnit } from '../../units/streams';
import { catalogueOf, solverOf } from '../kinds';
import { type Unready, waitsFor, whyNot } from '../ready';
import type { Run } from '../run';
import type { ProblemUnit, UnitResult } from '../types';
import type { Ending, Loop } from './types';

type Told = readonly (readonly [UnitId, UnitResult])[];

/** What is said of the units of a loop in which some cannot be solved yet: the others wait for those. Undefined: all can be. */
export function blocked(units: readonly ProblemUnit[], { plan, kinds, known }: Run): Told | undefined {
  const why = units.map((unit): Unready | undefined => {
    const catalogue = solverOf(kinds, unit.kind) ? catalogueOf(kinds, unit.kind) : undefined;
    return whyNot(unit, catalogue, plan, known);
  });
  if (why.every((w) => w === undefined)) return undefined;
  const causes: StreamId[] = why.flatMap((w, k) => {
    if (!w) return [];
    const first = w.state === 'waiting' ? w.reasons[0]?.at.stream : Object.values(units[k]!.out)[0];
    return first === undefined ? [] : [first];
  });
  return units.map((unit, k) => {
    const { state, reasons } = why[k] ?? {
      state: 'waiting',
      reasons: [...new Set(causes)].map((s) => waitsFor(unit, s, plan)),
    };
    return [unit.id, { kind: unit.kind, state, reasons }];
  });
}

/** What is said of every unit of a loop that has no answer. */
export function refusal({ run, members }: Loop, ending: Exclude<Ending, { is: 'solved' }>): Told {
  if (ending.is === 'stale') throw new Error('a stale start is followed by one from nothing');
  if (ending.is !== 'unit-fails')
    return members.map(({ unit }) => [
      unit.id,
      { kind: unit.kind, state: ending.is, reasons: ending.findings },
    ]);
  const failed = members.find((m) => m.unit.id === ending.unit)!.unit;
  const stream = Object.values(failed.out)[0];
  const reasons = ending.said.outcome.findings.map((f: Finding) => atUnit({ unit: failed.id }, f));
  return members.map(({ unit }) => [
    unit.id,
    unit === failed
      ? { kind: unit.kind, state: 'no-solution', reasons }
      : {
          kind: unit.kind,
          state: 'waiting',
          reasons: stream === undefined ? [] : [waitsFor(unit, stream, run.plan)],
        },
  ]);
}
