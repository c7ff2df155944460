import type { Sentence } from '../types';

/** What the document and its compile step have to say. */
export const SKETCH_SENTENCES: Readonly<Record<string, Sentence>> = {
  'sketch/needs-value': {
    title: 'Needs a value',
    says: 'Needs a value: {setting}.',
    next: 'Type it in the drawer.',
  },
  'sketch/needs-one-of': {
    title: 'Needs a value',
    says: 'Needs {wanted} of: {known}.',
    next: 'Choose and type in the drawer.',
  },
  'sketch/needs-inlet': {
    title: 'Needs an inlet',
    says: 'Nothing comes in at the {port}.',
    next: 'Draw a stream to it.',
  },
  'sketch/needs-outlet': {
    title: 'Needs an outlet',
    says: 'Nothing leaves at the {port}.',
    next: 'Draw a stream from it.',
  },
  'sketch/needs-source': {
    title: 'A stream from nowhere',
    says: 'Stream {stream} at the {port} comes from no unit.',
    next: 'Draw its start to a feed or to an outlet.',
  },
  'sketch/needs-site-pressure': {
    title: 'Needs the site pressure',
    says: '{setting} is given as a gauge pressure, and the site pressure cannot be read.',
    next: 'Give the site pressure as an absolute pressure.',
  },
  'sketch/no-chemicals': {
    title: 'No chemicals',
    says: 'The sketch has no chemicals.',
    next: 'Choose some from the bank.',
  },
  'sketch/wrong-type': {
    title: 'Not readable',
    says: '{setting} should be: {wanted}.',
    next: 'Set it anew in the drawer.',
  },
  'sketch/not-a-quantity': {
    title: 'Not readable',
    says: '{setting}: “{typed}” is not taken. {why}',
    next: 'It could be in: {fits}.',
  },
  'sketch/below-minimum': {
    title: 'Too small',
    says: '{setting} is {value}, below {minimum}.',
    next: 'Give a larger value.',
  },
  'sketch/above-maximum': {
    title: 'Too large',
    says: '{setting} is {value}, above {maximum}.',
    next: 'Give a smaller value.',
  },
  'sketch/too-many': {
    title: 'Too many',
    says: 'More is given than the {wanted} allowed: {given}.',
    next: 'Clear what is not meant.',
  },
  'sketch/too-few': {
    title: 'Too few',
    says: '{setting} has {given} entries and needs {wanted}.',
    next: 'Add what is missing.',
  },
  'sketch/not-together': {
    title: 'Not together',
    says: 'These do not go together: {given}.',
    next: 'Clear one of them.',
  },
  'sketch/without-meaning': {
    title: 'Without meaning here',
    says: '{setting} has no meaning beside {beside}.',
    next: 'Clear it.',
  },
  'sketch/unknown-setting': {
    title: 'Unknown setting',
    says: '{setting} is not a setting here.',
    next: 'Known are: {known}.',
  },
  'sketch/unknown-option': {
    title: 'Unknown choice',
    says: '{setting}: “{typed}” is no choice here.',
    next: 'Known are: {known}.',
  },
  'sketch/unknown-chemical': {
    title: 'Unknown chemical',
    says: '{chemical} is not among the chemicals of the sketch.',
    next: 'Add it, or clear the entry.',
  },
  'sketch/unknown-stream': {
    title: 'Unknown stream',
    says: '{setting} refers to a stream that is not on the sheet.',
    next: 'Name another stream.',
  },
  'sketch/unknown-port': {
    title: 'Unknown port',
    says: '{port} is not a port here.',
    next: 'Choose a port that has a stream.',
  },
  'sketch/negative-part': {
    title: 'Part below zero',
    says: 'A part of the composition is {part%}.',
    next: 'Give parts of zero or above.',
  },
  'sketch/parts-sum': {
    title: 'Parts do not add up',
    says: 'The parts add up to {sum%}.',
    next: 'Correct them, or give component flows instead.',
  },
  'sketch/parts-sum-near': {
    title: 'Parts nearly add up',
    says: 'The parts add up to {sum%}.',
    next: 'Correct one of them, or let them be scaled to 100 %.',
  },
  'sketch/chemical-not-in-bank': {
    title: 'Not in the bank',
    says: '{chemical} is not in the bank.',
    next: 'Choose another, or bring it as a chemical of your own.',
  },
  'sketch/chemical-lacks': {
    title: 'Data missing',
    says: '{chemical} lacks the {lacks} that the model needs.',
    next: 'Choose another model, or bring the data.',
  },
  'sketch/formula-not-read': {
    title: 'Formula not read',
    says: 'The formula “{typed}” cannot be read; element closure is not claimed.',
    next: 'Write it like C2H6O.',
  },
  'sketch/pair-not-read': {
    title: 'Pair not read',
    says: 'A pair of the model cannot be read.',
    next: 'It needs: {wanted}.',
  },
  'sketch/pair-unused': {
    title: 'Pair not used',
    says: 'A pair names {chemical}, which is not among the chemicals.',
    next: 'Add the chemical, or remove the pair.',
  },
  'sketch/repeated-pair': {
    title: 'Pair given twice',
    says: 'The pair {pair} is given more than once; the first counts.',
    next: 'Remove one.',
  },
  'sketch/gauge-at-site': {
    title: 'Gauge pressure at the site',
    says: 'The site pressure is given as “{typed}”, and a gauge pressure is measured from it.',
    next: 'Give it as an absolute pressure.',
  },
  'sketch/unknown-limit': {
    title: 'Unknown limit',
    says: 'A threshold is given for {code}, which is no limit here.',
    next: 'Remove it.',
  },
  'sketch/kind-not-available': {
    title: 'Not available',
    says: 'The kind “{kind}” is not available in this version; the unit is kept.',
    next: 'Replace it, or open the sketch with a later version.',
  },
  'sketch/model-not-available': {
    title: 'Model not available',
    says: 'The thermodynamic model “{kind}” is not available in this version; the choice is kept.',
    next: 'Choose another model.',
  },
  'sketch/parts-normalised': {
    title: 'Parts scaled',
    says: 'The parts add up to {sum%} and were scaled to 100 %.',
  },
  'sketch/loose-end': {
    title: 'Loose end',
    says: 'Stream {stream} leads to no unit; it counts as leaving the sketch.',
    next: 'Draw it to a unit or to a product.',
  },
  'sketch/setting-of-unused-port': {
    title: 'Setting without a stream',
    says: 'A value is given for the {port}, where no stream is.',
    next: 'Draw a stream there, or clear the value.',
  },
  'sketch/migrated': {
    title: 'Older file',
    says: 'The file is of an older version and was brought up to date.',
  },
  'sketch/stream-added': {
    title: 'Stream added',
    says: 'Stream {number} was added at an outlet that always has one.',
  },
  'sketch/stream-without-ends': {
    title: 'Stream without ends',
    says: 'Stream {stream} touches no unit.',
    next: 'Remove it, or draw its ends.',
  },
  'sketch/label-not-available': {
    title: 'Label not available',
    says: 'The label “{label}” is not available in this version; it is kept.',
  },
  'sketch/parts-removed': {
    title: 'Parts removed',
    says: 'A chemical was removed, and its part of the composition with it.',
    next: 'Check the composition.',
  },
};
