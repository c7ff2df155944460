import { type Action, isSheetFree } from '../../store/action';
import { scaledFlows } from '../../store/commands';

/** What concerns the whole sketch and has a dialogue of its own. */
export const wholeActions: readonly Action[] = [
  {
    id: 'scale-feeds',
    label: 'Scale all feeds',
    group: 'sketch',
    keys: ['G'],
    when: (stores) => {
      const { sketch, writable } = stores.sketch.getState();
      return writable && isSheetFree(stores) && scaledFlows(sketch, 1).length > 0;
    },
    run: ({ session }) => session.setState({ over: 'scale' }),
  },
  {
    id: 'pairs',
    label: 'Pair parameters',
    group: 'sketch',
    keys: ['K'],
    run: ({ session }) => session.setState({ over: 'pairs' }),
  },
];
