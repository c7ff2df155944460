import { onSheet } from '../../canvas/onSheet';
import { type Action, isSheetFree } from '../../store/action';

export const findActions: readonly Action[] = [
  {
    id: 'find',
    label: 'Find a tag, a name, a stream or a chemical',
    group: 'view',
    keys: ['/', 'Ctrl+F'],
    // Elsewhere Ctrl+F is the browser's own search through the page.
    listens: (stores, key) => key !== 'Ctrl+F' || onSheet(stores),
    when: (stores) => isSheetFree(stores) && stores.sketch.getState().sketch.units.length > 0,
    run: ({ session }) => session.setState({ over: 'find' }),
  },
];
