import type { Evidence } from '../../engine/outcome';
import { OWN_WORDS } from '../words';
import {
  capital,
  humanised,
  kindWord,
  makeSlots,
  orList,
  ownWords,
  portWord,
  quoted,
  type Slots,
  typeWords,
} from './slots';

const ORDINALS = [
  'first',
  'second',
  'third',
  'fourth',
  'fifth',
  'sixth',
  'seventh',
  'eighth',
  'ninth',
  'tenth',
];

/** "third" for 2; "11th" and so on after the tenth. */
function ordinal(index: number): string {
  const count = index + 1;
  const word = ORDINALS[index];
  if (word !== undefined) return word;
  const teen = count % 100 >= 11 && count % 100 <= 13;
  const end = teen ? 'th' : (['th', 'st', 'nd', 'rd'][count % 10] ?? 'th');
  return `${count}${end}`;
}

const KEYS: Readonly<Record<string, string>> = {
  own: 'own data',
  ...OWN_WORDS,
  Tmin: 'lowest temperature',
  Tmax: 'highest temperature',
  c: 'coefficients',
  kind: 'kind',
  via: 'bends',
  at: 'place on the sheet',
  turn: 'turn on the sheet',
  from: 'start',
  to: 'end',
  on: 'what the note is on',
  set: 'measures',
};
const keyWords = (key: string): string =>
  /^\d+$/.test(key)
    ? `${ordinal(Number(key))} entry`
    : Object.hasOwn(KEYS, key)
      ? (KEYS[key] ?? key)
      : humanised(key) || quoted(key);

/** "Units, third entry, tag (units.2.tag)" for a path with list numbers from 0. */
export const placeInFile = (path: string): string =>
  `${capital(path.split('.').map(keyWords).join(', '))} (${path})`;

const aKind = (s: Slots): string => {
  const kind = kindWord(s.text('kind'));
  return `${/^[aeiou]/i.test(kind) ? 'an' : 'a'} ${kind}`;
};
const twice = (what: string, advice: string) => (s: Slots) =>
  `the ${what} ${quoted(s.text('found'))} is used twice; ${advice}.`;

/** What is wrong and what to do, by code; the place stands before it. */
export const FILE_WORDS: Readonly<Record<string, (s: Slots) => string>> = {
  'file/empty': () => 'the file is empty; choose another.',
  'file/not-text': () =>
    'the file holds bytes that are no text from here on; it may be damaged or of another kind, so fetch or save it again.',
  'file/not-json': (s) =>
    s.has('found')
      ? `the text cannot be read from ${quoted(s.text('found'))} on; look for a missing comma, bracket or quotation mark just before it.`
      : 'the text breaks off here; the file may be cut short, so fetch or save it again.',
  'file/repeated-key': (s) =>
    `the name ${s.has('found') ? quoted(keyFound(s.text('found'))) : 'here'} stands twice in one group; delete one of the two.`,
  'file/too-deep': () =>
    'values are nested more deeply than any sketch needs; check whether this is a sketch.',
  'file/too-large': (s) =>
    `the file holds ${s.has('values') ? `more than ${s.number('values')} values` : 'more values'}, more than a sketch can; check whether this is a sketch.`,
  'file/not-a-sketch': (s) =>
    s.has('found')
      ? `this is not a sketch of Splitwright (it says ${quoted(s.text('found'))}); choose a file that was saved here.`
      : 'this is not a sketch of Splitwright; choose a file that was saved here.',
  'file/newer-version': (s) =>
    `the sketch was saved by a later version of Splitwright (its form is ${s.number('found')}, and this version reads up to ${s.number('known')}); open it with that version.`,
  'file/not-migrated': (s) =>
    `the sketch was saved by an earlier version of Splitwright and could not be brought up to date (${s.text('what')}); it may be damaged, so fetch or save it again.`,
  'file/missing': () => 'this is missing and a sketch needs it; add it.',
  'file/wrong-type': (s) =>
    `${typeWords(s.text('wanted'))} is wanted here${s.has('found') ? `, not ${typeWords(s.text('found'))}` : ''}; correct the value.`,
  'file/not-one-of': (s) =>
    `${quoted(s.text('found'))} is not known here; choose ${orList(s.list('wanted').map(quoted))}.`,
  'file/out-of-range': (s) =>
    s.has('largest')
      ? `the place lies off the sheet; keep both numbers within ±${s.number('largest')}.`
      : s.has('found') && s.has('above')
        ? `the number is ${s.number('found')} and must be above ${s.number('above')}; correct it.`
        : 'the number is too large to be held; correct it.',
  'file/empty-text': (s) =>
    s.has('found')
      ? `the text ${quoted(s.text('found'))} has blanks at its ends; delete them.`
      : 'the text is empty; give it a name.',
  'file/repeated-id': twice('id', 'give each its own, and mind the streams that refer to it'),
  'file/repeated-tag': twice('tag', 'give every unit its own'),
  'file/repeated-number': twice('stream number', 'give every stream its own'),
  'file/repeated-chemical': twice('chemical', 'delete one of the two'),
  'file/unknown-unit': (s) =>
    `stream ${s.text('stream')} refers to a unit ${quoted(s.text('unit'))} that the file does not have; add the unit, or correct the stream’s end.`,
  'file/unknown-port': (s) => `${aKind(s)} has no port ${quoted(s.text('port'))}; name one that it has.`,
  'file/wrong-direction': (s) =>
    `the ${portWord(s.text('kind'), s.text('port'))} of ${aKind(s)} lies the other way round; a stream starts at an outlet and ends at an inlet.`,
  'file/port-taken': (s) =>
    `stream ${s.text('stream')} is already at the port ${quoted(s.text('port'))}; name another port, or bring the streams together in a join.`,
  'file/too-few-coefficients': (s) =>
    `this form of correlation needs at least ${s.number('wanted')} coefficients and has ${s.number('found')}; add the others.`,
  'file/form-does-not-fit': (s) =>
    `the form ${quoted(s.text('found'))} does not describe this property; choose ${orList(s.list('wanted').map(quoted))}.`,
  'file/more-problems': (s) =>
    `There ${s.value('count') === 1 ? 'is 1 more problem' : `are ${s.number('count')} more problems`}; correct those above first and open the file again.`,
};

/** The file's own heading says where these are; a place before them would add nothing. */
const WITHOUT_PLACE = ['file/not-a-sketch', 'file/newer-version', 'file/not-migrated', 'file/more-problems'];

/** `"tag": "V-1", ...`: the name at the start of the piece of text. */
const keyFound = (found: string): string => /^"((?:[^"\\]|\\.)*)/.exec(found)?.[1] ?? found;

/** Why a file is not opened: the place in plain words, what is wrong, what to do; one sentence. */
export function sayFileProblem(problem: {
  readonly path: string;
  readonly code: string;
  readonly evidence: readonly Evidence[];
}): string {
  const { path, code, evidence } = problem;
  const s = makeSlots(evidence, {}, 'SI');
  const words = Object.hasOwn(FILE_WORDS, code) ? FILE_WORDS[code] : undefined;
  const what = words ? words(s) : ownWords(code).toLowerCase();
  if (WITHOUT_PLACE.includes(code)) return capital(what);
  if (s.has('line')) return `Line ${s.number('line')}, column ${s.number('column')}: ${what}`;
  return path === '' ? capital(what) : `${placeInFile(path)}: ${what}`;
}
