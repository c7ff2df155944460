import type { ProfileData, ProfileLine } from '../../drawing/profiles';
import { formatNumber } from '../../quantity';

const placeName = (at: number | string): string => (typeof at === 'number' ? `stage ${at}` : `the ${at}`);

/** From where to where a line goes, and its largest and smallest value where those are not its ends. */
function lineSentence(line: ProfileLine, unit: string): string {
  const values: [number | string, number][] = [
    ...(line.condenser === undefined ? [] : [['condenser', line.condenser] as [string, number]]),
    ...Array.from(line.values, (value, k): [number, number] => [k + 1, value]),
    ...(line.reboiler === undefined ? [] : [['reboiler', line.reboiler] as [string, number]]),
  ];
  const [first] = values;
  const last = values.at(-1);
  if (!first || !last) return '';
  const said = ([at, value]: [number | string, number]): string =>
    `${formatNumber(value)}${unit === '' ? '' : ` ${unit}`} ${typeof at === 'number' ? 'on' : 'in'} ${placeName(at)}`;
  const largest = values.reduce((a, b) => (b[1] > a[1] ? b : a));
  const smallest = values.reduce((a, b) => (b[1] < a[1] ? b : a));
  const extremes = [
    ...(largest === first || largest === last ? [] : [`at most ${said(largest)}`]),
    ...(smallest === first || smallest === last ? [] : [`at least ${said(smallest)}`]),
  ];
  return [`${line.name} from ${said(first)} to ${said(last)}`, ...extremes].join(', ');
}

/** The profiles in words, for who cannot see them. */
export function profileSentence({ stages, plots, marks }: ProfileData): string {
  const parts = plots.map(({ title, lines }) => {
    const [quantity = title, unit = ''] = title.split(', ');
    return `${quantity}: ${lines.map((line) => lineSentence(line, unit)).join('; ')}.`;
  });
  const places = marks.map(({ at, text }) => `${text} at ${placeName(at)}`);
  return [
    `Profiles over ${stages} ${stages === 1 ? 'stage' : 'stages'}, from the top.`,
    ...parts,
    ...(places.length > 0 ? [`${places.join(', ')}.`] : []),
    'The stage table has every figure.',
  ].join(' ');
}
