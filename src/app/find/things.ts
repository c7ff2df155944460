import type { StreamId, UnitId } from '../../engine/ids';
import type { Basis } from '../../engine/network/types';
import type { Sketch } from '../../sketch/types';

export type Target =
  | { readonly unit: UnitId }
  | { readonly stream: StreamId }
  | { readonly chemical: string };

/** One thing of the sketch as a search shows it. */
export interface FoundThing {
  readonly target: Target;
  /** "C-101", "Stream 12", "Benzene" */
  readonly name: string;
  /** "column, Benzene column", "stream, K-101 to Light ends", "chemical" */
  readonly about: string;
  /** What it is called: the tag, the number, the chemical's name. */
  readonly own: readonly string[];
  /** What else it goes by: the name of the unit, the kind, the description. */
  readonly other: readonly string[];
}

/** How the page names kinds and streams: handed in, so that what is fetched brings nothing along that the page has. */
export interface Names {
  readonly kind: (kind: string, service?: unknown) => string;
  readonly stream: (sketch: Pick<Sketch, 'units'>, stream: Sketch['streams'][number]) => string;
}

/** Everything that can be found: units, streams, then chemicals, each in the order of the sketch. */
export function thingsOf(
  { units, streams }: Pick<Sketch, 'units' | 'streams'>,
  chemicals: Basis['chemicals'],
  names: Names,
): readonly FoundThing[] {
  const tags = new Map(units.map(({ id, tag }) => [id, tag]));
  const endOf = (end: Sketch['streams'][number]['from']): string =>
    (end && tags.get(end[0])) ?? 'nowhere yet';
  return [
    ...units.map(({ id, tag, name, kind, settings }): FoundThing => {
      const word = names.kind(kind, settings.service);
      return {
        target: { unit: id },
        name: tag,
        about: [word, name].filter(Boolean).join(', '),
        own: [tag],
        other: [name ?? '', word],
      };
    }),
    ...streams.map((stream): FoundThing => {
      const { id, number, name, from, to } = stream;
      return {
        target: { stream: id },
        name: `Stream ${number}`,
        about: [name, `${endOf(from)} to ${endOf(to)}`].filter(Boolean).join(', '),
        own: [number],
        other: [names.stream({ units }, stream), `stream ${number}`],
      };
    }),
    ...chemicals.map(
      ({ id, name, formula, cas, assumed }): FoundThing => ({
        target: { chemical: id },
        name,
        about: [assumed ? 'chemical that a unit brought in' : 'chemical', formula].filter(Boolean).join(', '),
        own: [name],
        other: [formula ?? '', id, cas ?? ''],
      }),
    ),
  ];
}

const plain = (text: string): string => text.toLowerCase().replace(/[\s\-–,]/g, '');

/** Fewer letters than this are looked for at the beginning of what a thing goes by, and anywhere in what it is called. */
const ANYWHERE = 3;

/** How well a thing answers: what it is called before what else it goes by; whole, then beginning, then within. */
function rank({ own, other }: FoundThing, wanted: string): number | undefined {
  const [called, known] = [own.map(plain), other.map(plain)];
  if (called.includes(wanted)) return 0;
  if (known.includes(wanted)) return 1;
  if (called.some((word) => word.startsWith(wanted))) return 2;
  if (known.some((word) => word.startsWith(wanted))) return 3;
  if (called.some((word) => word.includes(wanted))) return 4;
  return wanted.length >= ANYWHERE && known.some((word) => word.includes(wanted)) ? 5 : undefined;
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
