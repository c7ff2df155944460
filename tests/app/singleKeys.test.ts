import { describe, expect, test, vi } from 'vitest';
import { actions } from '../../src/app/actions';
import { storedSingleKeys } from '../../src/app/actions/singleKeys';
import { actingKeys, actionFor, isSingleKey, labelOf } from '../../src/store/action';
import { letDown, makePage } from '../drawers/page';

const kept = new Map<string, string>();
vi.stubGlobal('localStorage', {
  getItem: (key: string) => kept.get(key) ?? null,
  setItem: (key: string, text: string) => void kept.set(key, text),
});

const press = (key: string, held: Partial<KeyboardEvent> = {}): KeyboardEvent =>
  ({ key, ctrlKey: false, metaKey: false, altKey: false, shiftKey: false, ...held }) as KeyboardEvent;

// WCAG 2.2, success criterion 2.1.4 (level A): a shortcut of a single character can be turned off.
describe('keys without Ctrl or Alt', () => {
  test('are told from keys that no speech input or slip of the hand makes', () => {
    const single = (on: boolean): readonly string[] =>
      [...new Set(actions.flatMap(({ keys }) => keys))].filter((key) => isSingleKey(key) === on);
    expect(single(true)).toEqual(expect.arrayContaining(['L', 'Shift+D', '/', '?', '+', '1']));
    expect(single(false)).toEqual(
      expect.arrayContaining([
        'Ctrl+Z',
        'Arrow Up',
        'Shift+Arrow Up',
        'F6',
        'Delete',
        'Enter',
        'Space',
        'Esc',
      ]),
    );
  });

  test('run nothing once they are turned off, and are remembered so; the others go on', () => {
    const { stores } = makePage(letDown);
    const found = (event: KeyboardEvent): string | undefined => actionFor(actions, event, false, stores)?.id;
    const turn = (): void => actions.find(({ id }) => id === 'single-keys')?.run(stores);
    expect([found(press('l')), found(press('D', { shiftKey: true }))]).toEqual(['limits', 'basis']);
    turn();
    expect([found(press('l')), found(press('D', { shiftKey: true })), found(press('?'))]).toEqual([
      undefined,
      undefined,
      undefined,
    ]);
    expect(found(press('z', { ctrlKey: true }))).toBe('undo');
    expect(found(press('F6'))).toBe('next-region');
    expect(storedSingleKeys()).toBe(false);
    turn();
    expect(found(press('l'))).toBe('limits');
    expect(storedSingleKeys()).toBe(true);
  });

  test('are turned off and on by a key with a modifier and from the list of actions, which opens without a single key', () => {
    const { stores } = makePage(letDown);
    const f1 = press('F1');
    const shifted = press('F1', { shiftKey: true });
    const turn = actionFor(actions, shifted, true, stores)!;
    expect(labelOf(turn, stores)).toBe('Single keys act: on');
    turn.run(stores);
    expect(labelOf(turn, stores)).toBe('Single keys act: off');
    expect(stores.session.getState().notice?.lines[0]).toContain('Shift+F1 turns single keys on again');
    expect(actionFor(actions, f1, false, stores)?.id).toBe('keys');
    // The notice says it, and takes it back.
    stores.session.getState().notice?.steps?.[0]?.run();
    expect(stores.session.getState().singleKeys).toBe(true);
    expect(storedSingleKeys()).toBe(true);
  });

  test('are shown as off: every action keeps a way without them', () => {
    const keysOf = (id: string) => actions.find((action) => action.id === id)!;
    expect(actingKeys(keysOf('limits'), true)).toEqual(['L']);
    expect(actingKeys(keysOf('limits'), false)).toEqual([]);
    expect(actingKeys(keysOf('keys'), false)).toEqual(['F1']);
    // All that acts then has a modifier or no character of its own.
    const left = actions.flatMap((action) => actingKeys(action, false));
    expect(left.filter((key) => key.length === 1 || /^Shift\+.$/.test(key))).toEqual([]);
  });
});
