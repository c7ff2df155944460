import type { Action } from '../../store/action';
import { newSketch, openFile, saveFile } from '../documents';

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
    run: ({ session }) => session.setState({ over: 'open' }),
  },
];
