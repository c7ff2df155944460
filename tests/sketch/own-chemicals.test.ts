import { join } from 'node:path';
import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { describe, expect, test } from 'vitest';
import { solveSketch } from '../../src/cli/run';
import type { PhaseResult } from '../../src/engine/network/types';
import { buildReport } from '../../src/report/model';
import { writePdf } from '../../src/report/pdf/write';
import { resultsJson } from '../../src/report/resultsJson';
import type { Json } from '../../src/sketch/types';
import { sayFinding } from '../../src/wording';
import { codes, compiled, gapsOf, opened } from './help';

/** An invented heavy oil cut, complete for both models. */
const CUT = {
  name: 'Heavy cut',
  MW: 282.5,
  Tc: 768,
  Pc: 1.16e6,
  omega: 0.907,
  Hf: -456e3,
  S0: 930,
  Cp: [{ form: 'powers', of: 'Cp', c: [20, 1.7, -7e-4], Tmin: 250, Tmax: 1000 }],
  Psat: [{ form: 'antoine', log: '10', P: 'kPa', T: 'K', c: [6.28, 2030, -132], Tmin: 350, Tmax: 700 }],
  Hvap: [{ form: 'powers', c: [1.2e5, -95], Tmin: 310, Tmax: 720 }],
  rhoL: [{ form: 'powers', c: [3480, -2.45], Tmin: 310, Tmax: 650 }],
  groups: { ppr78: { CH3: 2, CH2: 18 } },
};
type Own = Readonly<Record<string, unknown>>;
const without = (...keys: readonly string[]): Own =>
  Object.fromEntries(Object.entries(CUT).filter(([key]) => !keys.includes(key)));

const PR = { kind: 'peng-robinson' };
const RAOULT = { kind: 'raoult' };
const WARM: Json = { T: '180 degC', P: '2 bar' };

/** A feed of propane, n-decane and the cut, let into a drum. */
const file = (own: Own, model: Own = PR, state: Json = WARM) => ({
  format: 'splitwright.sketch',
  version: 1,
  chemicals: ['propane', 'n-decane', { id: 'cut', own }],
  model,
  units: [
    {
      id: 'u1',
      tag: 'FEED-1',
      kind: 'feed',
      settings: {
        state,
        flow: '100 kmol/h',
        composition: { basis: 'mole', parts: { propane: '30 %', 'n-decane': '30 %', cut: '40 %' } },
      },
    },
    { id: 'u2', tag: 'V-1', kind: 'drum', settings: { h: { T: '200 degC' } } },
  ],
  streams: [{ id: 's1', number: '1', from: ['u1', 'out'], to: ['u2', 'in1'] }],
});
const solvedOf = async (own: Own, model: Own = PR, state: Json = WARM) =>
  (await solveSketch(opened(file(own, model, state)))).input;
interface Written {
  readonly solved: boolean;
  readonly streams: Readonly<
    Record<string, Readonly<Record<string, unknown>> & { readonly phases: Phase[] }>
  >;
  readonly basis: { readonly chemicals: readonly { readonly id: string }[] };
}
interface Phase {
  readonly kind: string;
  readonly fraction: number;
  readonly density_kg_m3: number;
  readonly x: Readonly<Record<string, number>>;
}
const written = async (...what: Parameters<typeof solvedOf>): Promise<Written> =>
  resultsJson(await solvedOf(...what), 0) as unknown as Written;

describe('a complete own chemical', () => {
  test.each([
    ['Peng–Robinson', PR],
    ["Raoult's law by the slope of the vapour pressure", RAOULT],
    ["Raoult's law with the heat of vaporisation given", { ...RAOULT, liquidH: 'hvap' }],
  ])('is flashed with %s and stands in the results', async (_, model) => {
    const results = await written(CUT, model);
    expect(results.solved).toBe(true);
    expect(results.basis.chemicals.map((c) => c.id)).toEqual(['propane', 'n-decane', 'cut']);
    const [vapour, liquid] = results.streams['1']!.phases;
    expect([vapour?.kind, liquid?.kind]).toEqual(['vapour', 'liquid']);
    expect(liquid!.x.cut!).toBeGreaterThan(20 * vapour!.x.cut!);
    expect(liquid!.density_kg_m3).toBeGreaterThan(500);
    expect(results.streams['1']!.s_J_molK).toEqual(expect.any(Number));
  });

  test('has the density that it came with, where it is the liquid', async () => {
    const alone = file(CUT);
    const parts = { basis: 'mole', parts: { cut: 1 } };
    alone.units[0]!.settings = { ...alone.units[0]!.settings, composition: parts } as never;
    for (const model of [PR, RAOULT]) {
      const { input } = await solveSketch(opened({ ...alone, model }));
      const { streams } = resultsJson(input, 0) as unknown as Written;
      // Derived: 3480 - 2.45 T mol/m3 at 453.15 K; 2 bar lies next to saturation.
      const expected = (3480 - 2.45 * 453.15) * 0.2825;
      expect(Math.abs(streams['1']!.phases[0]!.density_kg_m3 / expected - 1)).toBeLessThan(1e-3);
    }
  });

  test('stands with its pairs in the tables and in the PDF', async () => {
    const input = await solvedOf(CUT);
    const rows = buildReport(input).pairs.rows.map((row) => row.label);
    expect(rows).toContain('Propane + Heavy cut');
    const font = (name: string): string => join(import.meta.dirname, '../../public/fonts', name);
    const bytes = await writePdf(
      { ...input, day: '2026-01-15' },
      {
        normal: font('SourceSans3-Regular.ttf'),
        bold: font('SourceSans3-SemiBold.ttf'),
        italics: font('SourceSans3-Italic.ttf'),
      },
    );
    const document = await getDocument({ data: new Uint8Array(bytes), verbosity: 0 }).promise;
    let all = '';
    for (let k = 1; k <= document.numPages; k++) {
      const { items } = await (await document.getPage(k)).getTextContent();
      all += items.map((item) => ('str' in item ? item.str : '')).join(' ');
    }
    expect(all.replace(/\s+/g, ' ')).toMatch(/Propane \+ Heavy cut .*predicted.* n- ?Decane \+ Heavy cut/);
  });
});

describe('what an own chemical lacks', () => {
  test.each([
    ['peng-robinson', 'Tc', 'Tc_K'],
    ['peng-robinson', 'Pc', 'Pc_Pa'],
    ['peng-robinson', 'omega', 'omega'],
    ['raoult', 'Psat', 'vapor_pressure'],
  ])('is named where %s needs %s', async (kind, key, lacks) => {
    const c = await compiled(opened(file(without(key), { kind })));
    expect(gapsOf(c)).toEqual(['sketch/chemical-lacks at chemicals.2']);
    expect(c.gaps[0]?.evidence.map((e) => e.text)).toEqual(['cut', lacks]);
    expect(c.basis).toBeUndefined();
  });
  test('does not matter to a model that does without', async () => {
    expect(gapsOf(await compiled(opened(file(without('Psat', 'Hvap')))))).toEqual([]);
    expect(gapsOf(await compiled(opened(file(without('Tc', 'Pc', 'omega', 'Hvap'), RAOULT))))).toEqual([]);
    expect(gapsOf(await compiled(opened(file(without('Hvap'), { ...RAOULT, liquidH: 'hvap' }))))).toEqual([
      'sketch/chemical-lacks at chemicals.2',
    ]);
  });

  test('no enthalpy of formation: enthalpy starts at 0, an assumption', async () => {
    const input = await solvedOf(without('Hf'));
    expect(input.assumptions).toContainEqual(
      expect.objectContaining({
        path: 'chemicals.2.Hf',
        value: 0,
        reason: expect.stringContaining('Heavy cut'),
      }),
    );
    expect(input.gaps).toEqual([]);
  });

  test('no standard entropy: entropy is not shown, a note says so, and a state by entropy is refused', async () => {
    const input = await solvedOf(without('S0'));
    const { solved, streams } = resultsJson(input, 0) as unknown as Written;
    expect(solved).toBe(true);
    expect(streams['1']).not.toHaveProperty('s_J_molK');
    expect(streams['1']).not.toHaveProperty('S_W_K');
    expect(codes(input.findings)).toContain('sketch/no-standard-entropy');
    const asked = await solvedOf(without('S0'), PR, { P: '2 bar', entropy: '100 J/(mol K)' });
    expect(asked.units.get('u1' as never)?.state).toBe('no-solution');
    expect(JSON.stringify([...asked.units.values()])).toContain('equilibrium/no-entropy');
  });

  test('nothing that tells a liquid volume: 800 kg/m3, an assumption; a density or critical constants tell', async () => {
    const bare = await solvedOf(without('Tc', 'Pc', 'omega', 'rhoL'), RAOULT);
    expect(bare.assumptions).toContainEqual(
      expect.objectContaining({ path: 'chemicals.2.rhoL', value: 800 }),
    );
    for (const own of [without('Tc', 'Pc', 'omega'), without('rhoL'), without('omega')])
      expect((await solvedOf(own, RAOULT)).assumptions.map((a) => a.path)).not.toContain('chemicals.2.rhoL');
  });
});

describe('a correlation that cannot be used is refused with its place and the reason', () => {
  const antoine = (c: number[], more: object = {}) => ({
    form: 'antoine',
    log: 'e',
    P: 'Pa',
    T: 'K',
    c,
    ...more,
  });
  test.each([
    [
      'two ranges that overlap',
      {
        Cp: [
          { form: 'powers', c: [100], Tmin: 250, Tmax: 500 },
          { form: 'powers', c: [120], Tmin: 450, Tmax: 900 },
        ],
      },
      'Cp.1',
      'overlap',
      '(correlation 2)',
    ],
    [
      'a heat capacity below zero',
      { Cp: [{ form: 'powers', c: [100, -0.3], Tmin: 250, Tmax: 900 }] },
      'Cp.0',
      'value',
      'not above zero',
    ],
    [
      'a vapour pressure that falls',
      { Psat: [antoine([15, -2000, 0], { Tmin: 300, Tmax: 600 })] },
      'Psat.0',
      'falling',
      'falls with rising temperature',
    ],
    [
      'a vapour pressure out of all measure',
      { Psat: [antoine([20, 2e9, 0])] },
      'Psat.0',
      'value',
      'not above zero',
    ],
    [
      'a critical temperature of zero in a form',
      { rhoL: [{ form: 'rho_tau4', c: [1000, 1, 1, 1, 1, 0] }] },
      'rhoL.0',
      'coefficients',
      'critical temperature',
    ],
    ['too few coefficients', { Cp: [{ form: 'cp_nasa9', c: [1] }] }, 'Cp.0', 'coefficients', 'missing'],
    [
      'a heat of vaporisation below zero',
      { Hvap: [{ form: 'powers', c: [1e4, -40], Tmin: 300, Tmax: 700 }] },
      'Hvap.0',
      'value',
      'heat of vaporisation',
    ],
    [
      'a liquid heat capacity of zero',
      { cpL: [{ form: 'powers', c: [0], Tmin: 300, Tmax: 700 }] },
      'cpL.0',
      'value',
      'liquid heat capacity',
    ],
  ])('%s', async (_, change, place, fault, says) => {
    for (const model of [PR, RAOULT]) {
      const sketch = opened(file({ ...CUT, ...change }, model));
      const c = await compiled(sketch);
      expect(gapsOf(c)).toEqual([`sketch/correlation-not-usable at chemicals.2.own.${place}`]);
      expect(c.gaps[0]?.evidence.find((e) => e.name === 'fault')?.text).toBe(fault);
      const { sentence, next } = sayFinding(c.gaps[0]!, { measures: 'metric', chemical: () => 'Heavy cut' });
      expect(sentence).toContain('of Heavy cut');
      expect(sentence).toContain(says);
      expect(next).toMatch(/\.$/);
      expect(c.basis).toBeUndefined();
      expect((await solveSketch(sketch)).input.units.size).toBe(0);
    }
  });

  test.each([
    ['Tc', 2e4, 'sketch/above-maximum', 'The critical temperature of chemical 3 is'],
    ['Pc', 3, 'sketch/below-minimum', 'The critical pressure of chemical 3 is'],
    ['MW', 1e300, 'sketch/above-maximum', 'The molar mass of chemical 3 is'],
    ['Hf', -1e12, 'sketch/below-minimum', 'The enthalpy of formation of chemical 3 is'],
  ])('a constant that no chemical can have: %s of %d', async (key, value, code, says) => {
    const c = await compiled(opened(file({ ...CUT, [key]: value })));
    expect(gapsOf(c)).toEqual([`${code} at chemicals.2.own.${key}`]);
    expect(sayFinding(c.gaps[0]!, { measures: 'metric' }).sentence).toContain(says);
  });

  test('a form that is none for the property is refused on opening', () => {
    expect(() => opened(file({ ...CUT, Cp: [{ form: 'wagner25', c: [1, 1, 1, 1, 700, 1e6] }] }))).toThrow(
      'form-does-not-fit',
    );
  });
});

const isFinitePhase = (phase: PhaseResult): boolean =>
  [phase.density_kg_m3, phase.h_J_mol, phase.cp_J_molK, phase.Z, phase.fraction].every(Number.isFinite);

test('whatever numbers an own chemical has, opening, compiling and solving end with an answer or a reason', async () => {
  let seed = 20240601;
  const random = (): number => {
    seed = (Math.imul(seed, 1664525) + 1013904223) >>> 0;
    return seed / 2 ** 32;
  };
  const spoilt = (value: unknown): unknown => {
    if (typeof value === 'number') {
      if (random() > 0.12) return value;
      return [0, -value, value * 1e3, value * 1e-3, 1e300, -1e-300, value * (1 + random())][
        Math.floor(random() * 7)
      ];
    }
    if (Array.isArray(value)) return value.map(spoilt);
    if (typeof value === 'object' && value !== null)
      return Object.fromEntries(Object.entries(value).map(([k, v]) => [k, spoilt(v)]));
    return value;
  };
  const ends = { closed: 0, refused: 0, solved: 0, unsolved: 0 };
  for (let k = 0; k < 120; k++) {
    const raw = file(
      spoilt(CUT) as Own,
      k % 2 === 0 ? PR : { ...RAOULT, liquidH: k % 4 === 1 ? 'hvap' : 'psat-slope' },
    );
    let sketch: ReturnType<typeof opened>;
    try {
      sketch = opened(raw);
    } catch (error) {
      // Only what the file reader itself says; anything else is a fault of ours.
      expect((error as Error).message).toMatch(/^\[\{"path"|^\[\{"/);
      ends.closed++;
      continue;
    }
    const { input } = await solveSketch(sketch);
    if (input.gaps.length > 0) ends.refused++;
    else if ([...input.units.values()].every((unit) => unit.state === 'solved')) {
      ends.solved++;
      const states = [...input.streams.values()].filter((stream) => stream.state === 'solved');
      const wrong = states.flatMap((stream) => stream.phases.filter((phase) => !isFinitePhase(phase)));
      expect([wrong, JSON.stringify(raw.chemicals)]).toEqual([[], expect.anything()]);
    } else ends.unsolved++;
  }
  console.info(JSON.stringify(ends));
  expect(ends.refused).toBeGreaterThan(5);
  expect(ends.solved).toBeGreaterThan(10);
}, 60_000);
