import { type Dimension, suggestedUnits } from '../../quantity';
import { CORRELATION_WORDS } from './correlation';
import { sayQuantityRefusal } from './quantity';
import {
  andList,
  capital,
  countWord,
  kindWord,
  modelWord,
  orList,
  propertyWord,
  quoted,
  type Slots,
  typeWords,
  type Words,
} from './slots';

/** Labels of keys that lie under the place of the finding. */
const inside = (s: Slots, keys: readonly string[]): readonly string[] =>
  keys.map((key) => s.setting(s.at.path ? `${s.at.path}.${key}` : key));
/** Labels of keys that lie beside the place of the finding. */
const beside = (s: Slots, keys: readonly string[]): readonly string[] => {
  const parent = s.at.path?.split('.').slice(0, -1).join('.') ?? '';
  return keys.map((key) => s.setting(parent === '' ? key : `${parent}.${key}`));
};
/** "the vapour outlet", "outlet 2". */
const thePort = (s: Slots): string => (/\d$/.test(s.port()) ? s.port() : `the ${s.port()}`);
const typed = (s: Slots): string => (s.has('typed') ? ` ${quoted(s.text('typed'))}` : '');
const COMPOSITION = /(^|\.)composition$/;
/** What may be chosen: the ways to give a composition are settings, everything else is a word of the file. */
const choices = (s: Slots): readonly string[] =>
  COMPOSITION.test(s.at.path ?? '') ? inside(s, s.list('known')) : s.list('known').map(quoted);

/** Which of the keys are still open, and how many are wanted. */
function open(s: Slots): {
  readonly words: string;
  readonly missing: number;
  readonly given: readonly string[];
} {
  const given = s.list('given');
  const left = s.list('known').filter((key) => !given.includes(key));
  const missing = Math.max(1, (s.value('wanted') ?? 1) - given.length);
  return { words: orList(inside(s, left)), missing, given: inside(s, given) };
}

const refusal = (s: Slots) =>
  sayQuantityRefusal({
    code: s.has('why') ? s.text('why') : 'quantity/not-a-number',
    found: s.has('found') ? s.text('found') : '',
    fits: s.list('fits'),
    ...(s.has('near') ? { near: s.text('near') } : {}),
  });

function unitsFor(s: Slots, wanted: Dimension | undefined): string {
  if (wanted === 'fraction') return `Type the ${s.setting()}, such as 0.3 or 30 %.`;
  const units = /(^|\.)flow$/.test(s.at.path ?? '')
    ? ['kmol/h', 'kg/h', 'Nm3/h']
    : wanted === undefined
      ? []
      : suggestedUnits(wanted).slice(0, 3);
  return units.length > 0
    ? `Type the ${s.setting()} with its unit: ${orList(units)}.`
    : `Type the ${s.setting()}.`;
}

/** What the document and its compile step may say. */
export const SKETCH_WORDS: Readonly<Record<string, Words>> = {
  // something is missing
  'sketch/needs-value': {
    title: 'Needs a value',
    sentence: (s) => `Needs a value: ${s.setting()}.`,
    next: (s) => (s.has('known') ? `Choose ${orList(choices(s))}.` : unitsFor(s, s.dim('wanted'))),
  },
  'sketch/needs-one-of': {
    title: 'Needs a value',
    sentence: (s) => {
      const { words, missing, given } = open(s);
      if (given.length > 0)
        return `Needs ${countWord(missing)} more ${missing === 1 ? 'value' : 'values'} beside the ${andList(given)}: ${words}.`;
      return missing === 1 ? `Needs a value: ${words}.` : `Needs ${countWord(missing)} values: ${words}.`;
    },
    next: (s) => `Give ${countWord(open(s).missing)} of them and leave the others empty.`,
  },
  'sketch/needs-inlet': {
    title: 'Needs a stream',
    sentence: (s) => `No stream enters at ${thePort(s)}.`,
    next: (s) => `Draw a stream to ${thePort(s)}.`,
  },
  'sketch/needs-outlet': {
    title: 'Needs a stream',
    sentence: (s) => `No stream leaves at ${thePort(s)}.`,
    next: (s) => `Draw a stream from ${thePort(s)}.`,
  },
  'sketch/needs-source': {
    title: 'Needs a source',
    sentence: (s) => `Stream ${s.stream()} at ${thePort(s)} comes from nowhere.`,
    next: () => 'Draw its start to a feed or to the outlet of a unit.',
  },
  'sketch/needs-site-pressure': {
    title: 'Needs the site pressure',
    sentence: (s) =>
      `The ${s.setting()} is a gauge pressure, and the site pressure that it counts from cannot be read.`,
    next: () => 'Correct the site pressure, or give this one as absolute, in bar(a).',
  },
  'sketch/no-chemicals': {
    title: 'No chemicals',
    sentence: () => 'The sketch has no chemicals yet, so nothing can be solved.',
    next: () => 'Choose the chemicals from the bank.',
  },
  // something does not fit
  'sketch/wrong-type': {
    title: 'Wrong sort of value',
    sentence: (s) => `The ${s.setting()} must be ${typeWords(s.text('wanted'))}.`,
    next: (s) => `Give the ${s.setting()} again.`,
  },
  'sketch/not-a-quantity': {
    title: 'Cannot be read',
    sentence: (s) => `The ${s.setting()}${typed(s)} cannot be used. ${refusal(s).sentence}`,
    next: (s) => refusal(s).fits,
  },
  'sketch/below-minimum': {
    title: 'Too small',
    sentence: (s) =>
      s.has('minimum')
        ? `The ${s.setting()} is ${s.number('value')} and may not be below ${s.number('minimum')}.`
        : `The ${s.setting()}${typed(s)} must be above zero absolute.`,
    next: (s) => (s.has('minimum') ? `Give ${s.number('minimum')} or more.` : 'Give a larger value.'),
  },
  'sketch/above-maximum': {
    title: 'Too large',
    sentence: (s) =>
      `The ${s.setting()} is ${s.number('value')} and may not be above ${s.number('maximum')}.`,
    next: (s) => `Give ${s.number('maximum')} or less.`,
  },
  'sketch/too-many': {
    title: 'Too many',
    sentence: (s) => {
      const most = countWord(s.value('wanted') ?? 1);
      if (s.has('port')) return `More streams are at ${thePort(s)} than fit: there is room for ${most}.`;
      if (s.value('given') !== undefined)
        return `The ${s.setting()} has ${s.number('given')} entries and may have ${most} at most.`;
      return `${capital(andList(inside(s, s.list('given'))))} are given, and only ${most} of them can count.`;
    },
    next: (s) =>
      s.has('port')
        ? 'Take a stream off, or bring streams together in a join.'
        : s.value('given') !== undefined
          ? 'Remove entries.'
          : `Keep ${countWord(s.value('wanted') ?? 1)} and clear the others.`,
  },
  'sketch/too-few': {
    title: 'Too few',
    sentence: (s) =>
      `In the ${s.setting()} ${s.value('given') === 0 ? 'nothing stands' : `only ${s.number('given')} stand`}, and it takes at least ${countWord(s.value('wanted') ?? 1)}.`,
    next: () => 'Add what is missing.',
  },
  'sketch/not-together': {
    title: 'Not together',
    sentence: (s) =>
      s.has('given')
        ? `The ${andList(inside(s, s.list('given')))} cannot be given together.`
        : `The ${s.setting()} cannot be given together with the ${andList(
            beside(
              s,
              s.list('known').filter((key) => key !== 'basis'),
            ),
          )}.`,
    next: (s) => (s.has('given') ? 'Clear one of the two.' : `Clear the ${s.setting()}, or the others.`),
  },
  'sketch/without-meaning': {
    title: 'Without meaning here',
    sentence: (s) =>
      /relativeHumidity$/.test(s.at.path ?? '')
        ? `The relative humidity has no meaning for ${quoted(s.text('beside'))}.`
        : `The ${s.setting()} has no meaning here: it is already settled by the ${andList(s.list('beside').map((path) => s.setting(path)))}.`,
    next: (s) => `Clear the ${s.setting()}.`,
  },
  'sketch/unknown-setting': {
    title: 'Unknown setting',
    sentence: (s) =>
      `There is no setting ${quoted(s.at.path?.split('.').at(-1) ?? '')} here${
        s.has('known') ? `; what can be set is ${andList(s.list('known').map(quoted))}` : ''
      }.`,
    next: () => 'Remove it, or correct its name.',
  },
  'sketch/unknown-option': {
    title: 'Unknown choice',
    sentence: (s) =>
      s.has('typed')
        ? `${quoted(s.text('typed'))} is no choice for the ${s.setting()}.`
        : `The ${s.setting()} cannot be chosen like this.`,
    next: (s) => `Choose ${orList(s.list('known').map(quoted))}.`,
  },
  'sketch/unknown-chemical': {
    title: 'Unknown chemical',
    sentence: (s) => {
      const asks = s.setting().includes(s.chemical()) ? '' : ` (${s.setting()})`;
      return `${quoted(s.chemical())} is not among the chemicals${asks}.`;
    },
    next: (s) => `Add ${s.chemical()} to the chemicals, or take it out here.`,
  },
  'sketch/unknown-stream': {
    title: 'Unknown stream',
    sentence: (s) => `The ${s.setting()} refers to a stream that is not on the sheet.`,
    next: () => 'Choose a stream that is there.',
  },
  'sketch/unknown-port': {
    title: 'Unknown port',
    sentence: (s) => {
      const port = s.has('port') ? s.text('port') : 'What is named';
      const where = s.setting().includes(port) ? '' : ` (${s.setting()})`;
      return `${s.has('port') ? quoted(port) : port} is no port of this unit that could stand here${where}.`;
    },
    next: () => 'Choose one of the ports that the unit shows.',
  },
  'sketch/negative-part': {
    title: 'Negative fraction',
    sentence: (s) =>
      `The ${s.setting()} is ${s.percent('part')}, and nothing can be present in less than none.`,
    next: () => 'Give zero or more.',
  },
  'sketch/parts-sum': {
    title: 'Does not add up',
    sentence: (s) => `The fractions add up to ${s.percent('sum')} and should make 100 %.`,
    next: () =>
      'Correct the fractions. This far off they are not scaled by themselves; if their proportions are right, have what was typed scaled to 100 %.',
  },
  'sketch/parts-sum-near': {
    title: 'Does not quite add up',
    sentence: (s) =>
      `The fractions add up to ${s.percent('sum')}, close to 100 % but further off than rounding.`,
    next: () => 'Correct them, or have them scaled to 100 %.',
  },
  'sketch/chemical-not-in-bank': {
    title: 'Not in the bank',
    sentence: (s) =>
      s.has('chemical') || s.at.chemical
        ? `${capital(s.chemical())} is not in the bank of chemicals.`
        : `The ${s.setting()} needs data that the bank of chemicals does not have.`,
    next: () => 'Choose another chemical, or bring its data as an own chemical.',
  },
  'sketch/chemical-lacks': {
    title: 'Data missing',
    sentence: (s) =>
      `The thermodynamic model needs the ${propertyWord(s.text('lacks'))} of ${s.chemical()}, which is not known.`,
    next: () => 'Choose another model, or bring the data with an own chemical.',
  },
  'sketch/correlation-not-usable': CORRELATION_WORDS,
  'sketch/formula-not-read': {
    title: 'Formula not read',
    sentence: (s) =>
      `The formula${typed(s)} of ${s.chemical()} cannot be read, so the balance of elements leaves it out.`,
    next: () => 'Write symbols and numbers only, as in C2H6O.',
  },
  'sketch/pair-not-read': {
    title: 'Pair not read',
    sentence: (s) => `${capital(s.setting())} cannot be read: it needs two different chemicals and a number.`,
    next: (s) =>
      `Give it as ${andList((s.has('wanted') ? s.list('wanted') : ['i', 'j', 'kij']).map(quoted))}.`,
  },
  'sketch/gauge-at-site': {
    title: 'Gauge pressure at the site',
    sentence: (s) => `The site pressure${typed(s)} is a gauge pressure, which would count from itself.`,
    next: () => 'Give it as an absolute pressure, such as 1.013 bar(a).',
  },
  'sketch/unknown-limit': {
    title: 'Unknown limit',
    sentence: (s) =>
      `A threshold is given for ${s.has('code') ? quoted(s.text('code')) : 'something'}, which is no limit of this version; it has no effect.`,
    next: () => 'Remove it, or correct its name.',
  },
  // not in this version
  'sketch/kind-not-available': {
    title: 'Not available in this version',
    sentence: (s) =>
      `The kind of unit ${quoted(kindWord(s.text('kind')))} is not available in this version; the unit is kept.`,
    next: () => 'Put another unit in its place, or open the sketch with a later version.',
  },
  'sketch/model-not-available': {
    title: 'Not available in this version',
    sentence: (s) =>
      `The thermodynamic model ${quoted(modelWord(s.text('kind')))} is not available in this version; the choice is kept, and nothing is solved.`,
    next: () => 'Choose another thermodynamic model.',
  },
  // noted
  'sketch/parts-normalised': {
    title: 'Scaled to 100 %',
    sentence: (s) => `The fractions add up to ${s.percent('sum')} and are scaled to 100 % for the solution.`,
    next: () => 'Nothing need be done; correct the fractions if another sum was meant.',
  },
  'sketch/no-standard-entropy': {
    title: 'No standard entropy',
    sentence: (s) =>
      `The standard entropy of ${s.chemical()} is not known, so no entropy is shown for a stream that holds it, and no state with it can be given or found by entropy.`,
    next: () => 'Bring the standard entropy with the chemical where entropy is wanted.',
  },
  'sketch/loose-end': {
    title: 'Loose end',
    sentence: (s) => `Stream ${s.stream()} leads to no unit and leaves the sketch there.`,
    next: () => 'Draw it on to a unit, or end it in a product.',
  },
  'sketch/setting-of-unused-port': {
    title: 'Setting without a stream',
    sentence: (s) => `A value is given for ${thePort(s)}, where there is no stream; it has no effect.`,
    next: (s) => `Draw a stream to ${thePort(s)}, or clear the value.`,
  },
  'sketch/migrated': {
    title: 'Older file',
    sentence: (s) =>
      `The file is of an earlier version and was brought up to date${
        s.has('what') ? `: ${s.text('what').replace(/\.$/, '')}` : ''
      }.`,
    next: () => 'Save the sketch to keep it in the newer form.',
  },
  'sketch/stream-added': {
    title: 'Stream added',
    sentence: (s) =>
      `Stream ${s.has('number') ? s.text('number') : s.stream()} was added at an outlet that always has one.`,
    next: () => 'Draw it on to a unit, or leave it as a loose end.',
  },
  'sketch/stream-without-ends': {
    title: 'Stream without ends',
    sentence: (s) => `Stream ${s.stream()} touches no unit.`,
    next: () => 'Connect it, or delete it.',
  },
  'sketch/label-not-available': {
    title: 'Label not available',
    sentence: (s) =>
      `The stream label${s.has('label') ? ` ${quoted(s.text('label'))}` : ''} is not available in this version and is not shown.`,
    next: () => 'Choose other labels for the streams.',
  },
  'sketch/repeated-pair': {
    title: 'Pair given twice',
    sentence: (s) => `The pair ${andList(s.list('pair'))} is given more than once; the last one counts.`,
    next: () => 'Delete the others.',
  },
  'sketch/pair-unused': {
    title: 'Pair not used',
    sentence: (s) =>
      `A pair of the model names ${s.chemical()}, which is not among the chemicals; it has no effect.`,
    next: (s) => `Add ${s.chemical()} to the chemicals, or delete the pair.`,
  },
  'sketch/parts-removed': {
    title: 'Values removed',
    sentence: (s) =>
      `A chemical was removed, and with it the ${s.setting()}${s.has('tag') ? ` at ${s.text('tag')}` : ''}.`,
    next: () => 'Check what is left there, or undo.',
  },
  'sketch/reference-lost': {
    title: 'Value left out',
    sentence: (s) =>
      `The ${s.setting()}${s.has('tag') ? ` of ${s.text('tag')}` : ''} was given as a share of a stream that did not come along.`,
    next: () => 'Give the value anew.',
  },
  'sketch/chemical-differs': {
    title: 'Another chemical of this name',
    sentence: (s) =>
      `${s.chemical()} is another chemical here than where the units come from; the one of this sketch is used.`,
    next: (s) => `Check the data of ${s.chemical()}.`,
  },
};
