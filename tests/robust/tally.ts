import type { ColumnEnd } from '../../src/engine/column/solve';
import type { StageSystem } from '../../src/engine/column/system';
import { faultOf } from './columns';
import type { GroupReport } from './groups';

/** Counts how columns end, each under the referee. */
export class Tally<Case extends object> {
  tried = 0;
  private answered = 0;
  private wrong = 0;
  private readonly reasons: Record<string, number> = {};
  private readonly cases: unknown[] = [];
  private readonly lastTry: Record<string, number> = {};
  /** One case for each way of starting beyond the first, to be kept in tests. */
  private readonly rescued: Record<string, Case> = {};

  /** The system of a solved column; undefined when there is none, or a wrong one. */
  take(end: ColumnEnd, of: Case): StageSystem | undefined {
    this.tried++;
    if (end.state !== 'solved') {
      const { why } = end.failure;
      this.reasons[why] = (this.reasons[why] ?? 0) + 1;
      this.cases.push({ ...of, why, failure: end.failure });
      return undefined;
    }
    const fault = faultOf(end.system);
    if (fault !== undefined) {
      this.wrong++;
      this.cases.push({ ...of, why: fault });
      return undefined;
    }
    this.answered++;
    const how = end.effort.tried.at(-1)!;
    this.lastTry[how] = (this.lastTry[how] ?? 0) + 1;
    if (how !== 'plain-start') this.rescued[how] ??= of;
    return end.system;
  }

  report(): GroupReport {
    const { tried, answered, reasons, wrong, cases, lastTry, rescued } = this;
    return {
      tried,
      answered,
      reasons,
      wrong,
      share: answered / tried,
      wanted: 0.98,
      cases,
      more: { lastTry, rescued },
    };
  }
}
