// @vitest-environment jsdom
import { createEvent, fireEvent, render, screen } from '@testing-library/react';
import { expect, test } from 'vitest';
import { useFileDrop } from '../../src/app/useFileDrop';
import type { Stores } from '../../src/store/react';
import { letDown, makePage, sketchOf } from '../drawers/page';

function Dropped({ stores }: { readonly stores: Stores }) {
  const hangs = useFileDrop(stores);
  return (
    <>
      <input aria-label="field" />
      <p>{hangs ? 'a file hangs here' : 'none'}</p>
    </>
  );
}

/** Whether the page takes the drop itself. */
function dropped(on: Element, dataTransfer: object): boolean {
  const over = createEvent.dragOver(on, { dataTransfer });
  const drop = createEvent.drop(on, { dataTransfer });
  fireEvent(on, over);
  fireEvent(on, drop);
  expect(over.defaultPrevented).toBe(drop.defaultPrevented);
  return drop.defaultPrevented;
}

test('words drawn into a field stay the field’s; elsewhere nothing has the browser leave the page', () => {
  const { stores } = makePage(letDown);
  render(<Dropped stores={stores} />);
  const words = { types: ['text/plain'], files: [] };
  expect(dropped(screen.getByLabelText('field'), words)).toBe(false);
  expect(dropped(screen.getByText('none'), words)).toBe(true);
});

test('a file is taken wherever it falls, a field included, and opens as the sketch that is shown', async () => {
  const page = makePage(letDown);
  render(<Dropped stores={page.stores} />);
  const text = JSON.stringify({ ...letDown, id: 'other', title: { title: 'From a file' } });
  const file = new File([text], 'a.sketch.json');
  file.arrayBuffer = async () => new TextEncoder().encode(text).buffer as ArrayBuffer;
  const files = { types: ['Files'], files: [file] };
  fireEvent(document.body, createEvent.dragOver(document.body, { dataTransfer: files }));
  expect(screen.getByText('a file hangs here')).toBeTruthy();
  expect(dropped(screen.getByLabelText('field'), files)).toBe(true);
  await expect.poll(() => sketchOf(page).title.title).toBe('From a file');
  expect(screen.getByText('none')).toBeTruthy();
});
