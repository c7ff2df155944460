/** Time of drawing sheets of 60 and 200 units anew: from nothing, for new digits, for a state, for units that a hand moves. */
import { cpus, loadavg } from 'node:os';
import { buildScene } from '../../src/drawing/scene';
import type { LabelRow, Point, Scene, SceneInput } from '../../src/drawing/types';
import { linesUnderHand } from '../../src/drawing/underHand';
import type { UnitId } from '../../src/engine/ids';
import type { Sketch } from '../../src/sketch/types';
import { inputOf, sheetOf } from '../drawing/sheets';

/** Trains of ten units below one another, each with a recycle; the liquid of every first drum leads on to the next train. */
export function manyTrains(trains: number): Sketch {
  const units: Parameters<typeof sheetOf>[0][number][] = [];
  const streams: [string, string, string][] = [];
  const join = (from: string, to: string): void => {
    streams.push([`${streams.length + 1}`, from, to]);
  };
  for (let t = 1; t <= trains; t++) {
    const y = 300 * t;
    units.push(
      ['feed', `FEED-${t}`, 80, y, { name: `Well ${t}` }],
      ['join', `J-${t}`, 208, y],
      ['heater', `E-${t}01`, 320, y],
      ['valve', `PV-${t}01`, 464, y],
      ['drum', `V-${t}01`, 608, y],
      ['cooler', `E-${t}02`, 768, y - 96],
      ['drum', `V-${t}02`, 928, y - 40],
      ['divide', `D-${t}`, 928, y + 104],
      ['product', `PROD-${t}01`, 1136, y - 136, { name: 'Gas' }],
      ['product', `PROD-${t}02`, 1136, y + 104, { name: 'Condensate' }],
    );
    join(`FEED-${t}.out`, `J-${t}.in1`);
    join(`J-${t}.out`, `E-${t}01.in`);
    join(`E-${t}01.out`, `PV-${t}01.in`);
    join(`PV-${t}01.out`, `V-${t}01.in1`);
    join(`V-${t}01.vapour`, `E-${t}02.in`);
    join(`E-${t}02.out`, `V-${t}02.in1`);
    join(`V-${t}02.vapour`, `PROD-${t}01.in`);
    join(`V-${t}02.liquid`, `D-${t}.in`);
    join(`D-${t}.out1`, `PROD-${t}02.in`);
    join(`D-${t}.out2`, `J-${t}.in2`);
    join(`V-${t}01.liquid`, t < trains ? `J-${t + 1}.in3` : '');
  }
  return sheetOf(units, streams);
}

export const rowsOf = (k: number): readonly LabelRow[] => [
  { number: (100 + 0.1 * k).toFixed(1), unit: 'kmol/h' },
  { number: (50 + 0.01 * k).toFixed(2), unit: '°C' },
  { number: (3 + 0.001 * k).toFixed(3), unit: 'bar(a)' },
];

export interface SceneTiming {
  readonly what: string;
  readonly units: number;
  readonly streams: number;
  /** [ms] */
  readonly median: number;
  readonly '95 %': number;
  /** Mean of processor time of the process: what a busy machine does not change [ms]. */
  readonly processor: number;
  readonly load: number;
}

/** @param now clock in milliseconds */
export const timeScene = (now: () => number, turns = 60): readonly SceneTiming[] =>
  [6, 20].flatMap((trains) => timeSheet(manyTrains(trains), now, turns));

function timeSheet(sketch: Sketch, now: () => number, turns: number): readonly SceneTiming[] {
  const input = inputOf(sketch);
  const sizes = { units: sketch.units.length, streams: sketch.streams.length };

  const timed = (what: string, step: (k: number, before: Scene) => Scene): SceneTiming => {
    let scene = buildScene(sketch, input);
    const times: number[] = [];
    let spent = process.cpuUsage();
    for (let k = 1; k <= 10 + turns; k++) {
      if (k === 11) spent = process.cpuUsage();
      const begun = now();
      scene = step(k, scene);
      if (k > 10) times.push(now() - begun);
    }
    const { user, system } = process.cpuUsage(spent);
    times.sort((a, b) => a - b);
    return {
      what,
      ...sizes,
      median: times[Math.floor(times.length / 2)]!,
      '95 %': times[Math.floor(0.95 * times.length)]!,
      processor: (user + system) / 1e3 / turns,
      load: loadavg()[0]! / cpus().length,
    };
  };

  const withRows = (count: number, k: number): SceneInput => ({
    ...input,
    labels: new Map([
      ...input.labels,
      ...sketch.streams.slice(0, count).map((s) => [s.id, rowsOf(k)] as const),
    ]),
  });
  /** As the hand has them: the canvas asks once a frame. */
  const held = (tags: readonly string[], k: number): ReadonlyMap<UnitId, Point> => {
    const [dx, dy] = [8 * ((k % 24) - 12), 8 * ((k % 14) - 7)];
    const units = sketch.units.filter((u) => tags.includes(u.tag));
    return new Map(units.map((u) => [u.id, [u.at[0] + dx, u.at[1] + dy]]));
  };
  const underHand = (what: string, tags: readonly string[]): SceneTiming =>
    timed(`${what} under the hand`, (k, before) => {
      linesUnderHand(before, sketch.streams, held(tags, k), new Set());
      return before;
    });
  const letGo = (k: number, before: Scene): Scene => {
    const there = held(['V-301'], k);
    const units = sketch.units.map((u) => ({ ...u, at: there.get(u.id) ?? u.at }));
    return buildScene({ ...sketch, units }, input, before);
  };
  const ten = sketch.units.slice(30, 40).map((u) => u.tag);
  const half = sketch.units.filter((_, k) => k % 2 === 0).map((u) => u.tag);
  return [
    timed('from nothing', () => buildScene(sketch, input)),
    timed('another zoom', (k, before) =>
      buildScene(sketch, { ...input, textScale: k % 2 ? 1.375 : 1.5 }, before),
    ),
    timed('new digits in all labels', (k, before) => buildScene(sketch, withRows(99, k), before)),
    timed('new digits in five labels', (k, before) => buildScene(sketch, withRows(5, k), before)),
    timed('a setting and new digits', (k, before) =>
      buildScene(
        {
          ...sketch,
          units: sketch.units.map((u, at) => (at === 3 ? { ...u, settings: { P: `${k} bar` } } : u)),
        },
        withRows(99, k),
        before,
      ),
    ),
    timed('a unit out of date and back', (k, before) =>
      buildScene(
        sketch,
        k % 2
          ? { ...input, states: new Map([...input.states, [sketch.units[4]!.id, 'out-of-date']]) }
          : input,
        before,
      ),
    ),
    underHand('a drum', ['V-301']),
    underHand('a join', ['J-4']),
    underHand('ten units', ten),
    underHand('every second unit', half),
    timed('a drum let go', letGo),
  ];
}
