import { andList, capital, type Slots, type Words } from './slots';

const ASKED: readonly (readonly [name: string, words: string])[] = [
  ['temperature', 'a temperature of'],
  ['pressure', 'a pressure of'],
  ['vapourFraction', 'a vapour fraction of'],
  ['enthalpy', 'a molar enthalpy of'],
  ['entropy', 'a molar entropy of'],
];

/** "a pressure of 2.000 bar(a) and a vapour fraction of 0.5000"; empty when the finding does not tell. */
const asked = (s: Slots): string => {
  const given = ASKED.filter(([name]) => s.has(name)).map(([name, words]) => `${words} ${s.number(name)}`);
  return given.length > 0 ? andList(given) : 'the conditions given';
};

/** The ends of the search for a temperature; a test holds them to the flash. */
export const LEAST_T_K = 20;
export const MOST_T_K = 4000;

/** What a flash may say. */
export const EQUILIBRIUM_WORDS: Readonly<Record<string, Words>> = {
  'equilibrium/no-convergence': {
    title: 'The flash does not settle',
    sentence: (s) =>
      `No phase equilibrium was found for ${asked(s)}${
        s.has('evaluations') ? `, after ${s.number('evaluations')} evaluations` : ''
      }.`,
    next: () =>
      'Change one of the conditions a little; close to a critical point a state may be out of reach.',
  },
  'equilibrium/out-of-range': {
    title: 'Out of reach',
    sentence: (s) =>
      `What is asked for, ${asked(s)}, lies outside what is searched; the temperature may go from ${s.show(LEAST_T_K, 'temperature')} to ${s.show(MOST_T_K, 'temperature')}.`,
    next: (s) =>
      s.has('enthalpy') || s.has('entropy')
        ? 'Check the duty or the power against the flow: it may be far too large for this stream.'
        : 'Check the value and its unit.',
  },
  'equilibrium/no-such-state': {
    title: 'No such state',
    sentence: (s) => `There is no state with ${asked(s)}.`,
    next: (s) =>
      s.has('vapourFraction')
        ? `Choose a lower ${s.has('temperature') ? 'temperature' : 'pressure'}, where liquid and vapour exist side by side, or give another condition than the vapour fraction.`
        : 'Give another pair of conditions.',
  },
  'equilibrium/between-states': {
    title: 'Between two states',
    sentence: (s) => `The model jumps from one state to another and has none with ${asked(s)} in between.`,
    next: () => 'Give the temperature instead, or move the condition a little.',
  },
  'equilibrium/second-liquid': {
    title: 'Another liquid may form',
    sentence: (s) => {
      const where = s.has('temperature') ? `at ${s.number('temperature')} and ${s.number('pressure')} ` : '';
      return s.has('together')
        ? capital(
            `${where}the liquid parts into two, one of them mostly ${s.chemical()}; enthalpy and entropy are those of both liquids together, and the composition is that of the whole.`,
          )
        : capital(`${where}another liquid may form, mostly ${s.chemical()}; the numbers are for one liquid.`);
    },
    next: () => 'Do not rely on the liquid’s figures; a model with two liquids is needed.',
  },
  'equilibrium/several-states': {
    title: 'Several states',
    sentence: (s) => {
      const found = [
        ...(s.has('foundTemperature') ? [s.number('foundTemperature')] : []),
        ...(s.has('foundPressure') ? [s.number('foundPressure')] : []),
      ];
      const at = found.length > 0 ? `, at ${andList(found)},` : '';
      return `More than one state has ${asked(s)}; the one of low density${at} is taken.`;
    },
    next: () => 'Give temperature and pressure instead where another of them is meant.',
  },
  'equilibrium/no-entropy': {
    title: 'No standard entropy',
    sentence: (s) => {
      const names = s.chemicals();
      return names.length > 0
        ? `A state cannot be found by entropy, because the standard entropy of ${andList(names)} is not known.`
        : 'A state cannot be found by entropy, because a standard entropy is not known.';
    },
    next: () => 'Give another condition than the entropy, or bring the standard entropy with the chemical.',
  },
  'equilibrium/not-a-state': {
    title: 'Not a state',
    sentence: (s) => `No state can have ${asked(s)}.`,
    next: (s) =>
      s.has('vapourFraction')
        ? 'Give a vapour fraction from 0 to 1.'
        : 'Check the two conditions: each must be an ordinary number.',
  },
};
