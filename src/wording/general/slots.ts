import type { StreamId, UnitId } from '../../engine/ids';
import type { Evidence, Place } from '../../engine/outcome';
import {
  ABSENT,
  type Dimension,
  formatDecimals,
  formatSignificant,
  type MeasureSet,
  type Measures,
  show,
} from '../../quantity';
import { capital, humanised } from '../humanise';
import { OWN_WORDS, portWord, settingWord } from '../words';

export { kindWord, modelWord, propertyWord } from '../words';
export { capital, humanised, portWord };

/** What ids are called; without an answer the id itself is shown. */
export interface Names {
  tag?(unit: UnitId): string | undefined;
  kind?(unit: UnitId): string | undefined;
  number?(stream: StreamId): string | undefined;
  chemical?(id: string): string | undefined;
}

/** What a sentence may ask of a finding. Whatever is not there reads "–", never "undefined". */
export interface Slots {
  readonly at: Place;
  /** There is evidence of this name with a text that is not blank, or with a finite number. */
  has(name: string): boolean;
  /** The text of the evidence as it was given. */
  text(name: string): string;
  /** Texts of all evidence of this name. */
  all(name: string): readonly string[];
  /** A text of several words, "P, drop, ratio", taken apart. */
  list(name: string): readonly string[];
  /** The bare SI value; undefined when absent or a text. */
  value(name: string): number | undefined;
  /** The dimension of the evidence. */
  dim(name: string): Dimension | undefined;
  /** "3.500 bar(a)": number and unit in the measures asked for; whole pure numbers without decimals. */
  number(name: string): string;
  percent(name: string): string;
  show(si: number, dim: Dimension): string;
  /** Label of a setting by its path; without one, of the place. */
  setting(path?: string): string;
  /** "inlet 2", from the evidence or the place. */
  port(): string;
  stream(): string;
  chemical(name?: string): string;
  chemicals(name?: string): readonly string[];
}

/** The sentences of one code. `next` says what to do about it. */
export interface Words {
  readonly title: string;
  sentence(slots: Slots): string;
  next?(slots: Slots): string;
}

/** Reads a finding's evidence and place for its sentences. */
export function makeSlots(
  evidence: readonly Evidence[],
  at: Place,
  measures: Measures | MeasureSet,
  names: Names = {},
): Slots {
  const kind = (at.unit && names.kind?.(at.unit)) ?? '';
  const find = (name: string): Evidence | undefined => evidence.find((e) => e.name === name);
  const textOf = (name: string): string | undefined => {
    const text = find(name)?.text?.trim();
    return text === '' ? undefined : text;
  };
  const value = (name: string): number | undefined => {
    const seen = find(name);
    return seen && seen.text === undefined && Number.isFinite(seen.value) ? seen.value : undefined;
  };
  const shown = (si: number, dim: Dimension): string => {
    if (dim === 'number' && Number.isInteger(si)) return formatDecimals(si, 0);
    const { number, unit } = show(si, dim, measures);
    return unit === '' ? number : `${number} ${unit}`;
  };
  const called = (id: string): string => names.chemical?.(id) ?? id;
  const text = (name: string): string => textOf(name) ?? ABSENT;
  return {
    at,
    has: (name) => textOf(name) !== undefined || value(name) !== undefined,
    text,
    all: (name) => evidence.flatMap((e) => (e.name === name && e.text ? [e.text] : [])),
    list: (name) => textOf(name)?.split(', ') ?? [],
    value,
    dim: (name) => find(name)?.dim,
    number: (name) => {
      const si = value(name);
      return si === undefined ? text(name) : shown(si, find(name)?.dim ?? 'number');
    },
    percent: (name) => {
      const si = value(name);
      return si === undefined ? ABSENT : percentText(si);
    },
    show: shown,
    setting: (path = at.path) => (path ? settingLabel(kind, path, called) : 'settings'),
    port: () => {
      const port = textOf('port') ?? at.port;
      return port ? portWord(kind, port) : 'port';
    },
    stream: () => {
      const id = textOf('stream') ?? at.stream;
      return id === undefined ? ABSENT : (names.number?.(id as StreamId) ?? id);
    },
    chemical: (name = 'chemical') => called(textOf(name) ?? at.chemical ?? ABSENT),
    chemicals: (name = 'chemical') =>
      evidence.flatMap((e) => (e.name === name && e.text ? [called(e.text)] : [])),
  };
}

/** A share in per cent, with enough decimals to be told from 0 and from 100 %: 0.99995 is "99.995 %". */
export function percentText(share: number): string {
  if (Math.abs(share) < 0.1) return `${formatSignificant(share * 100, 3)} %`;
  const off = Math.abs(share * 100 - 100);
  const decimals = off > 1e-9 && off < 1 ? Math.min(9, Math.ceil(-Math.log10(off))) : 1;
  return `${formatDecimals(share * 100, decimals)} %`;
}

/** Labels of places outside a unit's settings, and of settings whose label beside a field makes no noun in a sentence. */
const PLACES: Readonly<Record<string, string>> = {
  'p.ratio': 'ratio of outlet to inlet pressure',
  subcooling: 'subcooling below the bubble point',
  superheat: 'superheat above the dew point',
  'site.pressure': 'site pressure',
  'site.ambient': 'ambient temperature of the site',
  'site.coolingWater': 'cooling water temperature of the site',
  'model.kind': 'thermodynamic model',
  'model.alpha': 'alpha function',
  'model.vapour': 'vapour phase of the model',
  'model.poynting': 'Poynting correction',
  'model.liquidH': 'way to liquid enthalpy',
  'model.liquidVolume': 'way to liquid volume',
  'model.bankPairs': 'use of the pairs in the bank',
  'model.pairs': 'pairs of the model',
  'display.labels': 'stream labels',
  chemicals: 'chemicals',
  'composition.parts': 'fractions by chemical',
  'composition.flows': 'flows by chemical',
  'composition.preset': 'ready-made air',
  'composition.basis': 'basis of the composition',
  'composition.relativeHumidity': 'relative humidity',
  parts: 'fractions by chemical',
  flows: 'flows by chemical',
  preset: 'ready-made air',
};
const OF_A_SHARE: Readonly<Record<string, string>> = {
  share: 'share',
  of: 'stream or feed that the share is of',
  basis: 'basis of the share',
  chemical: 'chemical of the share',
};
const COUNTED: Readonly<Record<string, (count: number) => string>> = {
  chemicals: (count) => `chemical ${count}`,
  'model.pairs': (count) => `pair ${count} of the model`,
};

/** Label of any path that a finding may carry, by the kind's own words where it lies in the settings. */
export function settingLabel(kind: string, path: string, chemical: (id: string) => string): string {
  const place = PLACES[path];
  if (place !== undefined) return place;
  const keys = path.split('.');
  const last = keys.at(-1) ?? path;
  const parent = keys.slice(0, -1).join('.');
  const counted = COUNTED[parent];
  if (counted !== undefined) return counted(Number(last) + 1);
  const own = keys[0] === 'chemicals' && keys[2] === 'own' ? OWN_WORDS[keys[3] ?? ''] : undefined;
  if (own !== undefined) return `${own} of chemical ${Number(keys[1]) + 1}`;
  if (keys[0] === 'limits') return `limit “${keys.slice(1).join('.')}”`;
  if (parent === 'composition.parts') return `fraction of ${chemical(last)}`;
  if (parent === 'composition.flows') return `flow of ${chemical(last)}`;
  const inShare = OF_A_SHARE[last];
  if (keys.length > 1 && inShare !== undefined && keys[0] !== 'composition') return inShare;
  if (parent === 'shares') return `share of ${portWord(kind, last)}`;
  return settingWord(kind, path);
}

/** "a", "a or b", "a, b or c". */
export const orList = (items: readonly string[]): string => joined(items, 'or');
export const andList = (items: readonly string[]): string => joined(items, 'and');

function joined(items: readonly string[], word: string): string {
  if (items.length < 2) return items[0] ?? ABSENT;
  return `${items.slice(0, -1).join(', ')} ${word} ${items.at(-1)}`;
}

const TYPES: Readonly<Record<string, string>> = {
  quantity: 'a number, with its unit where it has one',
  composition: 'a composition',
  object: 'a group of named values',
  list: 'a list',
  boolean: 'true or false',
  text: 'a text in quotation marks',
  number: 'a number',
  'whole number': 'a whole number',
  'whole number from 1': 'a whole number from 1 up',
  stage: 'the number of a stage, or the condenser or reboiler where the column has one',
  'pair of numbers': 'two numbers, [x, y]',
  'pair of unit id and port': 'a unit’s id and a port, ["u1", "out"]',
  JSON: 'plain data',
  null: 'null',
};
/** What a value is or should be, in words. */
export const typeWords = (type: string): string =>
  Object.hasOwn(TYPES, type) ? (TYPES[type] ?? type) : humanised(type);

const LONGEST = 40;
/** Something typed, in quotation marks and no longer than a line can bear. */
export function quoted(text: string): string {
  return `“${text.length > LONGEST ? `${text.slice(0, LONGEST)}…` : text}”`;
}

const COUNTS = ['no', 'one', 'two', 'three', 'four', 'five', 'six'];
/** "two" for 2; figures from 7 on. */
export const countWord = (count: number): string => COUNTS[count] ?? formatDecimals(count, 0);

/** A code that has no sentence yet, as words: "Sticks open." */
export const ownWords = (code: string): string => {
  const words = humanised(code).trim();
  return words === '' ? 'Something does not fit here.' : `${capital(words)}.`;
};
