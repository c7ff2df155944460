import type { Evidence } from '../engine/outcome';
import { capital } from './humanise';
import { kindWord, portWord } from './words';

/** Why an edit is refused: a code and evidence. */
export interface EditRefusalLike {
  readonly code: string;
  readonly evidence: readonly Evidence[];
}

const SAYS: Readonly<Record<string, string>> = {
  'edit/two-inlets': 'Both ends are inlets: a stream runs from an outlet to an inlet.',
  'edit/two-outlets': 'Both ends are outlets: an outlet cannot receive.',
  'edit/same-unit': 'Both ends are at {tag}: a stream leads to another unit.',
  'edit/port-taken': 'Stream {stream} is already at the {port} of {tag}.',
  'edit/ports-used-up': '{tag} has no further {port}.',
  'edit/no-inlet': 'A {kind} has no inlet.',
  'edit/no-outlet': 'A {kind} has no outlet.',
  'edit/no-such-port': '{tag} has no {port}.',
  'edit/nothing-to-part': 'Stream {stream} has a loose end: there is no line to part.',
  'edit/outlet-needs-stream':
    'Stream {stream} belongs to an outlet that always has a stream; it stays as a loose end.',
  'edit/unknown-kind': 'A {kind} is not available in this version.',
  'edit/unknown-unit': 'There is no unit {unit}.',
  'edit/unknown-tag': 'There is no unit with the tag that {place} begins with.',
  'edit/unknown-stream': 'There is no stream {stream}.',
  'edit/unknown-note': 'There is no note {note}.',
  'edit/bad-path': '{path} leads to nothing in the settings of {tag}.',
  'edit/no-such-setting': '{tag} has no setting {path}; it has: {known}.',
  'edit/tag-taken': 'The tag {tag} belongs to another unit.',
  'edit/number-taken': 'The number {number} belongs to another stream.',
  'edit/empty-text': 'This text must not be empty.',
  'edit/chemical-twice': '{chemical} is already among the chemicals.',
  'edit/chemical-in-use': 'A chemical is still used, at {place}: it stays.',
  'edit/nothing-to-normalise': 'The parts add up to nothing, so they cannot be scaled.',
};

export const EDIT_CODES = Object.keys(SAYS);

/** Why an edit is refused, in one sentence. */
export function sayEditRefusal({ code, evidence }: EditRefusalLike): string {
  const says = SAYS[code] ?? 'That cannot be done here.';
  const kind = evidence.find((e) => e.name === 'kind')?.text ?? '';
  const filled = says.replace(/\{(\w+)\}/g, (_, name: string) => {
    const seen = evidence.filter((e) => e.name === name).map((e) => e.text ?? String(e.value));
    const words = seen.map((text) =>
      name === 'port' ? portWord(kind, text) : name === 'kind' ? kindWord(text) : text,
    );
    return words.length === 0 ? '–' : words.join(', ');
  });
  return capital(filled);
}
