import { beforeAll, describe, expect, test } from 'vitest';
import {
  type ColumnResults,
  columnProfiles,
  columnResults,
  keyChemicals,
  presentChemicals,
  stageRows,
} from '../../src/drawing/columnProfiles';
import { measureText } from '../../src/drawing/metrics';
import {
  DASHES,
  END_OFFSET,
  type ProfileData,
  type ProfilePicture,
  type ProfilePlace,
  profilePicture,
} from '../../src/drawing/profiles';
import type { Box, TextShape } from '../../src/drawing/types';
import { type Scenario, scenarios, solveCall } from '../column/fixtures';
import { seeded } from '../numerics/seeded';

const SIZE = { width: 400, height: 236 };

/** A made-up column: any number of stages, ends, feeds, and lines that go up and down. */
function madeUp(seed: number): ProfileData {
  const random = seeded(seed);
  const whole = (to: number): number => Math.floor(random() * to);
  const stages = 1 + whole(seed % 3 === 0 ? 8 : 120);
  const line = (key: string, scale: number, shift: number) => {
    let value = random();
    const values = Array.from({ length: stages }, () => {
      value = Math.min(1, Math.max(0, value + (random() - 0.5) * 0.3));
      return shift + scale * value;
    });
    return {
      key,
      name: key,
      values,
      condenser: shift + scale * random(),
      reboiler: shift + scale * random(),
    };
  };
  const place = (): ProfilePlace =>
    random() < 0.15 ? (random() < 0.5 ? 'condenser' : 'reboiler') : 1 + whole(stages);
  return {
    stages,
    condenser: random() < 0.6,
    reboiler: random() < 0.6,
    plots: [
      { key: 'T', title: 'Temperature, °C', lines: [line('temperature', 10 ** (whole(5) - 1), -40)] },
      {
        key: 'flow',
        title: 'Flow, kmol/h',
        fromZero: true,
        lines: [line('liquid', 10 ** whole(6), 0), line('vapour', 10 ** whole(6), 0)],
      },
      {
        key: 'x',
        title: 'Liquid, mol/mol',
        fromZero: true,
        lines: ['n-Butane', 'Benzene', 'Toluene', 'm-Xylene'].slice(0, whole(5)).map((k) => line(k, 1, 0)),
      },
    ],
    marks: Array.from({ length: whole(4) }, () => ({
      at: place(),
      text: random() < 0.5 ? 'feed' : 'side draw',
    })),
  };
}

const cases = Array.from({ length: 60 }, (_, k) => k + 1);

const boxOf = ({ at: [x, y], text, size, weight, anchor }: TextShape): Box => {
  const w = measureText(text, size, weight);
  return { x: x - (anchor === 'end' ? w : anchor === 'middle' ? w / 2 : 0), y: y - 0.75 * size, w, h: size };
};
const pointsOf = (picture: ProfilePicture) =>
  picture.plots.flatMap((plot) =>
    plot.lines.flatMap((line) => line.points.map((p) => ({ plot, line, ...p }))),
  );

describe('profiles of any column', () => {
  test.each(cases)('lie inside their plots, the plots inside the picture (seed %i)', (seed) => {
    const picture = profilePicture(madeUp(seed), SIZE);
    for (const { box } of picture.plots) {
      expect(box.x).toBeGreaterThan(0);
      expect(box.x + box.w).toBeLessThanOrEqual(SIZE.width);
      expect(box.y + box.h).toBeLessThan(SIZE.height);
    }
    for (const { plot, point } of pointsOf(picture)) {
      expect(point[0]).toBeGreaterThanOrEqual(plot.box.x - 1e-9);
      expect(point[0]).toBeLessThanOrEqual(plot.box.x + plot.box.w + 1e-9);
      expect(point[1]).toBeGreaterThan(plot.box.y);
      expect(point[1]).toBeLessThan(plot.box.y + plot.box.h);
    }
    for (const { d } of picture.paths) expect(d).not.toMatch(/NaN|Infinity/);
  });

  test.each(cases)('run from the top down, at one height for one place in every plot (seed %i)', (seed) => {
    const data = madeUp(seed);
    const heights = new Map<ProfilePlace, number>();
    for (const { line, at, point } of pointsOf(profilePicture(data, SIZE))) {
      expect(point[1]).toBeCloseTo(heights.get(at) ?? point[1], 9);
      heights.set(at, point[1]);
      const ys = line.points.map((p) => p.point[1]);
      expect(ys).toEqual([...ys].sort((a, b) => a - b));
    }
    const [first, last] = [heights.get(1) ?? 0, heights.get(data.stages) ?? 0];
    expect(heights.has('condenser')).toBe(data.condenser);
    expect(heights.has('reboiler')).toBe(data.reboiler);
    if (data.condenser) expect(first - (heights.get('condenser') ?? 0)).toBeCloseTo(END_OFFSET, 9);
    if (data.reboiler) expect((heights.get('reboiler') ?? 0) - last).toBeCloseTo(END_OFFSET, 9);
  });

  test.each(cases)('keep texts inside the picture and off each other (seed %i)', (seed) => {
    const { texts, plots } = profilePicture(madeUp(seed), SIZE);
    for (const text of texts) {
      const box = boxOf(text);
      expect(box.x, text.text).toBeGreaterThanOrEqual(-0.5);
      expect(box.x + box.w, text.text).toBeLessThanOrEqual(SIZE.width + 0.5);
    }
    // Names of places stand left of the first plot, figures of the scales under the plots: neither may run together.
    const [firstPlot] = plots;
    const axis = texts.filter((t) => t.anchor === 'end' && t.at[0] < (firstPlot?.box.x ?? 0));
    const ys = axis.map((t) => t.at[1]).sort((a, b) => a - b);
    for (let k = 1; k < ys.length; k += 1)
      expect((ys[k] ?? 0) - (ys[k - 1] ?? 0)).toBeGreaterThanOrEqual(11.9);
    const scale = texts
      .filter((t) => t.anchor === 'middle')
      .map(boxOf)
      .sort((a, b) => a.x - b.x);
    for (let k = 1; k < scale.length; k += 1) {
      const before = scale[k - 1];
      if (before) expect(scale[k]?.x).toBeGreaterThanOrEqual(before.x + before.w);
    }
  });

  test('name every line of a plot with several, and tell them apart by their dashes', () => {
    const data = { ...madeUp(4), marks: [] };
    const plot = { key: 'x', title: 'Liquid, mol/mol', fromZero: true, lines: [...lines(4)] } as const;
    const picture = profilePicture({ ...data, plots: [plot] }, SIZE);
    const texts = picture.texts.map((t) => t.text);
    for (const { name } of plot.lines) expect(texts).toContain(name);
    const dashes = picture.paths.filter((p) => p.width === 1.4).map((p) => p.dash);
    expect(dashes).toEqual(DASHES.slice(0, 4));

    function lines(count: number) {
      return Array.from({ length: count }, (_, k) => ({
        key: `k${k}`,
        name: `name ${k}`,
        values: Array.from({ length: data.stages }, (_v, j) => (k + 1) / 5 + 0.01 * Math.sin(j)),
      }));
    }
  });

  test('draw a single stage, a constant and a missing figure without inventing any', () => {
    const one = profilePicture(
      {
        stages: 1,
        condenser: true,
        reboiler: true,
        marks: [{ at: 1, text: 'feed' }],
        plots: [
          {
            key: 'T',
            title: 'T',
            lines: [{ key: 'T', name: 'T', values: [350], condenser: 350, reboiler: Number.NaN }],
          },
        ],
      },
      SIZE,
    );
    expect(one.plots[0]?.lines[0]?.points.map((p) => p.at)).toEqual(['condenser', 1]);
    expect(JSON.stringify(one)).not.toMatch(/null|NaN/);
  });

  test('run a dotted line at every place where something enters or is drawn, through all plots', () => {
    const data = { ...madeUp(7), marks: [{ at: 1, text: 'feed' } as const] };
    const { paths, plots } = profilePicture(data, SIZE);
    const last = plots.at(-1);
    const dotted = paths.filter((p) => p.stroke === 'ink3');
    expect(dotted).toHaveLength(1);
    expect(Number(/H([\d.]+)$/.exec(dotted[0]?.d ?? '')?.[1])).toBeCloseTo(
      (last?.box.x ?? 0) + (last?.box.w ?? 0),
      1,
    );
  });
});

describe('profiles of a solved column', () => {
  let all: readonly Scenario[];
  let solved: readonly ColumnResults[];
  beforeAll(async () => {
    all = await scenarios();
    solved = all.map(({ call }) => solveCall(call).results);
  }, 60_000);
  const of = (name: string): ColumnResults => {
    const found = solved[all.findIndex((s) => s.name.startsWith(name))];
    if (!found) throw new Error(`no scenario ${name}`);
    return found;
  };

  test('are known by their stages; other results are not taken for a column', () => {
    expect(columnResults(of('light ends') as unknown as Record<string, unknown>)).toBe(of('light ends'));
    expect(columnResults({ stages: 7 })).toBeUndefined();
    expect(columnResults(undefined)).toBeUndefined();
  });

  test('have a row for every place, with fractions that sum to one', () => {
    for (const results of solved) {
      const rows = stageRows(results);
      const ends = (results.condenser ? 1 : 0) + (results.reboiler ? 1 : 0);
      expect(rows).toHaveLength(results.stages.T_K.length + ends);
      for (const row of rows) {
        const sum = presentChemicals(results).reduce((s, id) => s + (row.x(id) ?? 0), 0);
        expect(sum).toBeCloseTo(1, 9);
      }
    }
  });

  test('leave the vapour of a total condenser out, and keep its reflux', () => {
    const results = of('two purities');
    const [condenser] = stageRows(results);
    expect(condenser?.at).toBe('condenser');
    expect(condenser?.V_mol_s).toBeUndefined();
    expect(condenser?.L_mol_s).toBe(results.condenser?.reflux_mol_s);
    const flows = columnProfiles(results, { set: 'SI' }, [], (id) => id).plots[1];
    expect(flows?.lines.find((line) => line.key === 'V')?.condenser).toBeUndefined();
  });

  test('choose the chemicals that change most, in the order of the sketch', () => {
    for (const results of solved) {
      const keys = keyChemicals(results);
      const span = (id: string): number => {
        const x = stageRows(results).map((row) => row.x(id) ?? 0);
        return Math.max(...x) - Math.min(...x);
      };
      const ids = Object.keys(results.stages.x);
      expect(keys).toEqual(ids.filter((id) => keys.includes(id)));
      const least = Math.min(...keys.map(span));
      for (const id of ids.filter((other) => !keys.includes(other)))
        expect(span(id)).toBeLessThanOrEqual(least);
    }
  });

  test('are shown in the measures asked for', () => {
    const results = of('light ends');
    const T = columnProfiles(results, { set: 'US' }, [], (id) => id).plots[0];
    expect(T?.title).toBe('Temperature, °F');
    // Definition of the degree Fahrenheit: 1.8 K - 459.67.
    expect(T?.lines[0]?.values[0]).toBeCloseTo(1.8 * results.topT_K - 459.67, 9);
  });
});
