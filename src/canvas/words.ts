import type { DrawnState } from '../drawing/types';
import type { Port, UnitId } from '../engine/ids';
import type { Finding } from '../engine/outcome';
import type { Sketch } from '../sketch/types';
import type { Refused } from '../store/commands';

const KINDS: Readonly<Record<string, string>> = { drum: 'flash drum' };

/** "flash drum" for a kind. */
export const kindWord = (kind: string): string => KINDS[kind] ?? kind;

export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** "inlet 2" for a port. */
export function portWord(port: Port): string {
  const [, stem = port, number = ''] = /^(.*?)(\d*)$/.exec(port) ?? [];
  const words =
    stem === 'in'
      ? 'inlet'
      : stem === 'out'
        ? 'outlet'
        : stem.replace(/([a-z])([A-Z])/g, '$1 $2').toLowerCase();
  return number ? `${words} ${number}` : words;
}

export const STATE_WORDS: Readonly<Record<DrawnState, string>> = {
  solved: 'solved',
  'needs-value': 'needs a value',
  waiting: 'waiting',
  'no-solution': 'no solution',
  'out-of-date': 'out of date',
};

export const tagOf = (sketch: Sketch, id: UnitId): string =>
  sketch.units.find((unit) => unit.id === id)?.tag ?? '';

/** Why an edit was refused, as a sentence. */
export function refusalSentence({ code, evidence }: Refused): string {
  const text = (name: string): string => evidence.find((item) => item.name === name)?.text ?? '';
  switch (code) {
    case 'edit/two-inlets':
      return 'Both ends are inlets: a stream runs from an outlet to an inlet.';
    case 'edit/two-outlets':
      return 'Both ends are outlets: an outlet cannot receive.';
    case 'edit/same-unit':
      return `Both ends are at ${text('tag')}: a stream leads to another unit.`;
    case 'edit/port-taken':
      return `Stream ${text('stream')} is already at the ${portWord(text('port'))} of ${text('tag')}.`;
    case 'edit/ports-used-up':
      return `${text('tag')} has no further ${portWord(text('port'))}.`;
    case 'edit/no-inlet':
      return `A ${kindWord(text('kind'))} has no inlet.`;
    case 'edit/no-outlet':
      return `A ${kindWord(text('kind'))} has no outlet.`;
    case 'edit/nothing-to-part':
      return `Stream ${text('stream')} has a loose end: there is no line to part.`;
    case 'edit/outlet-needs-stream':
      return `Stream ${text('stream')} belongs to an outlet that always has a stream; it stays as a loose end.`;
    case 'edit/unknown-kind':
      return `${capital(kindWord(text('kind')))} is not available in this version.`;
    default:
      return 'That cannot be done here.';
  }
}

/** A finding as a sentence, without its full stop. */
export const findingSentence = (finding: Finding): string => finding.code;

const MODELS: Readonly<Record<string, string>> = { 'peng-robinson': 'Peng–Robinson' };

/** Published name of a thermodynamic model. */
export const modelWord = (kind: string): string => MODELS[kind] ?? kind;
