import type { Finding } from '../../engine/outcome';
import type { ModelSpec } from '../../engine/thermo/types';
import { finding, word } from '../findings';
import { isObject, own } from '../json';
import type { Json, ModelChoice } from '../types';
import { MODEL_KINDS } from './modelKinds';
import type { AssumptionDraft } from './scope';

/** The choices of a model and what counts when nothing was chosen, first value first. */
const CHOICES = {
  alpha: ['1976', '1978'],
  liquidH: ['psat-slope', 'hvap'],
  liquidVolume: ['corrected', 'cubic'],
} as const;

/** Which choices mean something to which model. */
const CHOICES_OF: Readonly<Record<ModelSpec['kind'], readonly (keyof ModelChoice)[]>> = {
  'peng-robinson': ['alpha', 'liquidVolume', 'bankPairs', 'pairs'],
  raoult: ['vapour', 'poynting', 'liquidH', 'liquidVolume'],
};

const REASON = 'Not chosen in the sketch.';

/** A binary interaction parameter of the sketch: chemical ids and kij [-]. */
export interface GivenPair {
  readonly i: string;
  readonly j: string;
  readonly kij: number;
}

export interface ModelRead {
  /** Everything but the resolved pairs; undefined when the model cannot be used. */
  readonly spec: Omit<ModelSpec, 'pairs'> | undefined;
  readonly bankPairs: boolean;
  readonly pairs: readonly GivenPair[];
  readonly gaps: readonly Finding[];
  readonly notes: readonly Finding[];
  readonly assumptions: readonly AssumptionDraft[];
}

/** The model's kind and choices; what was not chosen is an assumption where the model looks at it. */
export function readModel(model: ModelChoice, ids: ReadonlySet<string>): ModelRead {
  const gaps: Finding[] = [];
  const notes: Finding[] = [];
  const assumptions: AssumptionDraft[] = [];
  const add = (...args: Parameters<typeof finding>): void => {
    gaps.push(finding(...args));
  };
  const kind = MODEL_KINDS.find((k) => k === model.kind);
  if (!kind) add('sketch/model-not-available', 'caution', { path: 'model.kind' }, word('kind', model.kind));
  const used = (key: keyof ModelChoice): boolean => kind !== undefined && CHOICES_OF[kind].includes(key);
  const assume = (key: keyof ModelChoice, value: string, unitText = value): void => {
    if (used(key)) assumptions.push({ path: `model.${key}`, value, unitText, reason: REASON });
  };

  const choose = <K extends keyof typeof CHOICES>(key: K): (typeof CHOICES)[K][number] => {
    const given = model[key];
    const values: readonly (typeof CHOICES)[K][number][] = CHOICES[key];
    const first = values[0] as (typeof CHOICES)[K][number];
    if (given === undefined) assume(key, first);
    const found = values.find((v) => v === given);
    if (given !== undefined && found === undefined && used(key))
      add(
        'sketch/unknown-option',
        'caution',
        { path: `model.${key}` },
        word('typed', String(given)),
        word('known', values.join(', ')),
      );
    return found ?? first;
  };
  const [alpha, liquidH, liquidVolume] = [choose('alpha'), choose('liquidH'), choose('liquidVolume')];
  if (model.vapour === undefined) assume('vapour', 'ideal');
  else if (used('vapour') && model.vapour !== 'ideal')
    add(
      'sketch/unknown-option',
      'caution',
      { path: 'model.vapour' },
      word('typed', model.vapour),
      word('known', 'ideal'),
    );
  if (model.poynting === undefined) assume('poynting', 'no', 'false');
  if (model.bankPairs === undefined) assume('bankPairs', 'yes', 'true');
  if (model.pairs === undefined) assume('pairs', 'none', '[]');
  const pairs = used('pairs') ? readPairs(model.pairs ?? [], ids, gaps, notes) : [];
  const spec = kind && { kind, alpha, liquidH, liquidVolume, poynting: model.poynting ?? false };
  return {
    spec: gaps.length > 0 ? undefined : spec,
    bankPairs: model.bankPairs ?? true,
    pairs,
    gaps,
    notes,
    assumptions,
  };
}

/** { i, j, kij } by chemical id, in either order. The last of two for the same pair counts, with a caution. */
function readPairs(
  pairs: readonly Json[],
  ids: ReadonlySet<string>,
  gaps: Finding[],
  notes: Finding[],
): readonly GivenPair[] {
  const read = new Map<string, GivenPair>();
  pairs.forEach((pair, k) => {
    const at = { path: `model.pairs.${k}` };
    const [i, j, kij] = isObject(pair) ? [own(pair, 'i'), own(pair, 'j'), own(pair, 'kij')] : [];
    if (typeof i !== 'string' || typeof j !== 'string' || typeof kij !== 'number' || i === j) {
      gaps.push(finding('sketch/pair-not-read', 'caution', at, word('wanted', 'i, j, kij')));
      return;
    }
    // A pair of chemicals that are not in the sketch (any more) does no harm and is kept.
    const stranger = [i, j].find((id) => !ids.has(id));
    if (stranger !== undefined) {
      notes.push(finding('sketch/pair-unused', 'note', at, word('chemical', stranger)));
      return;
    }
    const key = JSON.stringify([i, j].sort());
    if (read.has(key)) notes.push(finding('sketch/repeated-pair', 'caution', at, word('pair', `${i}, ${j}`)));
    read.set(key, { i, j, kij });
  });
  return [...read.values()];
}
