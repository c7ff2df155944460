import type { StageSystem } from '../../column/system';
import { productFlow, weightsOf } from '../../column/targets';
import type { Fixing } from '../../column/types';
import { type Finding, named, saw } from '../../outcome';
import type { Call } from '../types';
import type { ColumnSettings } from './settings';
import { type ColumnJob, nameOfPlace } from './task';

type Purity = Extract<Fixing, { fix: 'purity' }>;

/** One chemical counts as lighter than another when its K is greater by this factor. */
const LIGHTER = 1.02;
/** Less than this share of the feed does not make a mixture of three. */
const LEAST_SHARE = 1e-3;

/** What holds the inside flows as a reflux ratio does, so that a purity beside it can be met twice. */
const HOLDS_FLOWS = new Set<Fixing['fix']>(['boilup', 'duty', 'reflux']);

/**
 * Which answer was found where what is fixed may be met more than once. With the reflux ratio (or boil-up, duty, reflux) held,
 * the share of a chemical between others in a product first rises and then falls as the product grows; a stage's temperature
 * first falls and then rises with the reflux, and the other way round.
 *
 * @param slope  with a reflux ratio: of the purity's or temperature's measure with the logarithm of the bottoms flow
 */
export function severalAnswers(
  call: Call<ColumnSettings>,
  job: ColumnJob,
  s: StageSystem,
  slope: number | undefined,
): Finding[] {
  const { fixed, draws } = job.task;
  if (draws.length > 0 || !job.task.reboiler || s.first === 0) return [];
  if (!fixed.some((x) => x.fix === 'refluxRatio')) return anotherPossible(call, job, s);
  if (slope === undefined) return [];
  const k = fixed.findIndex((x) => x.fix === 'purity' || x.fix === 'temperature');
  const x = fixed[k];
  if (x?.fix === 'temperature')
    return slope > 0 ? [fallingTemperature(call, s, k, x.place)] : anotherPossible(call, job, s);
  if (x?.fix !== 'purity' || !isBetween(s, x)) return [];
  // A main part is measured by what is not it; more bottoms is less distillate.
  const rises = (x.value <= 0.5 ? slope : -slope) * (x.product === 'bottoms' ? 1 : -1) > 0;
  const flow = totalOf(s, x.product === 'bottoms' ? 'bottoms' : 'top');
  return [
    {
      code: 'column/several-purities',
      weight: 'note',
      at: { unit: call.unit, path: `fixedBy.${k}` },
      evidence: [
        {
          name: 'chemical',
          value: x.value,
          dim: 'fraction',
          text: call.model.chemicals[job.present[x.chemical]!]!.id,
        },
        saw('flow', flow, 'molarFlow'),
        named('branch', rises ? 'smaller' : 'larger'),
        named('product', x.product === 'bottoms' ? 'bottoms' : 'distillate'),
      ],
    },
  ];
}

/** Enriched beyond the feed, though the product could hold nothing else of lighter (top) or heavier (bottoms) ones. */
function isBetween(s: StageSystem, x: Purity): boolean {
  const { n } = s;
  const fed = new Float64Array(n);
  for (let at = 0; at < s.f.length; at++) fed[at % n]! += s.f[at]!;
  const weight = weightsOf(s, x.basis);
  const all = fed.reduce((sum, f, i) => sum + f * weight[i]!, 0);
  if (x.value <= (fed[x.chemical]! * weight[x.chemical]!) / all) return false;
  const middle = Math.floor(s.places / 2) * n;
  const rising = (i: number): number => s.v[middle + i]! / s.l[middle + i]!;
  let lighter = 0;
  let heavier = 0;
  for (let i = 0; i < n; i++) {
    if (rising(i) > LIGHTER * rising(x.chemical)) lighter += fed[i]!;
    if (rising(i) * LIGHTER < rising(x.chemical)) heavier += fed[i]!;
  }
  const least = LEAST_SHARE * s.feedTotal;
  return x.product === 'bottoms' ? heavier > least : lighter > least;
}

/** No slope tells the branch here: the note says what was found, by the figures that the other answer would differ in. */
function anotherPossible(call: Call<ColumnSettings>, { task }: ColumnJob, s: StageSystem): Finding[] {
  const held = task.fixed.some((x) => HOLDS_FLOWS.has(x.fix));
  const k = task.fixed.findIndex(
    (x) => x.fix === 'temperature' || (held && x.fix === 'purity' && isBetween(s, x)),
  );
  if (k < 0) return [];
  const flow = totalOf(s, 'top');
  return [
    {
      code: 'column/another-possible',
      weight: 'note',
      at: { unit: call.unit, path: `fixedBy.${k}` },
      evidence: [
        named('of', task.fixed[k]!.fix === 'temperature' ? 'stage temperature' : 'purity'),
        saw('refluxRatio', s.L[0]! / flow, 'number'),
        saw('flow', flow, 'molarFlow'),
      ],
    },
  ];
}

function fallingTemperature(call: Call<ColumnSettings>, s: StageSystem, k: number, place: number): Finding {
  const at = nameOfPlace(call.settings, place);
  return {
    code: 'column/several-temperatures',
    weight: 'note',
    at: { unit: call.unit, path: `fixedBy.${k}` },
    evidence: [
      named('place', typeof at === 'number' ? `stage ${at}` : `the ${at}`),
      saw('flow', totalOf(s, 'top'), 'molarFlow'),
    ],
  };
}

function totalOf(s: StageSystem, product: 'top' | 'bottoms'): number {
  const flow = productFlow(s, product);
  let sum = 0;
  for (let i = 0; i < s.n; i++) sum += flow.at(i);
  return sum;
}
