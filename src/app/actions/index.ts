import { sheetActions } from '../../canvas/actions';
import type { Action } from '../../store/action';
import { arrangeActions } from './arrange';
import { documentActions } from './documents';
import { fileActions } from './files';
import { findActions } from './find';
import { singleKeyActions } from './singleKeys';
import { viewActions } from './view';
import { wholeActions } from './whole';

/** Every action of the page; the bar, the menus, the keys and the list of keys read this. */
export const actions: readonly Action[] = [
  ...fileActions,
  ...documentActions,
  ...wholeActions,
  ...findActions,
  ...viewActions,
  ...singleKeyActions,
  ...sheetActions,
  ...arrangeActions,
];
