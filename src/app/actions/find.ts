import type { Action } from '../../store/action';

export const findActions: readonly Action[] = [
  {
    id: 'find',
    label: 'Find a tag, a stream or a component',
    group: 'view',
    keys: ['/'],
    when: ({ sketch }) => sketch.getState().sketch.units.length > 0,
    run: ({ session }) => session.setState({ over: 'find' }),
  },
];
