import { describe, expect, test } from 'vitest';
import { type BalanceBasis, basisChoices } from '../../src/balance/basis';
import { sidesOf } from '../../src/balance/sides';
import type { ChemicalData } from '../../src/engine/chemicals/types';
import type { StreamId, UnitId } from '../../src/engine/ids';
import type { Basis, StreamResult, UnitResult } from '../../src/engine/network/types';
import { CATALOGUE } from '../../src/engine/units/catalogue';
import type { SketchStream, SketchUnit } from '../../src/sketch/types';
import type { Shown } from '../../src/store/shown';

// Invented figures; each side is added up by hand.
const unit = (id: string, kind: string): SketchUnit => ({
  id: id as UnitId,
  tag: id.toUpperCase(),
  kind,
  at: [0, 0],
  settings: {},
});
const stream = (id: string, from?: [string, string], to?: [string, string]): SketchStream => ({
  id: id as StreamId,
  number: id.slice(1),
  ...(from ? { from: from as [UnitId, string] } : {}),
  ...(to ? { to: to as [UnitId, string] } : {}),
});
const sketch = {
  units: [unit('f', 'feed'), unit('e', 'cooler'), unit('p', 'product')],
  streams: [stream('s1', ['f', 'out'], ['e', 'in']), stream('s2', ['e', 'out'], ['p', 'in'])],
};
const result = (m_kg_s: number, HfromIdeal_W: number, z: readonly number[]): StreamResult => ({
  state: 'solved',
  T_K: 300,
  P_Pa: 1e5,
  n_mol_s: 10,
  m_kg_s,
  MW_g_mol: 20,
  H_W: HfromIdeal_W - 1e6,
  HfromIdeal_W,
  h_J_mol: 0,
  vapourFraction: 1,
  vapourMassFraction: 1,
  z: Float64Array.from(z),
  volume_m3_s: 1,
  phases: [],
});
const data = {
  id: 'b',
  chemicals: [
    { id: 'a', name: 'A', MW_g_mol: 16, elements: { C: 1, H: 4 }, corr: {}, sources: {} },
    { id: 'b', name: 'B', MW_g_mol: 18, elements: { H: 2, O: 1 }, corr: {}, sources: {} },
  ] satisfies ChemicalData[],
} as unknown as Basis;

interface Known {
  readonly streams?: readonly (readonly [string, Shown<StreamResult>])[];
  readonly units?: readonly (readonly [string, Shown<UnitResult>])[];
}
const sides = (basis: BalanceBasis, { streams = [], units = [] }: Known, shape = sketch) =>
  sidesOf({
    sketch: shape,
    kinds: CATALOGUE,
    results: {
      streams: new Map(streams.map(([id, shown]) => [id as StreamId, shown])),
      units: new Map(units.map(([id, shown]) => [id as UnitId, shown])),
    },
    data,
    basis,
    describe: (s) => s.number,
  });
const solved: Known = {
  streams: [
    ['s1', { latest: result(2, 5000, [0.5, 0.5]) }],
    ['s2', { latest: result(2, -1000, [0.5, 0.5]) }],
  ],
  units: [['e', { latest: { kind: 'cooler', state: 'solved', heat_W: -6000, power_W: 0 } }]],
};

describe('what goes in and out', () => {
  test('feeds stand in and products out, streams between units do not count', () => {
    const { in: into, out } = sides({ is: 'mass' }, solved);
    expect([into.total, out.total]).toEqual([2, 2]);
    expect([into.segments.length, out.segments.length]).toEqual([1, 1]);
  });

  test('energy: heat removed leaves, a negative enthalpy is drawn on the other side, and both sides meet', () => {
    const { in: into, out, fromIdeal } = sides({ is: 'energy' }, solved);
    expect(fromIdeal).toBe(true);
    expect(into.segments.map(({ value, turned, what }) => [what, value, turned])).toEqual([
      ['stream', 5000, false],
      ['stream', 1000, true],
    ]);
    expect(out.segments.map(({ value, turned, what }) => [what, value, turned])).toEqual([
      ['heat', 6000, false],
    ]);
    expect(into.total).toBe(out.total);
  });

  test('energy counts from the elements as soon as something reacts', () => {
    const made = Float64Array.of(-1, 1);
    const { fromIdeal } = sides(
      { is: 'energy' },
      { ...solved, units: [['e', { latest: { kind: 'cooler', state: 'solved', made_mol_s: made } }]] },
    );
    expect(fromIdeal).toBe(false);
  });

  test('a chemical that reactions consume leaves as consumed', () => {
    const { out } = sides(
      { is: 'chemical', index: 0 },
      {
        streams: [
          ['s1', { latest: result(2, 0, [0.5, 0.5]) }],
          ['s2', { latest: result(2, 0, [0.4, 0.6]) }],
        ],
        units: [['e', { latest: { kind: 'cooler', state: 'solved', made_mol_s: Float64Array.of(-1, 1) } }]],
      },
    );
    expect(out.segments.map(({ what, value }) => [what, value])).toEqual([
      ['stream', 4],
      ['made', 1],
    ]);
  });

  // Derived: 10 mol/s x (0.5 x 4 + 0.5 x 2) = 30 mol/s of hydrogen atoms.
  test('an element is counted in atoms', () => {
    expect(sides({ is: 'element', symbol: 'H' }, solved).in.total).toBe(30);
  });

  test('a stream without a result is named as not known', () => {
    const { out } = sides({ is: 'mass' }, { streams: [['s1', { latest: result(2, 0, [1, 0]) }]] });
    expect(out.unknown).toEqual(['2']);
    expect(out.segments).toEqual([]);
  });

  test('an older result stands in as out of date', () => {
    const { in: into } = sides(
      { is: 'mass' },
      { streams: [['s1', { latest: { state: 'waiting' }, older: result(3, 0, [1, 0]) }]] },
    );
    expect(into.segments[0]).toMatchObject({ value: 3, outOfDate: true });
  });

  test('a hanging outlet counts as leaving', () => {
    const shape = { units: sketch.units, streams: [stream('s1', ['f', 'out'])] };
    const { in: into, out } = sides({ is: 'mass' }, solved, shape);
    expect([into.total, out.total]).toEqual([2, 2]);
  });

  test('the largest stands first, and an empty sheet is empty', () => {
    const shape = {
      units: [unit('f', 'feed'), unit('g', 'feed')],
      streams: [stream('s1', ['f', 'out'], ['x', 'in1']), stream('s2', ['g', 'out'], ['x', 'in2'])],
    };
    const known = [
      ['s1', { latest: result(1, 0, [1, 0]) }],
      ['s2', { latest: result(4, 0, [1, 0]) }],
    ] as const;
    expect(sides({ is: 'mass' }, { streams: known }, shape).in.segments.map((s) => s.value)).toEqual([4, 1]);
    expect(sides({ is: 'mass' }, {}, { units: [], streams: [] }).empty).toBe(true);
  });
});

describe('bases to choose from', () => {
  test('elements are offered only when every chemical has a formula', () => {
    expect(basisChoices(data).map((c) => c.text)).toEqual([
      'mass',
      'moles',
      'energy',
      'A',
      'B',
      'element C',
      'element H',
      'element O',
    ]);
    const [first, second] = data.chemicals;
    const { elements: _, ...bare } = second as ChemicalData;
    const without = { ...data, chemicals: [first as ChemicalData, bare] };
    expect(basisChoices(without).some((c) => c.basis.is === 'element')).toBe(false);
  });
});
