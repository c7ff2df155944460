import type { Stores } from './react';

/** One thing a user can do: menu, key and undo label come from the same record. */
export interface Action {
  readonly id: string;
  readonly label: string;
  readonly group: 'sketch' | 'edit' | 'sheet' | 'view' | 'result' | 'help';
  /** Keys as shown to users: 'Ctrl+Z', 'F6', '/', 'Shift+Arrow Up'. Empty: no key. */
  readonly keys: readonly string[];
  /** Also works while a text field has the focus. */
  readonly whileTyping?: true;
  /** The browser tells of the key itself (copy, cut, paste): it is shown with the action, and not listened for. */
  readonly byBrowser?: true;
  /** Where a key of its own is heard (the sheet has the focus); absent: everywhere. Menus do not ask. */
  listens?(stores: Stores, key: string): boolean;
  when?(stores: Stores): boolean;
  /** Why it cannot be run now, where a user could wonder: a menu then lists it with the reason. */
  whyNot?(stores: Stores): string | undefined;
  /** How it stands: 'on', 'off'. Shown behind the label. */
  now?(stores: Stores): string;
  run(stores: Stores): void;
}

/** 'Undo', 'Single keys act: on' */
export const labelOf = ({ label, now }: Action, stores: Stores): string =>
  now ? `${label}: ${now(stores)}` : label;

/** Nothing lies over the sheet, or only the list of actions: it closes before it runs what was chosen in it. */
export function isSheetFree({ session }: Stores): boolean {
  const { over } = session.getState();
  return over === 'none' || over === 'keys';
}

const named: Readonly<Record<string, string>> = {
  ' ': 'Space',
  ArrowUp: 'Arrow Up',
  ArrowDown: 'Arrow Down',
  ArrowLeft: 'Arrow Left',
  ArrowRight: 'Arrow Right',
  Escape: 'Esc',
};

/** 'Ctrl+Shift+Z' for a keyboard event. Command counts as Ctrl; Shift is named with letters and named keys only. */
export function keyText(
  event: Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey' | 'altKey' | 'shiftKey'>,
): string {
  const plain = named[event.key] ?? (event.key.length === 1 ? event.key.toUpperCase() : event.key);
  const isMark =
    event.key.length === 1 && event.key.toUpperCase() === event.key.toLowerCase() && event.key !== ' ';
  return [
    event.ctrlKey || event.metaKey ? 'Ctrl' : '',
    event.altKey ? 'Alt' : '',
    event.shiftKey && !isMark ? 'Shift' : '',
    plain,
  ]
    .filter(Boolean)
    .join('+');
}

/** A letter, figure or mark without Ctrl or Alt: such a key can be struck, or heard by speech input, by mistake. */
export const isSingleKey = (text: string): boolean => /^(Shift\+)?.$/.test(text);

/** The keys of an action that do something now: single keys may be turned off. */
export const actingKeys = ({ keys }: Pick<Action, 'keys'>, singleKeys: boolean): readonly string[] =>
  singleKeys ? keys : keys.filter((key) => !isSingleKey(key));

/** The action for a key press, if one is ready to run. Single keys can be turned off (WCAG 2.2, 2.1.4). */
export function actionFor(
  actions: readonly Action[],
  event: KeyboardEvent,
  typing: boolean,
  stores: Stores,
): Action | undefined {
  const text = keyText(event);
  if (!stores.session.getState().singleKeys && isSingleKey(text)) return undefined;
  return actions.find(
    (action) =>
      action.keys.includes(text) &&
      !action.byBrowser &&
      (action.listens?.(stores, text) ?? true) &&
      (!typing || action.whileTyping === true) &&
      (action.when?.(stores) ?? true),
  );
}
