import { expect, test } from 'vitest';
import { keepScene } from '../../src/canvas/keepScene';
import { createSheetStore } from '../../src/canvas/sheetStore';
import { wholeState } from '../../src/canvas/whole';
import { answer, letDown, solveAll, solvedStream, storesOf, streamId, unitId } from './fixture';

function sheetOn(sketch = letDown()) {
  const stores = storesOf(sketch);
  const sheet = createSheetStore();
  keepScene(stores, sheet, () => 1);
  return { stores, sheet };
}

test('a label shows the chosen quantities in the order and measures of the sketch', () => {
  const { stores, sheet } = sheetOn();
  answer(stores, 1, { streams: { s1: solvedStream() } });
  // 1000/36 mol/s is 100 kmol/h; 313.15 K is 40 degC; 5e5 Pa is 5 bar.
  expect(sheet.getState().labels.get(streamId('s1'))?.rows).toEqual([
    { number: '100.0', unit: 'kmol/h' },
    { number: '40.00', unit: '°C' },
    { number: '5.000', unit: 'bar(a)' },
  ]);
  stores.sketch.apply('show SI', (sketch) => ({
    ...sketch,
    display: { set: 'SI', labels: ['vapourFraction', 'pressure'] },
  }));
  expect(sheet.getState().labels.get(streamId('s1'))?.rows).toEqual([
    { number: '0', unit: 'mol/mol' },
    { number: '500.0', unit: 'kPa(a)' },
  ]);
});

test('gauge pressures count from the site of the sketch', () => {
  const sketch = letDown();
  const { stores, sheet } = sheetOn({
    ...sketch,
    site: { pressure: '1 bar' },
    display: { set: 'metric', labels: ['pressure'], gauge: true },
  });
  answer(stores, 1, { streams: { s1: solvedStream() } });
  expect(sheet.getState().labels.get(streamId('s1'))?.rows).toEqual([{ number: '4.000', unit: 'bar(g)' }]);
});

test('a stream without a result has no label, one with an older result keeps it', () => {
  const { stores, sheet } = sheetOn();
  expect(sheet.getState().labels.size).toBe(0);
  solveAll(stores);
  answer(stores, 2, {
    streams: { s3: { state: 'waiting' } },
    units: { u3: { kind: 'drum', state: 'waiting' } },
  });
  const { labels, units } = sheet.getState();
  expect(labels.get(streamId('s3'))).toMatchObject({ stale: true });
  expect(labels.get(streamId('s1'))).toMatchObject({ stale: false });
  expect(units.get(unitId('u3'))?.state).toBe('out-of-date');
});

test('with no solution nothing older is shown', () => {
  const { stores, sheet } = sheetOn();
  solveAll(stores);
  answer(stores, 2, {
    streams: { s3: { state: 'no-solution' } },
    units: { u3: { kind: 'drum', state: 'no-solution' } },
  });
  expect(sheet.getState().labels.has(streamId('s3'))).toBe(false);
  expect(sheet.getState().units.get(unitId('u3'))?.state).toBe('no-solution');
});

test('one result that changes changes one label and no unit', () => {
  const { stores, sheet } = sheetOn();
  solveAll(stores);
  const before = sheet.getState();
  answer(stores, 2, { streams: { s2: solvedStream({ T_K: 320.15 }) } });
  const after = sheet.getState();
  const changed = [...after.labels].filter(([id, label]) => before.labels.get(id) !== label);
  expect(changed.map(([id]) => id)).toEqual(['s2']);
  expect([...after.units.values()]).toEqual([...before.units.values()]);
  expect([...after.units].every(([id, shape]) => before.units.get(id) === shape)).toBe(true);
});

test('a screen reader hears tag, kind, state and the worst limit of a unit', () => {
  const { stores, sheet } = sheetOn();
  solveAll(stores);
  answer(stores, 2, {
    findings: [
      { code: 'valve/test', weight: 'note', at: { unit: unitId('u2') }, evidence: [] },
      { code: 'valve/two-phase', weight: 'caution', at: { unit: unitId('u2') }, evidence: [] },
    ],
  });
  const { unitNames, streamNames } = sheet.getState();
  expect(unitNames.get(unitId('u2'))).toMatch(/^PV-101, valve, solved, caution: \S/);
  expect(unitNames.get(unitId('u3'))).toBe('V-101, flash drum, solved');
  expect(streamNames.get(streamId('s2'))).toBe(
    'Stream 2, PV-101 to V-101, 100.0 kmol/h, 40.00 °C, 5.000 bar(a)',
  );
  expect(streamNames.get(streamId('s4'))).toMatch(/^Stream 4, V-101 to nowhere yet/);
});

test('before the first answer, what compiling misses shows on the unit and in the title strip', () => {
  const { stores, sheet } = sheetOn();
  stores.compiled.setState({
    gaps: [
      { code: 'sketch/no-chemicals', weight: 'caution', at: { path: 'chemicals' }, evidence: [] },
      { code: 'sketch/needs-inlet', weight: 'caution', at: { unit: unitId('u5'), port: 'in' }, evidence: [] },
    ],
  });
  expect(sheet.getState().units.get(unitId('u5'))?.state).toBe('needs-value');
  expect(sheet.getState().units.get(unitId('u2'))?.state).toBe('waiting');
  expect(sheet.getState().unitNames.get(unitId('u5'))).toMatch(/^E-101, heater, needs a value: \S/);
  const { sketch, edit } = stores.sketch.getState();
  const { word, rest } = wholeState(sketch, edit, stores.results.getState(), stores.compiled.getState().gaps);
  expect(word + rest).toMatch(/^Not solved yet: .+, E-101 needs a value$/);
});

test('what is gone from the sketch leaves the selection and the drawer', () => {
  const { stores } = sheetOn();
  stores.session.select([unitId('u5')]);
  stores.sketch.apply('delete E-101', (sketch) => ({
    ...sketch,
    units: sketch.units.filter((u) => u.id !== 'u5'),
    streams: sketch.streams.filter((s) => s.id !== 's5'),
  }));
  expect(stores.session.getState()).toMatchObject({ units: [], drawer: null });
});

test('the title strip names what stops the train, first cause first', () => {
  const { stores } = sheetOn();
  const state = () => {
    const { sketch, edit } = stores.sketch.getState();
    const { word, rest } = wholeState(sketch, edit, stores.results.getState());
    return `${word}${rest}`;
  };
  expect(state()).toBe('Not solved yet');
  solveAll(stores);
  expect(state()).toBe('Solved in 12 ms, edit 1');
  answer(stores, 2, {
    units: {
      u2: { kind: 'valve', state: 'needs-value' },
      u3: { kind: 'drum', state: 'waiting' },
      u5: { kind: 'heater', state: 'no-solution' },
    },
  });
  expect(state()).toBe('Not solved yet: PV-101 needs a value, E-101 has no solution');
  stores.sketch.apply('clear', (sketch) => ({ ...sketch, units: [], streams: [] }));
  expect(state()).toBe('Nothing to solve yet');
});
