import type { StreamId, UnitId } from '../../engine/ids';
import type { Basis } from '../../engine/network/types';
import type { Sketch } from '../../sketch/types';
import { kindWord } from '../../wording';

export type Target =
  | { readonly unit: UnitId }
  | { readonly stream: StreamId }
  | { readonly chemical: string };

/** One thing of the sketch as a search shows it. */
export interface FoundThing {
  readonly target: Target;
  /** "C-101", "Stream 12", "Benzene" */
  readonly name: string;
  /** "column, Benzene column", "K-101 to Light ends", "component" */
  readonly about: string;
  /** What it goes by in a search, the best first: the number of a stream, the tag of a unit. */
  readonly words: readonly string[];
}

/** Everything that can be found: units, streams, then components, each in the order of the sketch. */
export function thingsOf(
  { units, streams }: Pick<Sketch, 'units' | 'streams'>,
  chemicals: Basis['chemicals'],
): readonly FoundThing[] {
  const tags = new Map(units.map(({ id, tag }) => [id, tag]));
  const endOf = (end: Sketch['streams'][number]['from']): string =>
    (end && tags.get(end[0])) ?? 'nowhere yet';
  return [
    ...units.map(({ id, tag, name, kind, settings }): FoundThing => {
      const word = kindWord(kind, settings.service);
      return {
        target: { unit: id },
        name: tag,
        about: [word, name].filter(Boolean).join(', '),
        words: [tag, name ?? '', word],
      };
    }),
    ...streams.map(({ id, number, name, from, to }): FoundThing => {
      const ends = `${endOf(from)} to ${endOf(to)}`;
      return {
        target: { stream: id },
        name: `Stream ${number}`,
        about: [name, ends].filter(Boolean).join(', '),
        words: [number, name ?? '', `stream ${number}`],
      };
    }),
    ...chemicals.map(
      ({ id, name, formula }): FoundThing => ({
        target: { chemical: id },
        name,
        about: ['component', formula].filter(Boolean).join(', '),
        words: [name, formula ?? '', id],
      }),
    ),
  ];
}

const plain = (text: string): string => text.toLowerCase().replace(/[\s\-–,]/g, '');

/** How well a thing answers: 0 is its own name, then what begins with the words, then what has them. */
function rank({ words }: FoundThing, wanted: string): number | undefined {
  const names = words.map(plain);
  if (names.includes(wanted)) return 0;
  if (names.some((name) => name.startsWith(wanted))) return 1;
  return names.some((name) => name.includes(wanted)) ? 2 : undefined;
}

/** The things that answer a search, the best first; within a rank their order stays. Nothing typed: all of them. */
export function findThings(things: readonly FoundThing[], text: string): readonly FoundThing[] {
  const wanted = plain(text);
  if (wanted === '') return things;
  return things
    .flatMap((thing, at) => {
      const r = rank(thing, wanted);
      return r === undefined ? [] : [{ thing, r, at }];
    })
    .sort((a, b) => a.r - b.r || a.at - b.at)
    .map(({ thing }) => thing);
}
