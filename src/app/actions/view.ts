import type { Action } from '../../store/action';
import type { Stores } from '../../store/react';
import type { DrawerChoice } from '../../store/session';

const drawer = (
  is: 'limits' | 'assumptions' | 'chemicals' | 'sketch' | 'basis',
  label: string,
  keys: string[],
  /** What one opens it for is typed: the keyboard goes into it. */
  typed = false,
): Action => ({
  id: is,
  label,
  group: 'result',
  keys,
  run: ({ session }) => {
    const open = session.getState().drawer?.is === is;
    if (open) session.openDrawer(null);
    else if (typed) session.enterDrawer({ is } as DrawerChoice);
    else session.openDrawer({ is } as DrawerChoice);
  },
});

const isWritable = ({ sketch }: Stores): boolean => sketch.getState().writable;

export const viewActions: readonly Action[] = [
  {
    id: 'undo',
    label: 'Undo',
    group: 'edit',
    keys: ['Ctrl+Z'],
    when: isWritable,
    run: ({ sketch, session }) => {
      const label = sketch.undo();
      if (label) session.setState({ spoken: `Undone: ${label}` });
    },
  },
  {
    id: 'redo',
    label: 'Redo',
    group: 'edit',
    keys: ['Ctrl+Shift+Z', 'Ctrl+Y'],
    when: isWritable,
    run: ({ sketch, session }) => {
      const label = sketch.redo();
      if (label) session.setState({ spoken: `Redone: ${label}` });
    },
  },
  {
    id: 'stop-solving',
    label: 'Stop solving, or go on after a stop',
    group: 'result',
    keys: ['Ctrl+.'],
    whileTyping: true,
    when: ({ results }) => {
      const { at, answering, solvedEdit, stopped } = results.getState();
      return stopped || (at !== null && answering > solvedEdit);
    },
    run: ({ results, session }) => {
      const { stopped } = results.getState();
      if (stopped) results.resume();
      else results.stop();
      session.setState({ spoken: stopped ? 'Solving' : 'Stopped' });
    },
  },
  drawer('limits', 'Limits', ['L']),
  drawer('assumptions', 'Assumption register', ['A']),
  drawer('chemicals', 'Chemicals and thermodynamic model', ['H'], true),
  drawer('sketch', 'Title block, site and measures', ['T'], true),
  // Among the menu's words: the bar has no room for another.
  { ...drawer('basis', 'Design basis, revisions and HOLDs', ['Shift+D'], true), group: 'sketch' },
  {
    id: 'balance',
    label: 'Fold or unfold the balance',
    group: 'view',
    keys: ['B'],
    run: ({ session }) => session.setState({ balanceFolded: !session.getState().balanceFolded }),
  },
  {
    id: 'shelf',
    label: 'Fold or unfold the shelf',
    group: 'view',
    keys: ['S'],
    run: ({ session }) => session.setState({ shelfFolded: !session.getState().shelfFolded }),
  },
  {
    id: 'theme',
    label: 'Light or dark',
    group: 'view',
    keys: ['D'],
    run: ({ session }) =>
      session.setState({ theme: document.documentElement.dataset.theme === 'dark' ? 'light' : 'dark' }),
  },
  {
    id: 'theme-system',
    label: 'Light or dark as the system has it',
    group: 'view',
    keys: [],
    run: ({ session }) => session.setState({ theme: 'system' }),
  },
  {
    id: 'keys',
    label: 'All actions and their keys',
    group: 'help',
    keys: ['?', 'F1'],
    run: ({ session }) => session.setState({ over: session.getState().over === 'keys' ? 'none' : 'keys' }),
  },
  {
    id: 'next-region',
    label: 'Jump to the next part of the screen',
    group: 'view',
    keys: ['F6'],
    whileTyping: true,
    run: () => jumpRegion(1),
  },
  {
    id: 'previous-region',
    label: 'Jump to the part of the screen before',
    group: 'view',
    keys: ['Shift+F6'],
    whileTyping: true,
    run: () => jumpRegion(-1),
  },
];

const REGIONS = ['.bar', '.shelf', '.sheet', '.drawer', '.balance'];

/** Focuses the first thing that takes focus in the next part of the screen, or the one before, in reading order. */
function jumpRegion(by: number): void {
  const regions = REGIONS.map((name) => document.querySelector<HTMLElement>(`.app > ${name}`)).filter(
    (element) => element !== null && element.getClientRects().length > 0,
  ) as HTMLElement[];
  const here = regions.findIndex((region) => region.contains(document.activeElement));
  for (let k = 1; k <= regions.length; k += 1) {
    const region = regions[(here + by * k + regions.length * 2) % regions.length];
    const target = region?.querySelector<HTMLElement>(
      'button:not(:disabled):not([tabindex="-1"]), input, select, [tabindex="0"]:not([role="separator"])',
    );
    if (target) {
      target.focus();
      return;
    }
  }
}
