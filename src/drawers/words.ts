import type { Assumption, LabelKey } from '../sketch/types';
import type { Refused } from '../store/commands';
import {
  capital,
  humanised,
  modelWord,
  sayEditRefusal,
  settingWord,
  optionWord as wordOfOption,
} from '../wording';
import { SENTENCES } from '../wording/codes';

export {
  capital,
  kindWord,
  mixtureRuleWord,
  modelWord,
  phaseWord,
  portWord,
  resultWord,
  settingWord,
} from '../wording';

/** Word of a choice; one that nobody named is shown by its own words. */
export function optionWord(kind: string, value: string): string {
  const word = wordOfOption(kind, value);
  return word === value && /^[a-z]+[A-Z]/.test(value) ? humanised(value) : word;
}

export const evidenceWord = (name: string): string => humanised(name);
export const refusedSentence = (refused: Refused): string => sayEditRefusal(refused);

const LABELS: Readonly<Partial<Record<LabelKey, string>>> = { volumeFlow: 'volume flow, actual' };
export const labelKeyWord = (key: LabelKey): string => LABELS[key] ?? humanised(key);

/** Choices of the model in words; what is shown for each value. */
const CHOICES: Readonly<Record<string, string>> = {
  'model.alpha': 'alpha function',
  'model.liquidH': 'liquid enthalpy',
  'model.liquidVolume': 'liquid volume',
  'model.vapour': 'vapour phase',
  'model.poynting': 'Poynting factor',
  'model.bankPairs': 'pairs from the bank',
  'model.pairs': 'pairs given in the sketch',
  'site.pressure': 'site pressure',
  'site.ambient': 'ambient temperature',
  'site.coolingWater': 'cooling water in',
  chemicals: 'chemical brought in',
};
const VALUES: Readonly<Record<string, string>> = {
  'psat-slope': 'from the slope of the vapour pressure',
  hvap: 'from the heat of vaporisation',
  corrected: 'corrected, for density only',
  cubic: 'the equation’s own',
  true: 'yes',
  false: 'no',
  '[]': 'none',
};

/** What an entry of the register is about, its value, and where it is changed. */
export function assumptionWords(assumption: Assumption, kind: string | undefined) {
  const { path, unitText } = assumption;
  return {
    what: CHOICES[path] ?? settingWord(kind ?? '', path),
    value: VALUES[unitText] ?? (kind === undefined ? unitText : optionWord(kind, unitText)),
    where: path.startsWith('site.') ? 'the site' : path === 'chemicals' ? 'the chemicals' : 'the model',
  };
}

const CHECKS = /^(stream|cooling|heating)\//;

/** Titles of the checks that were run for these codes, besides those that every stream gets. */
export function checkTitles(codes: readonly string[]): readonly string[] {
  const all = [...Object.keys(SENTENCES).filter((code) => code.startsWith('stream/')), ...codes];
  const titles = all.flatMap((code) => {
    const sentence = SENTENCES[code];
    return sentence && (CHECKS.test(code) || sentence.says.includes('{limit'))
      ? [capital(sentence.title)]
      : [];
  });
  return [...new Set(titles)];
}

/** "Peng–Robinson", and what is said of a model that this version does not solve. */
export const modelOption = (kind: string, isKnown: boolean): string =>
  isKnown ? modelWord(kind) : `${modelWord(kind)}, not available in this version`;
