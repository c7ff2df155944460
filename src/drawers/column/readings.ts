import type { ProfileData, ProfileLine, ProfilePicture, ProfilePlace } from '../../drawing/profiles';
import { formatNumber } from '../../quantity';

export interface Reading {
  /** "Stage 5", "Condenser". */
  readonly place: string;
  /** "temperature 93.12 °C", line by line. */
  readonly values: readonly string[];
}

const valueAt = (line: ProfileLine, at: ProfilePlace): number | undefined =>
  typeof at === 'number' ? line.values[at - 1] : line[at];

/** Every place that the profiles have, from the top. */
export const placesOf = ({ stages, condenser, reboiler }: ProfileData): readonly ProfilePlace[] => [
  ...(condenser ? (['condenser'] as const) : []),
  ...Array.from({ length: stages }, (_, k) => k + 1),
  ...(reboiler ? (['reboiler'] as const) : []),
];

/** What the profiles say of one place, in the measures they are drawn in; lines without a value there are left out. */
export function readingAt({ plots }: ProfileData, at: ProfilePlace): Reading {
  const values = plots.flatMap(({ title, lines }) => {
    const [, unit = ''] = title.split(', ');
    const known = lines.flatMap((line) => {
      const value = valueAt(line, at);
      return value === undefined || !Number.isFinite(value) ? [] : [`${line.name} ${formatNumber(value)}`];
    });
    return known.length === 0 ? [] : [`${known.join(', ')} ${unit}`];
  });
  return {
    place: typeof at === 'number' ? `Stage ${at}` : at === 'condenser' ? 'Condenser' : 'Reboiler',
    values,
  };
}

/** Where a place lies in the picture, and the points that its lines have there. */
export function pointsAt(picture: ProfilePicture, at: ProfilePlace) {
  return picture.plots.flatMap(({ lines }) =>
    lines.flatMap(({ points }) => points.filter((p) => p.at === at).map((p) => p.point)),
  );
}

/** The place whose height in the picture is nearest [px]; undefined in a picture without points. */
export function nearestPlace(picture: ProfilePicture, y: number): ProfilePlace | undefined {
  const points = picture.plots.flatMap(({ lines }) => lines.flatMap((line) => line.points));
  const [first, ...rest] = points;
  if (!first) return undefined;
  const off = (of: (typeof points)[number]): number => Math.abs(of.point[1] - y);
  return rest.reduce((best, next) => (off(next) < off(best) ? next : best), first).at;
}
