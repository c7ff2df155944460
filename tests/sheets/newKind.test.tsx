// @vitest-environment jsdom
import { act, fireEvent, screen } from '@testing-library/react';
import { beforeAll, describe, expect, test } from 'vitest';
import { solveSketch } from '../../src/cli/run';
import { KNOWN_KINDS } from '../../src/engine/network/kinds';
import { noSolution, solved } from '../../src/engine/outcome';
import { answerOf } from '../../src/engine/units/answer';
import type { AnyKind } from '../../src/engine/units/solvers';
import { streamAt, warmFrom } from '../../src/engine/units/streams';
import type { Call, KindCatalogue, UnitKind } from '../../src/engine/units/types';
import { writeCsv } from '../../src/report/csv';
import type { ReportInput } from '../../src/report/input';
import { buildReport } from '../../src/report/model';
import { resultsJson } from '../../src/report/resultsJson';
import { reportScene } from '../../src/report/sheet';
import { openSketch } from '../../src/sketch/read';
import { type Schema, sketchSchema } from '../../src/sketch/schema';
import { field, letDown, makePage, settingsOf, show, sketchOf, unitId } from '../drawers/page';
import { faults } from '../sketch/validator';

/**
 * A kind that exists in this file alone: a bed that takes pressure by its depth and loses heat through its wall. Catalogue
 * and solve are all there is to it: no label, no symbol, no drawer, no column of any table.
 */
const catalogue: KindCatalogue = {
  kind: 'gravelBed',
  group: 'vessels',
  tag: { letters: 'G', drawn: true },
  ports: [
    { name: 'in', dir: 'in' },
    { name: 'out', dir: 'out' },
  ],
  settings: {
    depth: { is: 'quantity', dim: 'length', min: 0 },
    wallLoss: {
      is: 'quantity',
      dim: 'power',
      min: 0,
      otherwise: { value: 0, text: '0 kW', why: 'No loss through the wall was given.' },
    },
  },
  results: {
    bedDrop_Pa: { dim: 'pressureDifference' },
    outletTemperature_K: { dim: 'temperature' },
    secret: { dim: 'number', hidden: true },
  },
  findings: [],
};
/** Invented: a metre of bed takes this much. */
const DROP_PA_M = 5000;

interface BedSettings {
  readonly depth: number;
  readonly wallLoss: number;
}

const bed: UnitKind<BedSettings, Readonly<Record<string, number>>> = {
  solve(call: Call<BedSettings>) {
    const inlet = call.in.in!;
    const { depth, wallLoss } = call.settings;
    const drop = DROP_PA_M * depth;
    const made = streamAt(
      call,
      inlet.n_mol_s,
      { P_Pa: inlet.P_Pa - drop, H_W: inlet.H_W - wallLoss },
      warmFrom(call.warm, inlet.n_mol_s, inlet.T_K),
    );
    if (made.state !== 'solved') return noSolution(...made.findings);
    const out = made.value;
    const results = { bedDrop_Pa: drop, outletTemperature_K: out.T_K, secret: 7 };
    return solved(answerOf({ out }, results, [out], -wallLoss));
  },
  limits: () => [],
};

const kinds = {
  catalogue: { ...KNOWN_KINDS.catalogue, gravelBed: catalogue },
  solvers: { ...KNOWN_KINDS.solvers, gravelBed: bed as unknown as AnyKind },
};

const file = (settings: object) => ({
  ...letDown,
  model: { kind: 'peng-robinson', alpha: '1976', liquidVolume: 'corrected', bankPairs: true, pairs: [] },
  units: [
    letDown.units[0],
    { id: 'g', tag: 'G-101', kind: 'gravelBed', at: [300, 320], settings },
    { id: 'p', tag: 'PROD-1', kind: 'product', at: [500, 320], settings: {} },
  ],
  streams: [
    { id: 's1', number: '1', from: ['u1', 'out'], to: ['g', 'in'] },
    { id: 's2', number: '2', from: ['g', 'out'], to: ['p', 'in'] },
  ],
});

async function answerTo(settings: object): Promise<ReportInput> {
  const opened = openSketch(file(settings), { registry: kinds.catalogue });
  if (!opened.ok) throw new Error(JSON.stringify(opened.problems));
  const { input, available } = await solveSketch(opened.sketch, kinds);
  expect(available).toEqual([]);
  return input;
}

describe('a kind of catalogue and solve alone', () => {
  let whole: ReportInput;
  let lossless: ReportInput;
  let open: ReportInput;
  beforeAll(async () => {
    whole = await answerTo({ depth: '4 m', wallLoss: '12 kW' });
    lossless = await answerTo({ depth: '400 cm' });
    open = await answerTo({});
  });

  test('is solved in the network, and the balances close over it', () => {
    expect(whole.units.get(unitId('g'))).toMatchObject({ state: 'solved', heat_W: -12000 });
    const of = (number: string) => {
      const stream = whole.sketch.streams.find((s) => s.number === number)!;
      const result = whole.streams.get(stream.id);
      if (result?.state !== 'solved') throw new Error(`stream ${number} is not solved`);
      return result;
    };
    // 4 m of 5000 Pa/m below the feed's 30 bar.
    expect(of('2').P_Pa).toBeCloseTo(30e5 - 20000, 6);
    expect((of('1').H_W - of('2').H_W) / 12000).toBeCloseTo(1, 9);
    expect(of('2').T_K).toBeLessThan(of('1').T_K);
    expect(whole.closure?.complete).toBe(true);
    expect(whole.closure?.mass.relative).toBeLessThan(1e-11);
    expect(whole.closure?.energy.relative).toBeLessThan(1e-11);
  });

  test('its missing value is a gap at its place, its default an assumption of the register', () => {
    expect(open.gaps.map(({ at }) => [at.unit, at.path])).toContainEqual(['g', 'depth']);
    expect(open.units.get(unitId('g'))?.state).toBe('needs-value');
    const row = lossless.assumptions.find((assumed) => assumed.unit === 'g');
    expect(row).toMatchObject({ path: 'wallLoss', reason: 'No loss through the wall was given.' });
    expect(whole.assumptions.some((assumed) => assumed.unit === 'g')).toBe(false);
    expect(lossless.gaps).toEqual([]);
  });

  test('has an entry in the JSON Schema that takes its settings and refuses others', () => {
    const schema: Schema = sketchSchema(kinds.catalogue);
    expect(faults(schema, file({ depth: '4 m', wallLoss: '12 kW' }))).toEqual([]);
    expect(faults(schema, file({ depth: 'deep' }))).not.toEqual([]);
    expect(faults(schema, file({ dept: '4 m' }))).not.toEqual([]);
  });

  test('stands in the tables and in the CSV with its own results, not with what it hides', () => {
    const csv = writeCsv(buildReport(whole));
    const line = csv.split(/\r?\n/).find((text) => text.startsWith('G-101') && text.includes('solved'));
    expect(line).toBeDefined();
    expect(line).toMatch(/bed drop/i);
    expect(line).toMatch(/outlet temperature/i);
    expect(line).not.toMatch(/secret/i);
    expect(line).toContain('duty, removed 12.00 kW');
    expect(writeCsv(buildReport(lossless))).toContain('No loss through the wall was given.');
  });

  test('stands in the results JSON by its tag', () => {
    const { units } = resultsJson(whole, 0) as { readonly units: Readonly<Record<string, unknown>> };
    expect(units['G-101']).toMatchObject({
      kind: 'gravelBed',
      state: 'solved',
      in: { in: '1' },
      out: { out: '2' },
      heat_W: -12000,
      bedDrop_Pa: 20000,
    });
  });

  test('is drawn as a box with its tag, its lines ending at its sides', () => {
    const scene = reportScene(whole);
    const shape = scene.units.find(({ unit }) => unit === 'g')!;
    expect(shape).toMatchObject({ tag: 'G-101', state: 'solved' });
    expect(shape.symbol.paths.length).toBeGreaterThan(0);
    expect(shape.box.w).toBeGreaterThan(0);
    const [into, from] = scene.lines;
    expect(into?.points.at(-1)?.[0]).toBe(shape.box.x);
    expect(from?.points[0]?.[0]).toBe(shape.box.x + shape.box.w);
  });

  test('has a drawer whose fields set, refuse, assume and show what was solved', () => {
    const page = makePage(file({}), kinds.catalogue);
    page.stores.session.select([unitId('g')]);
    show(page);
    expect(field('depth').getAttribute('aria-required')).toBe('true');
    const put = (path: string, value: string): void => {
      fireEvent.change(field(path), { target: { value } });
      fireEvent.blur(field(path));
    };
    put('depth', '4 kg');
    expect(settingsOf(page, 'g')).toEqual({});
    put('depth', '4 m');
    put('wallLoss', '12 kW');
    expect(settingsOf(page, 'g')).toEqual({ depth: '4 m', wallLoss: '12 kW' });
    expect(sketchOf(page).units.find((unit) => unit.id === 'g')?.kind).toBe('gravelBed');
    const batch = { streams: [...whole.streams], units: [...whole.units], gone: [], findings: [] };
    act(() => page.stores.results.take(1, true, batch, 1));
    expect(screen.getByText('Bed drop')).toBeTruthy();
    expect(screen.getByText('Outlet temperature')).toBeTruthy();
    expect(screen.queryByText('Secret')).toBeNull();
  });
});
