import type { Action } from '../../store/action';
import { remember, remembered } from '../../store/remembered';
import type { Session } from '../../store/session';

const KEY = 'singleKeys';

/** Whether keys without Ctrl or Alt run actions, as chosen on this computer. */
export const storedSingleKeys = (): boolean => remembered(KEY) !== 'no';

/** Turns single keys on or off, in this browser from now on. */
export function setSingleKeys(session: Session, singleKeys: boolean): void {
  remember(KEY, singleKeys ? 'yes' : 'no');
  session.setState({ singleKeys });
}

/** Said wherever they are off: what acts still, and the way back. */
export const WHAT_IS_OFF =
  'Only keys with Ctrl or Alt, F keys, arrows, Enter, Esc, Delete and, on what has the focus, Space act. F1 lists all actions; Shift+F1 turns single keys on again.';

export const singleKeyActions: readonly Action[] = [
  {
    id: 'single-keys',
    label: 'Single keys act',
    group: 'help',
    keys: ['Shift+F1'],
    whileTyping: true,
    now: ({ session }) => (session.getState().singleKeys ? 'on' : 'off'),
    run: ({ session }) => {
      const singleKeys = !session.getState().singleKeys;
      setSingleKeys(session, singleKeys);
      session.say(
        'info',
        singleKeys ? 'Single keys act again.' : 'Single keys are off.',
        singleKeys ? [] : [WHAT_IS_OFF],
        singleKeys ? [] : [{ label: 'Turn them on again', run: () => setSingleKeys(session, true) }],
      );
    },
  },
];
