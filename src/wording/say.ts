import type { StreamId, UnitId } from '../engine/ids';
import type { Evidence, Finding } from '../engine/outcome';
import { type MeasureSet, type Measures, show } from '../quantity';
import { SENTENCES } from './codes';
import { capital, humanised } from './humanise';
import { sayRefusal } from './refusals';
import { basisWord, portWord, propertyWord, settingWord } from './words';

/** How a finding's ids are called, and in what it is measured. A name that is unknown is shown by its id. */
export interface SayContext {
  readonly measures: Measures | MeasureSet;
  tag?(unit: UnitId): string | undefined;
  kind?(unit: UnitId): string | undefined;
  number?(stream: StreamId): string | undefined;
  chemical?(id: string): string | undefined;
}

export interface Said {
  readonly title: string;
  readonly sentence: string;
  readonly next?: string;
  readonly basis?: string;
  /** "V-101, stream 4": where it is; empty for the whole sketch. */
  readonly where: string;
}

const CHEMICALS = new Set(['chemical', 'first', 'second']);

function quantityText(seen: Evidence, measures: SayContext['measures']): string {
  const { number, unit } = show(seen.value, seen.dim, measures);
  return unit === '' ? number : `${number} ${unit}`;
}

function valueText(seen: Evidence, percent: boolean, kind: string, ctx: SayContext): string {
  const { name, text } = seen;
  if (text === undefined) {
    if (!percent) return quantityText(seen, ctx.measures);
    return `${show(seen.value * 100, 'number', ctx.measures, { significant: 3 }).number} %`;
  }
  if (CHEMICALS.has(name)) return ctx.chemical?.(text) ?? text;
  if (name === 'unit') return ctx.tag?.(text as UnitId) ?? text;
  if (name === 'stream') return ctx.number?.(text as StreamId) ?? text;
  if (name === 'port' || name === 'outlet') return portWord(kind, text);
  if (name === 'property' || name === 'lacks') return propertyWord(text);
  if (name === 'known' || name === 'given' || name === 'beside')
    return text
      .split(', ')
      .map((key) => settingWord(kind, key))
      .join(', ');
  return text;
}

/** Fills the slots of one sentence. */
function filled(template: string, f: Finding, ctx: SayContext): string {
  const kind = (f.at.unit && ctx.kind?.(f.at.unit)) ?? '';
  const text = (name: string): string | undefined => f.evidence.find((e) => e.name === name)?.text;
  return template.replace(/\{(\w+)(%|\.\.\.)?\}/g, (_, name: string, how?: string) => {
    if (name === 'why') return sayRefusal(text('why') ?? '', text('found'), text('near'));
    const all = f.evidence.filter((e) => e.name === name);
    if (all.length > 0)
      return (how === '...' ? all : all.slice(0, 1))
        .map((e) => valueText(e, how === '%', kind, ctx))
        .join(', ');
    if (name === 'setting') return f.at.path === undefined ? 'a value' : settingWord(kind, f.at.path);
    if (name === 'port' && f.at.port !== undefined) return portWord(kind, f.at.port);
    if (name === 'stream' && f.at.stream !== undefined) return ctx.number?.(f.at.stream) ?? f.at.stream;
    if (name === 'chemical' && f.at.chemical !== undefined)
      return ctx.chemical?.(f.at.chemical) ?? f.at.chemical;
    return '–';
  });
}

function whereOf({ at }: Finding, ctx: SayContext): string {
  const unit = at.unit && (ctx.tag?.(at.unit) ?? at.unit);
  const stream = at.stream && `stream ${ctx.number?.(at.stream) ?? at.stream}`;
  return [unit, stream].filter(Boolean).join(', ');
}

/**
 * A finding as people read it: title, sentence, next step, basis of its threshold, place. Numbers are shown in the measures
 * asked for. A code that nobody wrote a sentence for is shown by its own words.
 */
export function sayFinding(f: Finding, ctx: SayContext): Said {
  const sentence = Object.hasOwn(SENTENCES, f.code) ? SENTENCES[f.code] : undefined;
  const basis = f.evidence.find((e) => e.name === 'basis')?.text;
  return {
    title: sentence?.title ?? capital(humanised(f.code)),
    sentence: capital(sentence ? filled(sentence.says, f, ctx) : `${humanised(f.code)}.`),
    ...(sentence?.next === undefined ? {} : { next: filled(sentence.next, f, ctx) }),
    ...(basis === undefined ? {} : { basis: basisWord(basis) }),
    where: whereOf(f, ctx),
  };
}
