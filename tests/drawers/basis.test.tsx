// @vitest-environment jsdom
import { act, fireEvent, screen } from '@testing-library/react';
import { beforeEach, describe, expect, test } from 'vitest';
import { solveSketch } from '../../src/cli/run';
import { field, letDown, makePage, type Page, show, sketchOf, undoLabels } from './page';

let page: Page;
const type = (path: string, text: string): void => {
  const input = field(path);
  fireEvent.change(input, { target: { value: text } });
  fireEvent.blur(input);
};
const choose = (path: string, value: string): void => {
  fireEvent.change(field(path), { target: { value } });
};
const press = (name: string | RegExp): void => {
  fireEvent.click(screen.getByRole('button', { name }));
};

beforeEach(async () => {
  page = makePage(letDown);
  // The answers are the engine's own, so that a verdict is judged on what it would be judged on.
  const { input } = await solveSketch(sketchOf(page));
  page.stores.results.setState({
    streams: new Map([...input.streams].map(([id, latest]) => [id, { latest }])) as never,
  });
  page.stores.compiled.setState({
    basis: input.basis,
    problem: { site: { pressure_Pa: 101325 } } as never,
    assumptions: input.assumptions,
  });
  page.stores.session.openDrawer({ is: 'basis' });
  show(page);
});

describe('the design basis drawer', () => {
  test('takes the purpose, and says which purposes take the warning away', () => {
    type('title.purpose', 'For review');
    expect(sketchOf(page).title.purpose).toBe('For review');
    expect(screen.getByText(/Every page warns/)).toBeTruthy();
  });

  test('adds revisions on top with the next mark, and undo takes one away again', () => {
    press('Add a revision');
    type('revisions.0.what', 'First issue');
    press('Add a revision');
    expect(sketchOf(page).revisions?.map((r) => [r.mark, r.what])).toEqual([
      ['B', undefined],
      ['A', 'First issue'],
    ]);
    expect(undoLabels(page)).toEqual(['revision table', 'revision table', 'revision table']);
    page.stores.sketch.undo();
    expect(sketchOf(page).revisions?.map((r) => r.mark)).toEqual(['A']);
    // A mark cannot be emptied away.
    type('revisions.0.mark', ' ');
    expect(sketchOf(page).revisions?.[0]?.mark).toBe('A');
  });

  test('gives the first entry the revision of the title block, which then shows the newest entry and where to change it', () => {
    act(() => page.stores.sketch.apply('title', (s) => ({ ...s, title: { ...s.title, revision: 'C' } })));
    press('Add a revision');
    expect(sketchOf(page).revisions?.map((r) => r.mark)).toEqual(['C']);
    press('Add a revision');
    act(() => page.stores.session.openDrawer({ is: 'sketch' }));
    const mark = screen.getByRole('status', { name: 'Revision' });
    expect(mark.textContent).toBe('D');
    expect(document.querySelector('[data-field="title.revision"] input')).toBeNull();
    expect(screen.getByText(/“C”, typed here before, is kept/)).toBeTruthy();
    press('Change it in the table');
    expect(page.stores.session.getState().drawer).toEqual({ is: 'basis' });
    type('revisions.0.mark', '0');
    act(() => page.stores.session.openDrawer({ is: 'sketch' }));
    expect(screen.getByRole('status', { name: 'Revision' }).textContent).toBe('0');
    // Without entries the field is its own again, with the word it had.
    act(() => page.stores.sketch.apply('clear', ({ revisions: _, ...s }) => s));
    expect(field('title.revision').value).toBe('C');
  });

  test('judges a requirement against the results at once, in any unit that is typed', () => {
    press('Add a requirement');
    choose('designBasis.requirements.0.stream', 's3');
    choose('designBasis.requirements.0.of', 'pressure');
    const verdict = (): string => document.querySelector('.basis-verdict')?.textContent ?? '';
    expect(verdict()).toContain('Not known: no limit is given');
    // Stream 3 leaves the drum at the valve's 5 bar.
    type('designBasis.requirements.0.max', '5.2 bar');
    expect(verdict()).toMatch(/^Met: 5\.00000 bar\(a\)/);
    type('designBasis.requirements.0.max', '3 barg');
    // Derived: 3 bar above 1.01325 bar is 4.01325 bar(a), missed by 0.98675 bar.
    expect(verdict()).toMatch(/^Missed by 0\.987 bar: 5\.00000 bar\(a\)/);
    expect(sketchOf(page).designBasis?.requirements).toEqual([
      { stream: 's3', of: 'pressure', chemical: 'methane', max: '3 barg' },
    ]);
    choose('designBasis.requirements.0.of', 'temperature');
    expect(sketchOf(page).designBasis?.requirements?.[0]?.max).toBeUndefined();
  });

  test('keeps utility levels and the approach, and refuses what is no temperature', () => {
    press('Add a level');
    type('designBasis.utilities.0.name', 'Hot oil');
    type('designBasis.utilities.0.supply', '280 degC');
    type('designBasis.utilities.0.back', '3 kg/h');
    type('designBasis.approach', '15 K');
    expect(sketchOf(page).designBasis).toEqual({
      utilities: [{ name: 'Hot oil', use: 'heating', supply: '280 degC' }],
      approach: '15 K',
    });
  });

  test('raises a HOLD on an assumption with the next number', () => {
    const [first] = page.stores.compiled.getState().assumptions;
    press('Raise a HOLD');
    choose('holds.0.path', `${first?.unit ?? ''} ${first?.path}`);
    type('holds.0.owner', 'Process');
    // "By" names a person in revisions: the day of a HOLD is another word.
    expect(screen.getByLabelText('Due').closest('[data-field="holds.0.date"]')).not.toBeNull();
    type('holds.0.date', '2026-03-01');
    press('Raise a HOLD');
    expect(sketchOf(page).holds?.map((h) => h.no)).toEqual(['1', '2']);
    expect(sketchOf(page).holds?.[0]).toMatchObject({
      path: first?.path,
      owner: 'Process',
      date: '2026-03-01',
    });
    press('Remove HOLD 1');
    expect(sketchOf(page).holds?.map((h) => h.no)).toEqual(['2']);
  });

  test('a HOLD is raised beside its assumption too, and leads here', async () => {
    await act(async () => page.stores.session.openDrawer({ is: 'assumptions' }));
    const before = screen.getAllByRole('button', { name: 'Raise a HOLD' });
    fireEvent.click(before[0]!);
    const [first] = page.stores.compiled.getState().assumptions;
    expect(sketchOf(page).holds).toMatchObject([{ no: '1', path: first?.path }]);
    expect(screen.getAllByRole('button', { name: 'Raise a HOLD' }).length).toBe(before.length - 1);
    press('HOLD 1');
    expect(page.stores.session.getState().drawer).toEqual({ is: 'basis' });
  });

  test('changes nothing while the sketch is read only', () => {
    page.stores.sketch.setState({ writable: false });
    press('Add a revision');
    expect(sketchOf(page).revisions).toBeUndefined();
  });
});
