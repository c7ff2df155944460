import { capital, humanised } from './humanise';
import { KIND_WORDS } from './kinds';

const wordsOf = (kind: string) => (Object.hasOwn(KIND_WORDS, kind) ? KIND_WORDS[kind] : undefined);

/** "flash drum" for 'drum'; a kind that is called by its service ("fan") goes by that. */
export function kindWord(kind: string, service?: unknown): string {
  const words = wordsOf(kind);
  const own = typeof service === 'string' ? words?.options?.[service] : undefined;
  return own ?? words?.name ?? humanised(kind);
}

/** One line on what a kind does; empty when nobody wrote one. */
export const kindAbout = (kind: string): string => wordsOf(kind)?.about ?? '';

/** "inlet 2" for 'in2'. */
export function portWord(kind: string, port: string): string {
  const ports = wordsOf(kind)?.ports ?? { in: 'inlet', out: 'outlet' };
  if (ports[port] !== undefined) return ports[port];
  const [, stem = port, number = ''] = /^(.*?)(\d*)$/.exec(port) ?? [];
  return number !== '' && ports[stem] !== undefined ? `${ports[stem]} ${number}` : humanised(port);
}

/** What a chemical of one's own is made of, by key in the file. */
export const OWN_WORDS: Readonly<Record<string, string>> = {
  MW: 'molar mass',
  Tc: 'critical temperature',
  Pc: 'critical pressure',
  omega: 'acentric factor',
  Hf: 'enthalpy of formation',
  S0: 'standard entropy',
  Cp: 'ideal-gas heat capacity',
  Psat: 'vapour pressure',
  Hvap: 'heat of vaporisation',
  rhoL: 'liquid density',
  cpL: 'liquid heat capacity',
};

/** Labels of settings that mean the same wherever they stand; the path's end decides. */
const SETTINGS: Readonly<Record<string, string>> = {
  'p.P': 'outlet pressure',
  'p.drop': 'pressure drop',
  'p.ratio': 'outlet to inlet pressure',
  T: 'temperature',
  P: 'pressure',
  p: 'outlet pressure',
  h: 'heat',
  drop: 'pressure drop',
  ratio: 'pressure ratio',
  ...OWN_WORDS,
};

/** Label of a setting by its path inside `settings`: the kind's own, else a common one, else its key's words. */
export function settingWord(kind: string, path: string): string {
  const own = wordsOf(kind)?.settings;
  if (own?.[path] !== undefined) return own[path];
  const keys = path.split('.');
  const last = keys.at(-1) ?? path;
  const port =
    /^(shares|feeds|sides)$/.test(keys[0] ?? '') && keys.length === 2 ? portWord(kind, last) : undefined;
  return SETTINGS[path] ?? port ?? SETTINGS[last] ?? humanised(last);
}

/** Label of a result by its key. */
export const resultWord = (kind: string, key: string): string =>
  wordsOf(kind)?.results?.[key] ?? humanised(key);

/** Word of a choice. */
export const optionWord = (kind: string, value: string): string => wordsOf(kind)?.options?.[value] ?? value;

const STATES: Readonly<Record<string, string>> = {
  solved: 'solved',
  'needs-value': 'needs a value',
  waiting: 'waiting',
  'no-solution': 'no solution',
  'out-of-date': 'out of date',
};
export const stateWord = (state: string): string => STATES[state] ?? humanised(state);

const WEIGHTS: Readonly<Record<string, string>> = {
  note: 'note',
  caution: 'caution',
  'beyond-limit': 'beyond limit',
};
export const weightWord = (weight: string): string => WEIGHTS[weight] ?? humanised(weight);

const PHASES: Readonly<Record<string, string>> = {
  vapour: 'vapour',
  liquid: 'liquid',
  liquid2: 'second liquid',
  dense: 'dense phase',
};
export const phaseWord = (kind: string): string => PHASES[kind] ?? humanised(kind);

const RULES: Readonly<Record<string, string>> = {
  'viscosity/wilke': 'Wilke’s rule for gases at low pressure',
  'viscosity/log-average': 'mean of the logarithms by mole (Grunberg and Nissan without interaction)',
};
/** The mixture rule behind a viscosity. */
export const mixtureRuleWord = (key: string): string => RULES[key] ?? humanised(key);

const BASES: Readonly<Record<string, string>> = {
  'common-practice': 'common practice',
  balance: 'follows from the balance',
  'phase-stability': 'phase stability (tangent plane of the Gibbs energy)',
  'melting-points': 'melting points of the pure chemicals',
  'table-range': 'the range stated with the correlation',
  'own-rule': 'a rule of this program',
};
/** What a threshold rests on. */
export const basisWord = (key: string): string => BASES[key] ?? humanised(key);

const PROPERTIES: Readonly<Record<string, string>> = {
  ideal_gas_cp: 'ideal-gas heat capacity',
  vapor_pressure: 'vapour pressure',
  enthalpy_of_vaporization: 'heat of vaporisation',
  liquid_density: 'liquid density',
  liquid_cp: 'liquid heat capacity',
  Tc_K: 'critical temperature',
  Pc_Pa: 'critical pressure',
  omega: 'acentric factor',
};
/** A property of a chemical by its key in the data. */
export const propertyWord = (key: string): string => PROPERTIES[key] ?? humanised(key);

const MODELS: Readonly<Record<string, string>> = {
  'peng-robinson': 'Peng–Robinson',
  'soave-redlich-kwong': 'Soave–Redlich–Kwong',
  raoult: 'Raoult’s law with ideal gas',
  nrtl: 'NRTL',
  wilson: 'Wilson',
  uniquac: 'UNIQUAC',
  unifac: 'UNIFAC',
  'unifac-dortmund': 'UNIFAC (Dortmund)',
  steam: 'steam (IAPWS-IF97)',
};
/** Published name of a thermodynamic model. */
export const modelWord = (kind: string): string => MODELS[kind] ?? capital(humanised(kind));
