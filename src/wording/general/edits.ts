import type { Evidence } from '../../engine/outcome';
import { andList, capital, kindWord, makeSlots, ownWords, portWord, quoted, type Slots } from './slots';

const kind = (s: Slots): string => kindWord(s.text('kind'));
const aKind = (s: Slots): string => `${/^[aeiou]/i.test(kind(s)) ? 'an' : 'a'} ${kind(s)}`;
/** "inlet 2", "vapour port". */
function portOf(s: Slots): string {
  const word = s.has('port') ? portWord('', s.text('port')) : '';
  return /^(inlet|outlet)/.test(word) ? word : `${word} port`.trim();
}

/** "FEED-1: fraction of benzene" for the place `FEED-1.composition.parts.benzene`. */
function placeWords(s: Slots, place: string): string {
  const [, tag, path] = /^(.+?)\.([a-z].*)$/.exec(place) ?? [];
  return tag && path ? `${tag} (${s.setting(path)})` : place;
}

function placesInUse(s: Slots): string {
  const all = [...new Set(s.all('place').map((place) => placeWords(s, place)))];
  const few = all.slice(0, 3);
  const more = all.length - few.length;
  return more > 0 ? `${few.join(', ')} and ${more} more places` : andList(few);
}

/** Why an edit cannot be done and what to do instead, by its code. */
export const EDIT_WORDS: Readonly<Record<string, (s: Slots) => string>> = {
  'edit/unknown-unit': () => 'This unit is no longer on the sheet; choose one that is.',
  'edit/unknown-stream': () => 'This stream is no longer on the sheet; choose one that is.',
  'edit/unknown-kind': (s) =>
    s.has('tag')
      ? `${s.text('tag')} is ${aKind(s)}, which is not available in this version; it is kept as it is and cannot be changed here.`
      : `${capital(aKind(s))} is not available in this version; take another unit from the shelf.`,
  'edit/unknown-note': () => 'This note is no longer on the sheet; choose one that is.',
  'edit/same-unit': (s) =>
    `Both ends are at ${s.text('tag')}: a stream leads to another unit; end it there, or leave the end loose.`,
  'edit/two-inlets': (s) =>
    `Both ends are inlets${betweenTags(s)}: a stream runs from an outlet to an inlet; begin at an outlet.`,
  'edit/two-outlets': (s) =>
    `Both ends are outlets${betweenTags(s)}, and an outlet cannot receive; end the stream at an inlet.`,
  'edit/no-such-port': (s) => `${s.text('tag')} has no ${portOf(s)}; choose one of the ports that it shows.`,
  'edit/port-taken': (s) =>
    `Stream ${s.text('stream')} is already at the ${portOf(s)} of ${s.text('tag')}; take it off first, or put a join or a divide on it.`,
  'edit/ports-used-up': (s) =>
    `${s.text('tag')} has no further ${portOf(s)}; bring streams together in a join, or part them in a divide, before it.`,
  'edit/no-inlet': (s) =>
    `${capital(aKind(s))} has no inlet and cannot stand in a line; put it at the start.`,
  'edit/no-outlet': (s) =>
    `${capital(aKind(s))} has no outlet and cannot stand in a line; put it at the end.`,
  'edit/nothing-to-part': (s) =>
    `Stream ${s.text('stream')} has a loose end, so there is no line to part; put the unit down and connect the stream to it.`,
  'edit/nothing-to-join': (s) =>
    `${s.text('tag')} does not have one stream that comes and one that goes on, so there is no line to join; delete it and connect the ends as you want them.`,
  'edit/outlet-needs-stream': (s) =>
    `Stream ${s.text('stream')} belongs to an outlet that always has a stream; it stays as a loose end unless its unit is removed.`,
  'edit/empty-text': () =>
    'This text may not be empty; type something, or press Escape to keep what was there.',
  'edit/tag-taken': (s) => `Another unit is already called ${s.text('tag')}; choose another tag.`,
  'edit/number-taken': (s) =>
    `Another stream already has the number ${s.text('number')}; choose another number.`,
  'edit/no-such-setting': (s) =>
    `${s.text('tag')} has no setting ${quoted(s.text('path'))}${
      s.has('known') ? `; choose from ${andList(s.list('known').map(quoted))}` : ' and takes none'
    }.`,
  'edit/bad-path': (s) =>
    `${quoted(s.text('path'))} leads to no place in the settings of ${s.text('tag')}; set what stands above it first.`,
  'edit/unknown-tag': (s) =>
    `No unit on the sheet has the tag that ${quoted(s.text('place'))} begins with; write the tag, a point and the setting, as in “PV-101.p.P”.`,
  'edit/chemical-in-use': (s) =>
    s.has('place')
      ? `The chemical is still in use at ${placesInUse(s)}; set it to zero there, or remove it together with these values.`
      : 'The chemical is still in use; set it to zero where it is given, or remove it together with these values.',
  'edit/chemical-twice': (s) =>
    `${capital(s.chemical())} is already among the chemicals; one entry is enough.`,
  'edit/nothing-to-normalise': (s) =>
    `The ${s.has('path') ? s.setting(s.text('path')) : 'fractions'} of ${s.text('tag')} do not add up to anything above zero, so they cannot be scaled to 100 %; correct them first.`,
  'edit/same-chemical': (s) => `${capital(s.chemical())} makes no pair with itself; choose two chemicals.`,
  'edit/not-a-number': () => 'This is not a number that can be used; type one such as 0.012.',
  'edit/bad-factor': () => 'Flows are scaled by a number above zero; give one such as 1.25.',
  'edit/nothing-to-scale': () =>
    'No feed has a flow that can be read, so there is nothing to scale; give the feeds their flows first.',
};

const betweenTags = (s: Slots): string =>
  s.has('from') && s.has('to') ? ` (${s.text('from')} and ${s.text('to')})` : '';

/** Why an edit was refused and what to do instead, in one sentence. */
export function sayEditRefusal(refused: {
  readonly code: string;
  readonly evidence: readonly Evidence[];
}): string {
  const words = Object.hasOwn(EDIT_WORDS, refused.code) ? EDIT_WORDS[refused.code] : undefined;
  if (!words) return `That cannot be done here: ${ownWords(refused.code).toLowerCase()}`;
  return words(makeSlots(refused.evidence, {}, 'SI'));
}
