// @vitest-environment jsdom
import { fireEvent, screen } from '@testing-library/react';
import { describe, expect, test } from 'vitest';
import { field, letDown, makePage, type Page, settingsOf, show, undoLabels, unitId } from './page';

function openValve(): Page {
  const page = makePage();
  page.stores.session.select([unitId('u2')]);
  show(page);
  return page;
}
const type = (path: string, text: string): void => {
  fireEvent.focus(field(path));
  fireEvent.change(field(path), { target: { value: text } });
};
const press = (path: string, key: string, more: object = {}): void =>
  void fireEvent.keyDown(field(path), { key, ...more });

describe('a field of a unit', () => {
  test.each(['7 bar', '700 kPa', '88 psig', '0.7 MPa', '6 bar(g)'])(
    'takes %s and keeps it as typed',
    (text) => {
      const page = openValve();
      type('p.P', text);
      press('p.P', 'Enter');
      expect(settingsOf(page, 'u2')).toEqual({ p: { P: text } });
      expect(undoLabels(page)).toEqual(['set PV-101 outlet pressure']);
    },
  );

  test('commits when it is left', () => {
    const page = openValve();
    type('p.P', '6 bar');
    fireEvent.blur(field('p.P'));
    expect(settingsOf(page, 'u2')).toEqual({ p: { P: '6 bar' } });
  });

  test('goes back to what stood there on Esc, without an edit', () => {
    const page = openValve();
    type('p.P', '6 ba');
    press('p.P', 'Escape');
    expect(field('p.P').value).toBe('5 bar');
    expect(undoLabels(page)).toEqual([]);
  });

  test('keeps a refused text in sight with the reason and what fits, and leaves the sketch alone', () => {
    const page = openValve();
    type('p.P', '7 mm');
    press('p.P', 'Enter');
    fireEvent.blur(field('p.P'));
    expect(field('p.P').value).toBe('7 mm');
    expect(field('p.P').getAttribute('aria-invalid')).toBe('true');
    expect(screen.getByRole('alert').textContent).toContain('mm');
    expect(undoLabels(page)).toEqual([]);
    fireEvent.click(screen.getByRole('button', { name: '7 kPa' }));
    expect(settingsOf(page, 'u2')).toEqual({ p: { P: '7 kPa' } });
  });

  test('keeps the unit that stood there when a bare number is typed over it', () => {
    const page = openValve();
    type('p.P', '7');
    press('p.P', 'Enter');
    expect(settingsOf(page, 'u2')).toEqual({ p: { P: '7 bar' } });
  });

  test('asks for a unit when a bare number is typed where none stood, and offers the usual ones', () => {
    const page = openValve();
    type('p.P', '');
    press('p.P', 'Enter');
    type('p.P', '7');
    press('p.P', 'Enter');
    fireEvent.click(screen.getByRole('button', { name: '7 bar(g)' }));
    expect(settingsOf(page, 'u2')).toEqual({ p: { P: '7 bar(g)' } });
  });

  test('is emptied by an empty text, reads "needs a value", and offers what stood there', () => {
    const page = openValve();
    type('p.P', '');
    press('p.P', 'Enter');
    expect(settingsOf(page, 'u2')).toEqual({});
    expect(undoLabels(page)).toEqual(['clear PV-101 outlet pressure']);
    expect(screen.getByText('needs a value')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Back to 5 bar' }));
    expect(settingsOf(page, 'u2')).toEqual({ p: { P: '5 bar' } });
  });

  test('lets a refused text go when the value is undone from elsewhere', () => {
    const page = openValve();
    type('p.P', '6 bar');
    press('p.P', 'Enter');
    type('p.P', '6 mm');
    press('p.P', 'Enter');
    page.stores.sketch.undo();
    show(page);
    expect(field('p.P').value).toBe('5 bar');
  });
});

describe('a slide', () => {
  test('with Alt and the arrows steps the number in its unit and is one step of undo', () => {
    const page = openValve();
    fireEvent.focus(field('p.P'));
    for (let k = 0; k < 3; k += 1) press('p.P', 'ArrowUp', { altKey: true });
    expect(settingsOf(page, 'u2')).toEqual({ p: { P: '5.03 bar' } });
    press('p.P', 'ArrowUp', { altKey: true, shiftKey: true });
    expect(settingsOf(page, 'u2')).toEqual({ p: { P: '5.13 bar' } });
    fireEvent.keyUp(field('p.P'), { key: 'Alt' });
    expect(undoLabels(page)).toEqual(['slide PV-101 outlet pressure']);
    page.stores.sketch.undo();
    expect(settingsOf(page, 'u2')).toEqual({ p: { P: '5 bar' } });
  });

  test('with the pointer follows the hand, two pixels a step, and is one step of undo', () => {
    const page = openValve();
    const number = document.querySelector('[data-slides]');
    if (!number) throw new Error('no number to drag');
    fireEvent.pointerDown(number, { button: 0, clientX: 100 });
    for (const x of [104, 110, 120]) fireEvent.pointerMove(number, { clientX: x });
    expect(settingsOf(page, 'u2')).toEqual({ p: { P: '5.1 bar' } });
    expect(document.querySelector('.slide-ruler')).not.toBeNull();
    fireEvent.pointerUp(number, { clientX: 120 });
    expect(undoLabels(page)).toEqual(['slide PV-101 outlet pressure']);
    expect(document.querySelector('.slide-ruler')).toBeNull();
  });

  test('returns to the value before on Esc and leaves nothing to undo', () => {
    const page = openValve();
    fireEvent.focus(field('p.P'));
    press('p.P', 'ArrowDown', { altKey: true });
    expect(settingsOf(page, 'u2')).toEqual({ p: { P: '4.99 bar' } });
    fireEvent.keyDown(window, { key: 'Escape' });
    expect(settingsOf(page, 'u2')).toEqual({ p: { P: '5 bar' } });
    expect(undoLabels(page)).toEqual([]);
  });

  test('stops where the setting would leave its range', () => {
    const page = makePage({
      ...letDown,
      units: letDown.units.map((u) => (u.id === 'u2' ? { ...u, settings: { p: { P: '0 bar' } } } : u)),
    });
    page.stores.session.select([unitId('u2')]);
    show(page);
    fireEvent.focus(field('p.P'));
    press('p.P', 'ArrowDown', { altKey: true });
    expect(settingsOf(page, 'u2')).toEqual({ p: { P: '0 bar' } });
  });
});

describe('one of several settings', () => {
  test('keeps what is given until the other has a value, then replaces it in one step', () => {
    const page = openValve();
    fireEvent.change(screen.getByLabelText(/: which$/), { target: { value: 'drop' } });
    expect(settingsOf(page, 'u2')).toEqual({ p: { P: '5 bar' } });
    expect(screen.getByText(/Until a value is typed, outlet pressure 5 bar stays/)).toBeTruthy();
    type('p.drop', '2 bar');
    press('p.drop', 'Enter');
    expect(settingsOf(page, 'u2')).toEqual({ p: { drop: '2 bar' } });
    expect(undoLabels(page)).toHaveLength(1);
  });

  test('shows an assumed value dashed, in its own words, and typing makes it given', () => {
    const page = makePage();
    page.stores.session.select([unitId('u3')]);
    show(page);
    const box = field('p.drop').closest('.quantity-field');
    expect(box?.getAttribute('data-state')).toBe('assumed');
    expect(field('p.drop').title).toContain('No pressure drop was given');
    type('p.drop', '0.2 bar');
    press('p.drop', 'Enter');
    expect(settingsOf(page, 'u3')).toEqual({ p: { drop: '0.2 bar' } });
    expect(box?.getAttribute('data-state')).toBe('given');
  });

  test('two of several: a condition of a feed is exchanged without losing the other', () => {
    const page = makePage();
    page.stores.session.select([unitId('u1')]);
    show(page);
    const [first] = screen.getAllByLabelText(/: which$/);
    if (!first) throw new Error('no row');
    fireEvent.change(first, { target: { value: 'vapourFraction' } });
    type('state.vapourFraction', '0');
    press('state.vapourFraction', 'Enter');
    expect(settingsOf(page, 'u1').state).toEqual({ P: '30 bar', vapourFraction: '0' });
  });
});
