// @vitest-environment jsdom
import { act, fireEvent, screen, within } from '@testing-library/react';
import { beforeAll, describe, expect, test } from 'vitest';
import { solveSketch } from '../../src/cli/run';
import { type ColumnResults, columnResults } from '../../src/drawing/columnProfiles';
import type { UnitResult } from '../../src/engine/network/types';
import type { ReportInput } from '../../src/report/input';
import { openSketch } from '../../src/sketch/read';
import { columnSettings, columnSketch } from './columnSketch';
import { field, makePage, type Page, settingsOf, show, sketchOf, undoLabels, unitId } from './page';

function open(settings: object = columnSettings): Page {
  const page = makePage(columnSketch(settings));
  page.stores.session.select([unitId('c')]);
  show(page);
  return page;
}
const fixedBy = (page: Page) => settingsOf(page, 'c').fixedBy;
const put = (path: string, value: string): void => {
  fireEvent.change(field(path), { target: { value } });
  fireEvent.blur(field(path));
};
const pick = (path: string, value: string): void => void fireEvent.change(field(path), { target: { value } });
const count = (): string | null | undefined => document.querySelector('.fixed-by .count')?.textContent;
const offered = (): readonly string[] =>
  [...document.querySelectorAll('.blank-row button')].map((button) => button.textContent ?? '');
const without = (row: number) => ({
  ...columnSettings,
  fixedBy: columnSettings.fixedBy.filter((_, k) => k !== row),
});

describe('the column drawer', () => {
  test('says stages and ends in words, and where each feed enters', () => {
    open();
    expect(field('stages').value).toBe('12');
    expect(screen.getByText('+ partial condenser + reboiler')).toBeTruthy();
    expect(screen.getByText('Feed 1, stream 1')).toBeTruthy();
    expect(field('feeds.feed1.stage').value).toBe('6');
  });

  test('offers as places of a feed only the ends that the column has', () => {
    open({ ...columnSettings, top: { distillate: 'none' }, fixedBy: [] });
    const places = within(screen.getByLabelText(/of feed 1: place/i)).getAllByRole('option');
    expect(places.map((option) => option.textContent)).toEqual(['stage', 'reboiler']);
  });

  test('refuses a feed below the last stage', () => {
    const page = open();
    put('feeds.feed1.stage', '13');
    expect(screen.getByText('From 1 to 12.')).toBeTruthy();
    expect(settingsOf(page, 'c').feeds).toEqual({ feed1: { stage: 6 } });
  });

  test('shows every row of what fixes it with its basis in sight', () => {
    open();
    expect(count()).toBe('fixed 2 of 2');
    expect(field('fixedBy.0.value').value).toBe('2.4');
    expect(field('fixedBy.1.value.share').value).toBe('38 %');
    expect(screen.getByText('of stream 1, mol')).toBeTruthy();
  });

  test('has no row for what only another column could have', () => {
    open();
    expect(screen.queryByText(/subcooling/i)).toBeNull();
    expect([...field('top.distillate').querySelectorAll('label')].map((l) => l.textContent)).toEqual([
      'liquid',
      'vapour',
      'no condenser',
    ]);
  });

  test('slides the reflux ratio in one step of undo', () => {
    const page = open();
    const input = field('fixedBy.0.value');
    input.focus();
    fireEvent.keyDown(input, { key: 'ArrowUp', altKey: true });
    fireEvent.keyDown(input, { key: 'ArrowUp', altKey: true });
    fireEvent.keyUp(input, { key: 'Alt' });
    expect((fixedBy(page) as { value: unknown }[])[0]?.value).not.toBe(2.4);
    expect(undoLabels(page)).toEqual(['slide C-101 reflux ratio']);
  });
});

describe('what fixes a column', () => {
  test('counts what is missing and lists what may fix it, save what would contradict', () => {
    open(without(0));
    expect(count()).toBe('fixed 1 of 2');
    expect(offered()).toEqual([
      'Reflux ratio',
      'Boil-up ratio',
      'Reflux',
      'Purity',
      'Recovery',
      'Temperature',
      'Condenser duty',
      'Reboiler duty',
    ]);
  });

  test('takes a missing row with its first value, in one step', () => {
    const page = open(without(0));
    fireEvent.click(screen.getByRole('button', { name: 'Temperature' }));
    expect(document.activeElement).toBe(field('fixedBy.1.value'));
    expect(count()).toBe('fixed 1 of 2');
    put('fixedBy.1.stage', '9');
    expect(undoLabels(page)).toEqual([]);
    put('fixedBy.1.value', '118 degC');
    expect((fixedBy(page) as unknown[])[1]).toEqual({ fix: 'temperature', stage: 9, value: '118 degC' });
    expect(count()).toBe('fixed 2 of 2');
    expect(undoLabels(page)).toEqual(['set C-101 temperature']);
  });

  test('keeps the row that is to be replaced until the new one has a value', () => {
    const page = open();
    pick('fixedBy.0.fix', 'recovery');
    expect(screen.getByText('Until a value is typed, reflux ratio 2.4 stays.')).toBeTruthy();
    pick('fixedBy.0.chemical', 'benzene');
    expect(fixedBy(page)).toEqual(columnSettings.fixedBy);
    put('fixedBy.0.value', '98');
    expect((fixedBy(page) as unknown[])[0]).toEqual({
      fix: 'recovery',
      product: 'vapourDistillate',
      chemical: 'benzene',
      value: '98 %',
    });
    expect(undoLabels(page)).toHaveLength(1);
    act(() => void page.stores.sketch.undo());
    expect(fixedBy(page)).toEqual(columnSettings.fixedBy);
    expect(field('fixedBy.0.value').value).toBe('2.4');
  });

  test('keeps a row that has no value yet while the drawer is closed, and takes no focus on opening again', () => {
    const page = open(without(0));
    fireEvent.click(screen.getByRole('button', { name: 'Temperature' }));
    put('fixedBy.1.stage', '9');
    act(() => page.stores.session.openDrawer(null));
    expect(document.querySelector('.fixed-by')).toBeNull();
    act(() => page.stores.session.openDrawer({ is: 'unit', id: unitId('c') }));
    expect(field('fixedBy.1.stage').value).toBe('9');
    expect(document.activeElement).toBe(document.body);
    put('fixedBy.1.value', '118 degC');
    expect((fixedBy(page) as unknown[])[1]).toEqual({ fix: 'temperature', stage: 9, value: '118 degC' });
    act(() => page.stores.session.openDrawer(null));
    act(() => page.stores.session.openDrawer({ is: 'unit', id: unitId('c') }));
    expect(count()).toBe('fixed 2 of 2');
  });

  test('leaves the old row when Esc is pressed in the empty new one', () => {
    const page = open();
    pick('fixedBy.0.fix', 'boilup');
    fireEvent.keyDown(field('fixedBy.0.value'), { key: 'Escape' });
    expect(field('fixedBy.0.value').value).toBe('2.4');
    expect(undoLabels(page)).toEqual([]);
  });

  test('counts a row only when nothing of it is missing', () => {
    open({
      ...columnSettings,
      fixedBy: [
        columnSettings.fixedBy[0],
        { fix: 'purity', product: 'bottoms', value: '1 %', basis: 'mole' },
      ],
    });
    expect(count()).toBe('fixed 1 of 2');
  });

  test('types heat removed as a size and keeps it as heat into the column', () => {
    const page = open(without(0));
    fireEvent.click(screen.getByRole('button', { name: 'Condenser duty' }));
    put('fixedBy.1.value', '550 kW');
    expect((fixedBy(page) as unknown[])[1]).toEqual({ fix: 'duty', at: 'condenser', value: '-550 kW' });
    expect(field('fixedBy.1.value').value).toBe('550 kW');
    expect(screen.getByText('removed')).toBeTruthy();
  });

  test('takes a flow as a share of a stream from the blank row', () => {
    const page = open(without(1));
    fireEvent.click(screen.getByRole('button', { name: 'Bottoms' }));
    pickByLabel('Bottoms: what it counts from', 's1');
    put('fixedBy.1.value', '62');
    expect((fixedBy(page) as unknown[])[1]).toEqual({
      fix: 'flow',
      product: 'bottoms',
      value: { share: '62 %', of: { stream: 's1' }, basis: 'mole' },
    });
  });

  test.each([
    ['both end products', [flow('vapourDistillate'), flow('bottoms')], 1],
    ['the same twice', [columnSettings.fixedBy[0], columnSettings.fixedBy[0]], 1],
    ['one recovery in both products', [recovery('vapourDistillate'), recovery('bottoms')], 1],
    ['an end that is not there', [{ fix: 'boilup', value: 2 }], 0, { reboiler: false }],
  ])('says a contradiction at its row before anything is solved: %s', (_, items, row, bottom?: object) => {
    open({ ...columnSettings, ...(bottom ? { bottom } : {}), fixedBy: items });
    const rows = [...document.querySelectorAll('.fixing')];
    expect(rows[row]?.querySelectorAll('.field-findings li')).toHaveLength(1);
    expect(
      rows.filter((_r, k) => k !== row).flatMap((r) => [...r.querySelectorAll('.field-findings')]),
    ).toEqual([]);
  });

  test('says that too much is fixed, and a row can be taken away', () => {
    const page = open({ ...columnSettings, bottom: { reboiler: false } });
    expect(count()).toBe('fixed 2 of 1');
    expect(document.querySelector('.fixed-by > .field-findings')?.textContent).toMatch(/1/);
    pick('fixedBy.1.fix', 'away');
    expect(fixedBy(page)).toEqual([columnSettings.fixedBy[0]]);
    expect(count()).toBe('fixed 1 of 1');
  });
});

describe('the ends of a column', () => {
  test('take the stream of the distillate and what is fixed of it along, in one step', () => {
    const page = open();
    fireEvent.click(screen.getByRole('radio', { name: 'liquid' }));
    expect(screen.getByText('+ total condenser + reboiler')).toBeTruthy();
    expect(sketchOf(page).streams.find((s) => s.id === 's2')?.from).toEqual(['c', 'liquidDistillate']);
    expect((fixedBy(page) as { product?: string }[])[1]?.product).toBe('liquidDistillate');
    expect(undoLabels(page)).toEqual(['set C-101 distillate']);
    act(() => void page.stores.sketch.undo());
    expect(settingsOf(page, 'c')).toEqual(columnSettings);
    expect(sketchOf(page).streams.find((s) => s.id === 's2')?.from).toEqual(['c', 'vapourDistillate']);
  });

  test('may both be missing: an absorber has nothing to fix, and an empty list says so', () => {
    const { fixedBy: _, top: __, bottom: ___, ...bare } = columnSettings;
    const page = open(bare);
    expect(count()).toBe('choose the ends first');
    fireEvent.click(screen.getByRole('radio', { name: 'no condenser' }));
    fireEvent.click(screen.getByRole('radio', { name: 'none' }));
    expect(count()).toBe('fixed 0 of 0');
    expect(fixedBy(page)).toEqual([]);
    expect(offered()).toEqual([]);
  });

  test('keep a pressure given for an end that has gone in sight, and say that it is not used', () => {
    open({ ...columnSettings, top: { distillate: 'none' }, fixedBy: [columnSettings.fixedBy[1]] });
    expect(field('pressure.condenser').value).toBe('1.10 bar');
    expect(screen.getByText(/no condenser: its pressure is kept and not used/)).toBeTruthy();
  });
});

describe('a solved column in its drawer', () => {
  let input: ReportInput;
  beforeAll(async () => {
    const opened = openSketch(structuredClone(columnSketch()));
    if (!opened.ok) throw new Error('the sketch does not open');
    ({ input } = await solveSketch(opened.sketch));
  });
  const solve = (page: Page, result: UnitResult | undefined = input.units.get(unitId('c'))): void =>
    act(() => {
      if (!result) throw new Error('no result');
      page.stores.results.take(
        1,
        true,
        { streams: [...input.streams], units: [[unitId('c'), result]], gone: [], findings: [] },
        1,
      );
    });

  const solvedColumn = (): ColumnResults => {
    solve(open());
    const results = columnResults(input.units.get(unitId('c'))?.results);
    if (!results) throw new Error('no profiles');
    return results;
  };

  test('tells duties by size and direction, and what fixed it', () => {
    const page = open();
    expect(document.querySelector('[data-profiles]')).toBeNull();
    solve(page);
    expect(screen.getByText('Condenser duty, removed')).toBeTruthy();
    expect(screen.getByText('Reboiler duty, added')).toBeTruthy();
    expect(document.querySelector('.fixed-text')?.textContent).toBe(
      '12 stages + partial condenser + reboiler; fixed by reflux ratio 2.4; vapour distillate 38 % of stream 1, mol.',
    );
    expect(screen.getByText('real trays = stages / overall efficiency (not set)')).toBeTruthy();
  });

  test('draws the profiles with a text for who cannot see them', () => {
    const page = open();
    solve(page);
    const label = screen.getByRole('img', { name: /^Profiles over 12 stages/ }).getAttribute('aria-label');
    expect(label).toMatch(
      /Temperature: temperature from [\d.]+ °C in the condenser to [\d.]+ °C in the reboiler/,
    );
    expect(label).toMatch(/feed at stage 6/);
    expect(label).not.toMatch(/NaN|undefined|–/);
  });

  test('reads the profiles off place by place with the arrow keys', () => {
    const results = solvedColumn();
    const hand = screen.getByRole('slider', { name: 'Place read off the profiles' });
    const reading = (): string => document.querySelector('.reading')?.textContent ?? '';
    act(() => hand.focus());
    expect(reading()).toMatch(/^Condenser/);
    fireEvent.keyDown(hand, { key: 'ArrowDown' });
    expect(reading()).toMatch(/^Stage 1/);
    // Derived: shown in °C with four figures.
    const T_degC = results.stages.T_K[0]! - 273.15;
    expect(reading()).toContain(`temperature ${T_degC.toPrecision(4)} °C`);
    expect(hand.getAttribute('aria-valuetext')).toContain(`Stage 1: temperature ${T_degC.toPrecision(4)} °C`);
    expect(document.querySelectorAll('.reading-mark circle').length).toBeGreaterThanOrEqual(6);
    fireEvent.keyDown(hand, { key: 'End' });
    expect(reading()).toMatch(/^Reboiler/);
    fireEvent.keyDown(hand, { key: 'ArrowDown' });
    expect(reading()).toMatch(/^Reboiler/);
    act(() => hand.blur());
    expect(reading()).toMatch(/^Point at a stage/);
  });

  test('reads off the place under the pointer, and nothing once it has left', () => {
    solvedColumn();
    const hand = screen.getByRole('slider', { name: 'Place read off the profiles' });
    const reading = (): string => document.querySelector('.reading')?.textContent ?? '';
    fireEvent.pointerMove(hand, { clientY: 1000 });
    expect(reading()).toMatch(/^Reboiler/);
    fireEvent.pointerMove(hand, { clientY: 0 });
    expect(reading()).toMatch(/^Condenser/);
    fireEvent.pointerLeave(hand);
    expect(reading()).toMatch(/^Point at a stage/);
  });

  test('has the figures of every place as a table that the keyboard reaches', () => {
    const page = open();
    solve(page);
    fireEvent.click(screen.getByRole('button', { name: 'Stage table' }));
    const region = screen.getByRole('region', { name: 'Stage table' });
    expect(region.tabIndex).toBe(0);
    const rows = within(region).getAllByRole('row').slice(1);
    expect(rows.map((row) => row.querySelector('th')?.textContent)).toEqual([
      'condenser',
      ...Array.from({ length: 12 }, (_, k) => String(k + 1)),
      'reboiler',
    ]);
  });

  test('shows other components on demand', () => {
    const page = open();
    solve(page);
    fireEvent.click(screen.getByRole('button', { name: /Components shown/ }));
    const boxes = screen.getAllByRole('checkbox') as HTMLInputElement[];
    expect(boxes).toHaveLength(3);
    fireEvent.click(boxes[1] as HTMLInputElement);
    const names = [...document.querySelectorAll('.profile-picture text')].map((t) => t.textContent);
    expect(names).toContain('benzene');
    expect(names).not.toContain('toluene');
  });

  test('shows no result and no profile beside "no solution"', () => {
    const page = open();
    solve(page);
    solve(page, { kind: 'column', state: 'no-solution', reasons: [] });
    expect(document.querySelector('[data-profiles]')).toBeNull();
    expect(screen.queryByText('Condenser duty, removed')).toBeNull();
  });
});

function flow(product: string): object {
  return { fix: 'flow', product, value: '20 kmol/h' };
}
function recovery(product: string): object {
  return { fix: 'recovery', product, chemical: 'toluene', value: '50 %' };
}
function pickByLabel(label: string, value: string): void {
  fireEvent.change(screen.getByLabelText(label), { target: { value } });
}
