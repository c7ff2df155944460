import type { StreamId, UnitId } from '../engine/ids';
import type { Evidence, Finding } from '../engine/outcome';
import { formatDecimals, type MeasureSet, type Measures, show, THIN_SPACE } from '../quantity';
import { SENTENCES } from './codes';
import { EQUILIBRIUM_WORDS } from './general/equilibrium';
import { SKETCH_WORDS } from './general/sketch';
import { makeSlots, type Names, type Words } from './general/slots';
import { capital, humanised } from './humanise';
import { basisWord, portWord, propertyWord, settingWord } from './words';

/** How a finding's ids are called, and in what it is measured. A name that is unknown is shown by its id. */
export interface SayContext extends Names {
  readonly measures: Measures | MeasureSet;
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

/** A pure number that is whole is a count and has no decimals: "18 of the pairs". */
function quantityText(seen: Evidence, measures: SayContext['measures']): string {
  if (seen.dim === 'number' && Number.isInteger(seen.value)) return formatDecimals(seen.value, 0);
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
  if (name === 'pair')
    return text
      .split(' + ')
      .map((id) => ctx.chemical?.(id) ?? id)
      .join(' + ');
  if (name === 'unit') return ctx.tag?.(text as UnitId) ?? text;
  if (name === 'stream') return ctx.number?.(text as StreamId) ?? text;
  if (name === 'port' || name === 'outlet') return portWord(kind, text);
  if (name === 'property' || name === 'lacks') return propertyWord(text);
  return text;
}

/** Fills the slots of one sentence. */
function filled(template: string, f: Finding, ctx: SayContext): string {
  const kind = (f.at.unit && ctx.kind?.(f.at.unit)) ?? '';
  return template.replace(/\{(\w+)(%|\.\.\.)?\}/g, (_, name: string, how?: string) => {
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

/** In running text a line may not end within a number: "281" above "300 kmol/h" reads as two. */
const unbroken = (text: string): string => text.replaceAll(THIN_SPACE, '\u202f');

/** What the document and a flash say. */
const WORDS: Readonly<Record<string, Words>> = { ...SKETCH_WORDS, ...EQUILIBRIUM_WORDS };

/** Title, sentence and next step of a code, wherever its words stand; nobody's code is shown by its own words. */
function wordsOf(f: Finding, ctx: SayContext): Pick<Said, 'title' | 'sentence' | 'next'> {
  if (Object.hasOwn(WORDS, f.code)) {
    const words = WORDS[f.code]!;
    const slots = makeSlots(f.evidence, f.at, ctx.measures, ctx);
    const next = words.next?.(slots);
    return { title: words.title, sentence: words.sentence(slots), ...(next ? { next } : {}) };
  }
  const sentence = Object.hasOwn(SENTENCES, f.code) ? SENTENCES[f.code] : undefined;
  if (!sentence) return { title: capital(humanised(f.code)), sentence: `${humanised(f.code)}.` };
  const next = sentence.next === undefined ? {} : { next: filled(sentence.next, f, ctx) };
  return { title: sentence.title, sentence: filled(sentence.says, f, ctx), ...next };
}

/**
 * A finding as people read it: title, sentence, next step, basis of its threshold, place. Numbers are shown in the measures
 * asked for.
 */
export function sayFinding(f: Finding, ctx: SayContext): Said {
  const { title, sentence, next } = wordsOf(f, ctx);
  const basis = f.evidence.find((e) => e.name === 'basis')?.text;
  return {
    title,
    sentence: unbroken(capital(sentence)),
    ...(next === undefined ? {} : { next: unbroken(next) }),
    ...(basis === undefined ? {} : { basis: basisWord(basis) }),
    where: whereOf(f, ctx),
  };
}
