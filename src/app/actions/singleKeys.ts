import type { Action } from '../../store/action';
import { remember, remembered } from '../../store/remembered';

const KEY = 'singleKeys';

/** Whether keys without Ctrl or Alt run actions, as chosen on this computer. */
export const storedSingleKeys = (): boolean => remembered(KEY) !== 'no';

export const singleKeyActions: readonly Action[] = [
  {
    id: 'single-keys',
    label: 'Turn keys without Ctrl or Alt on or off',
    group: 'help',
    keys: [],
    run: ({ session }) => {
      const singleKeys = !session.getState().singleKeys;
      remember(KEY, singleKeys ? 'yes' : 'no');
      session.setState({ singleKeys });
      session.say(
        'info',
        singleKeys ? 'Keys without Ctrl or Alt work again.' : 'Keys without Ctrl or Alt are off.',
        singleKeys
          ? []
          : ['“All actions and their keys”, in the menu, runs each of them and turns these keys on again.'],
      );
    },
  },
];
