import type { Failure } from '../../column/failure';
import { type ColumnEnd, solveColumn } from '../../column/solve';
import { stateOf } from '../../column/state';
import type { StageSystem } from '../../column/system';
import { dutyOf } from '../../column/targets';
import type { ColumnState, ColumnTask } from '../../column/types';
import { type ColumnWork, workFor } from '../../column/work';
import { makeStream } from '../../equilibrium/stream';
import { type Evidence, type Finding, named, noSolution, type Outcome, saw, solved } from '../../outcome';
import { richestOf } from '../present';
import { mixed } from '../streams';
import type { Answer, Call, UnitKind } from '../types';
import { fedVapour, impossibleBy } from './feasible';
import { bothDuties, conflictsOf, countMiss } from './free';
import { columnLimits } from './limits';
import { outletsOf } from './outlets';
import { type ColumnResults, resultsOf } from './results';
import type { ColumnSettings, PlaceSI } from './settings';
import { severalAnswers } from './several';
import { type ColumnJob, jobOf, nameOfPlace, refuse } from './task';

/** What a column remembers of its last solved state. */
interface Warm {
  readonly state: ColumnState;
  readonly present: readonly number[];
  readonly shape: string;
  readonly fed_mol_s: number;
}

/** Refusals before anything is solved, first of all what contradicts itself. */
function refusals(call: Call<ColumnSettings>): Finding[] {
  const { settings } = call;
  const count = countMiss(settings);
  const sides = Object.keys(settings.sides ?? {});
  const without = sides
    .filter((port) => !call.outPorts.includes(port))
    .map((port) =>
      refuse(call, 'column/side-without-stream', { port, path: `sides.${port}` }, [named('port', port)]),
    );
  const found = [...conflictsOf(settings, sides.length), ...(count ? [count] : [])];
  return [...found.map((f) => ({ ...f, at: { unit: call.unit, ...f.at } })), ...without];
}

const workOf = (call: Call<ColumnSettings>, task: ColumnTask): ColumnWork => {
  const key = `column ${call.unit}`;
  const work = workFor(task, call.work.flash.get(key) as ColumnWork | undefined);
  call.work.flash.set(key, work);
  return work;
};

/** The last state, scaled to what is fed now; undefined when it is of another column or other chemicals. */
function warmState(call: Call<ColumnSettings>, job: ColumnJob, work: ColumnWork): ColumnState | undefined {
  const warm = call.warm as Warm | undefined;
  if (!warm || warm.shape !== work.shape) return undefined;
  if (warm.present.length !== job.present.length || warm.present.some((i, k) => i !== job.present[k]))
    return undefined;
  const ratio = totalFed(job.task) / warm.fed_mol_s;
  const { movers } = work.system;
  const scaled = (x: Float64Array): Float64Array => x.map((n) => n * ratio);
  return {
    l: scaled(warm.state.l),
    v: scaled(warm.state.v),
    T_K: warm.state.T_K,
    p: warm.state.p.map((p, k) => (movers[k]!.moves === 'bottoms' ? p * ratio : p)),
  };
}

const totalFed = ({ feeds }: ColumnTask): number =>
  feeds.reduce((sum, f) => sum + f.n_mol_s.reduce((a, b) => a + b, 0), 0);

const wordOf = (place: PlaceSI): string => (typeof place === 'number' ? `stage ${place}` : `the ${place}`);

/** Why a column that might have an answer has none, with what was tried. */
function reason(
  call: Call<ColumnSettings>,
  job: ColumnJob,
  end: Extract<ColumnEnd, { state: 'no-solution' }>,
): Finding[] {
  const { failure, effort } = end;
  const stage = nameOfPlace(call.settings, failure.place);
  const where = named('place', wordOf(stage));
  const tried = [...new Set(effort.tried)].map((text) => named('tried', text));
  const at = typeof stage === 'number' ? { stage } : {};
  const steps = saw('iterations', effort.iterations, 'number');
  const code = CODES[failure.why];
  const found: Finding[] = [];
  if (failure.why === 'open') return [refuse(call, code, { path: 'fixedBy' }, [steps])];
  if (failure.why === 'out-of-reach') {
    const path = failure.fixing === undefined ? {} : { path: `fixedBy.${failure.fixing}` };
    found.push(refuse(call, code, path, [...reached(job.task, failure), steps, where, ...tried]));
  } else {
    const phase = named('phase', failure.phase ?? 'vapour');
    found.push(
      refuse(call, code, at, [where, phase, saw('residual', failure.residual, 'number'), steps, ...tried]),
    );
  }
  const vapour = carriedShort(job.task);
  if (vapour) found.unshift(refuse(call, 'column/feed-vapour-above-top', { path: 'fixedBy' }, vapour));
  return [...feedsInTwoLiquids(call, job), ...feedOfOnePhase(call, job), ...found];
}

/** What was asked and what was reached instead, each in its own dimension. */
function reached(task: ColumnTask, { fixing, reached: have, way }: Failure): Evidence[] {
  const share = saw('way', way ?? 0, 'fraction');
  const x = fixing === undefined ? undefined : task.fixed[fixing];
  if (!x || have === undefined) return [share];
  const [wanted, dim] = ((): readonly [number, Evidence['dim']] => {
    switch (x.fix) {
      case 'flow':
      case 'reflux':
        return [x.flow.value, x.flow.basis === 'mole' ? 'molarFlow' : 'massFlow'];
      case 'purity':
      case 'recovery':
        return [x.value, 'fraction'];
      case 'temperature':
        return [x.value, 'temperature'];
      case 'duty':
        return [x.value, 'power'];
      default:
        return [x.value, 'number'];
    }
  })();
  return [saw('asked', wanted, dim), saw('reached', have, dim), share];
}

const CODES: Readonly<Record<Failure['why'], Finding['code']>> = {
  dries: 'column/dries',
  trivial: 'column/one-phase',
  'out-of-reach': 'column/out-of-reach',
  'no-convergence': 'column/not-found',
  open: 'column/not-settled',
};

/** Feeds that would part in two liquids: with one liquid only, what is condensed of them often has no state at all. */
const feedsInTwoLiquids = (call: Call<ColumnSettings>, { feedPorts }: ColumnJob): Finding[] =>
  feedPorts.flatMap((port) => {
    const other = call.in[port]!.hiddenLiquid;
    if (!other) return [];
    return [refuse(call, 'column/feed-in-two-liquids', { port }, [richestOf(other, call.model)])];
  });

/** What is fed has no two phases: with an end, none at the pressure of its stage; without ends, none when it is all mixed. */
function feedOfOnePhase(call: Call<ColumnSettings>, { task, present }: ColumnJob): Finding[] {
  const { n_mol_s, total_mol_s, H_W } = mixed(call.in, call.model.nc);
  const { place } = task.feeds[0]!;
  const P_Pa = task.P_Pa[place]!;
  if (task.top === 'none' && !task.reboiler) {
    const together = makeStream(call.model, n_mol_s, { P_Pa, H_W }, call.work);
    const flowing = together.state === 'solved' ? together.value.phases.filter((p) => p.fraction > 0) : [];
    if (flowing.length !== 1 || flowing[0]!.kind === 'dense') return [];
    return [refuse(call, 'column/feeds-one-phase', {}, [named('phase', flowing[0]!.kind)])];
  }
  const x = Float64Array.from(present, (i) => n_mol_s[i]! / total_mol_s);
  if (P_Pa < task.model.pseudoCritical(x).P_Pa) return [];
  for (const vapourFraction of [0.5, 0.9, 0.1]) {
    const made = makeStream(call.model, n_mol_s, { P_Pa, vapourFraction }, call.work);
    if (made.state === 'solved' || made.findings[0].code !== 'equilibrium/no-such-state') return [];
  }
  const where = nameOfPlace(call.settings, place);
  const seen = named('place', wordOf(where));
  return [refuse(call, 'column/one-phase', { path: 'pressure' }, [seen])];
}

/** A subcooling that no liquid distillate takes up changes nothing. */
function idleSubcooling({ unit, settings }: Call<ColumnSettings>): Finding[] {
  if (!settings.subcooling || settings.top.distillate === 'liquid') return [];
  return [{ code: 'column/setting-idle', weight: 'note', at: { unit, path: 'subcooling' }, evidence: [] }];
}

/** Reflux ratio and distillate that carry less over the top than the feeds bring as vapour. */
function carriedShort(task: ColumnTask): Evidence[] | undefined {
  const ratio = task.fixed.find((x) => x.fix === 'refluxRatio');
  const flow = task.fixed.find((x) => x.fix === 'flow' && x.product === 'top' && x.flow.basis === 'mole');
  if (ratio?.fix !== 'refluxRatio' || flow?.fix !== 'flow') return undefined;
  const carried = flow.flow.value * (1 + ratio.value);
  const fed = fedVapour(task);
  return fed > carried ? [saw('fed', fed, 'molarFlow'), saw('carried', carried, 'molarFlow')] : undefined;
}

function answer(
  call: Call<ColumnSettings>,
  job: ColumnJob,
  s: StageSystem,
  work: ColumnWork,
  end: ColumnEnd,
): Answer<ColumnResults> {
  const { out, condenser, reboiler, heat_W } = outletsOf(call, job, s, () => dutyOf(s, 'condenser'));
  const duties = {
    ...(condenser === undefined ? {} : { condenser }),
    ...(reboiler === undefined ? {} : { reboiler }),
  };
  const warm: Warm = { state: stateOf(s), present: job.present, shape: work.shape, fed_mol_s: s.feedTotal };
  return {
    out,
    heat_W,
    power_W: 0,
    results: resultsOf(call, job, s, duties),
    effort: { iterations: end.effort.iterations, residual: end.effort.residual },
    warm,
  };
}

function solve(call: Call<ColumnSettings>): Outcome<Answer<ColumnResults>> {
  const [first, ...more] = refusals(call);
  if (first) return noSolution(first, ...more);
  const read = jobOf(call);
  if (read.state !== 'solved') return noSolution(...read.findings);
  const job = read.value;
  const [wrong, ...others] = impossibleBy(job.task).map(({ code, fixing, draw, evidence: seen }) => {
    const at =
      fixing !== undefined
        ? { path: `fixedBy.${fixing}` }
        : draw !== undefined
          ? { port: job.drawPorts[draw]!, path: `sides.${job.drawPorts[draw]}` }
          : {};
    return refuse(call, code, at, seen);
  });
  if (wrong) return noSolution(wrong, ...others);
  const work = workOf(call, job.task);
  const end = solveColumn(job.task, warmState(call, job, work), work, call.work.alive);
  if (end.state !== 'solved') {
    const [why, ...rest] = reason(call, job, end);
    return noSolution(why!, ...rest);
  }
  const notes: Finding[] = bothDuties(call.settings)
    ? [{ code: 'column/both-duties', weight: 'note', at: { unit: call.unit, path: 'fixedBy' }, evidence: [] }]
    : [];
  notes.push(...idleSubcooling(call), ...severalAnswers(call, job, end.system, end.slope));
  return solved(answer(call, job, end.system, work, end), notes);
}

/** Equilibrium stages with or without ends. */
export const column: UnitKind<ColumnSettings, ColumnResults> = { solve, limits: columnLimits };
