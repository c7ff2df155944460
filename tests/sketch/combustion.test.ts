/** What a chamber brings into a sketch: chemicals, assumptions, what it asks for. */
import { describe, expect, test } from 'vitest';
import { makeMemory } from '../../src/engine/network/memory';
import type { ChamberResults } from '../../src/engine/units/chamber/types';
import { neededChemicals } from '../../src/sketch/compile';
import type { Json, Sketch } from '../../src/sketch/types';
import { finish, unitResult } from '../network/fixtures';
import { codes, compiled, gapsOf, opened, settingsOf } from './help';

const AIR = { excess: '15 %', T: '20 degC', P: '1.1 bar' };

function burner(
  settings: { [key: string]: Json },
  chemicals: readonly Json[] = ['methane', 'propane'],
  joined = false,
): Sketch {
  return opened({
    format: 'splitwright.sketch',
    version: 1,
    chemicals,
    model: { kind: 'peng-robinson', alpha: '1976', liquidVolume: 'corrected', bankPairs: true, pairs: [] },
    units: [
      {
        id: 'u1',
        tag: 'FEED-1',
        kind: 'feed',
        settings: {
          state: { T: '20 degC', P: '1.1 bar' },
          flow: '10 kmol/h',
          composition: { basis: 'mole', parts: { methane: 1 } },
        },
      },
      { id: 'u2', tag: 'F-101', kind: 'chamber', settings },
      {
        id: 'u3',
        tag: 'FEED-2',
        kind: 'feed',
        settings: {
          state: { T: '20 degC', P: '1.1 bar' },
          flow: '150 kmol/h',
          composition: { preset: 'humid air', relativeHumidity: '50 %' },
        },
      },
    ],
    streams: [
      { id: 's1', number: '1', from: ['u1', 'out'], to: ['u2', 'fuel1'] },
      { id: 's2', number: '2', from: ['u2', 'out'] },
      { id: 's3', number: '3', from: ['u3', 'out'], ...(joined ? { to: ['u2', 'air'] } : {}) },
    ],
  });
}
const withoutFeed2 = (sketch: Sketch): Sketch => ({
  ...sketch,
  units: sketch.units.slice(0, 2),
  streams: sketch.streams.slice(0, 2),
});

describe('a chamber brings', () => {
  test('what its fuel becomes and what its air is made of, as assumptions that say so', async () => {
    const c = await compiled(withoutFeed2(burner({ air: AIR })));
    expect(gapsOf(c)).toEqual([]);
    expect(c.basis?.chemicals.map((x) => x.id)).toEqual([
      'methane',
      'propane',
      'nitrogen',
      'oxygen',
      'argon',
      'carbon-dioxide',
      'water',
    ]);
    const reasons = c.assumptions.map((a) => a.reason);
    expect(reasons).toContain("Combustion needs water, which is not among the sketch's chemicals.");
    expect(reasons).toContain("Air needs argon, which is not among the sketch's chemicals.");
    expect(c.assumptions.filter((a) => a.unit === 'u2').map((a) => [a.path, a.unitText])).toEqual([
      ['air.composition', 'dry air'],
      ['p.drop', '0 bar'],
      ['heat.duty', '0 kW'],
    ]);
  });

  test('SO2 and HCl only where sulphur or chlorine is about', () => {
    const needed = (...chemicals: string[]) =>
      neededChemicals(withoutFeed2(burner({ air: { ...AIR, composition: { preset: '79/21' } } }, chemicals)));
    expect(needed('methane')).toEqual(['methane', 'nitrogen', 'oxygen', 'carbon-dioxide', 'water']);
    expect(needed('methane', 'hydrogen-sulfide')).toContain('sulfur-dioxide');
    expect(needed('methane', 'chloromethane')).toContain('hydrogen-chloride');
    expect(needed('hydrogen')).toEqual(['hydrogen', 'nitrogen', 'oxygen', 'water']);
  });

  test('nothing that is there already, under its own name or by its formula', () => {
    const own = {
      id: 'wasser',
      own: { name: 'Water', formula: 'H2O', MW: 18.015, Cp: [{ form: 'monatomic' }] },
    };
    const needed = neededChemicals(withoutFeed2(burner({ air: AIR }, ['carbon-dioxide', 'methane', own])));
    expect(needed).toEqual(['carbon-dioxide', 'methane', 'nitrogen', 'oxygen', 'argon']);
  });
});

describe('a chamber asks', () => {
  test('for its air while none is joined', async () => {
    expect(gapsOf(await compiled(withoutFeed2(burner({}))))).toEqual(['sketch/needs-one-of at air']);
    expect(gapsOf(await compiled(burner({}, undefined, true)))).toEqual([]);
  });

  test('for one way to say how much, and for the state of the air', async () => {
    const gaps = async (air: Json) => gapsOf(await compiled(withoutFeed2(burner({ air }))));
    expect(await gaps({ T: '20 degC', P: '1 bar' })).toEqual(['sketch/needs-one-of at air']);
    expect(await gaps({ ...AIR, stackO2Dry: '3 %' })).toEqual(['sketch/too-many at air']);
    expect(await gaps({ excess: '10 %' })).toEqual([
      'sketch/needs-value at air.T',
      'sketch/needs-value at air.P',
    ]);
    expect(await gaps({ ...AIR, excess: '-5 %' })).toEqual(['sketch/below-minimum at air.excess']);
  });
});

test('a chamber burns from sketch to flue gas, with drawn air and with air by stream', async () => {
  for (const joined of [false, true]) {
    const sketch = burner(joined ? {} : { air: AIR }, undefined, joined);
    const { basis, problem } = await compiled(joined ? sketch : withoutFeed2(sketch));
    const batch = finish(problem, makeMemory(basis!));
    const result = unitResult(batch, 'u2')!;
    expect(result.state).toBe('solved');
    const { excess, T_K } = result.results as unknown as ChamberResults;
    // Derived: 10 kmol/h of methane take 20 of oxygen; 150 of humid air hold about 31.
    expect(excess).toBeCloseTo(joined ? 0.55 : 0.15, 1);
    expect(T_K).toBeGreaterThan(1600);
    expect(batch.closure?.complete).toBe(true);
    expect(batch.closure!.energy.relative).toBeLessThan(1e-9);
    expect(batch.closure!.elements.C!.relative).toBeLessThan(1e-11);
    expect(codes(batch.findings)).toContain(joined ? 'chamber/hot' : 'chamber/too-hot-for-lining');
  }
});

test('settings of a chamber reach the engine in SI', async () => {
  const c = await compiled(
    withoutFeed2(
      burner({
        air: { ...AIR, composition: { preset: '79/21' } },
        heat: { lossOfLHV: '2 %' },
        p: { P: '1.05 bar' },
      }),
    ),
  );
  expect(settingsOf(c, 1)).toMatchObject({
    air: { excess: 0.15, T: 293.15, P: 1.1e5, composition: { is: 'preset', preset: '79/21' } },
    heat: { lossOfLHV: 0.02 },
    p: { P: 1.05e5 },
  });
});
