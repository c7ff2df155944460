import type { Action } from '../../store/action';
import { isEmpty, newSketch, openFile, saveFile } from '../documents';

export const fileActions: readonly Action[] = [
  {
    id: 'new',
    label: 'New sketch',
    group: 'sketch',
    keys: ['Ctrl+Alt+N'],
    run: (stores) => newSketch(stores),
  },
  {
    id: 'open',
    label: 'Open a file',
    group: 'sketch',
    keys: ['Ctrl+O'],
    whileTyping: true,
    run: (stores) => void openFile(stores),
  },
  {
    id: 'save',
    label: 'Save as a file',
    group: 'sketch',
    keys: ['Ctrl+S'],
    whileTyping: true,
    run: (stores) => saveFile(stores),
  },
  {
    id: 'mine',
    label: 'Sketches on this computer',
    group: 'sketch',
    keys: ['Ctrl+Shift+O'],
    whileTyping: true,
    run: ({ session }) => session.setState({ over: 'open' }),
  },
  {
    id: 'share',
    label: 'Share as a link',
    group: 'sketch',
    keys: ['Ctrl+Shift+L'],
    whileTyping: true,
    when: ({ sketch }) => !isEmpty(sketch.getState().sketch),
    run: ({ session }) => session.setState({ over: 'share' }),
  },
];
