import { solved } from '../../outcome';
import { answerOf } from '../answer';
import type { UnitKind } from '../types';
import { productLimits } from './limits';
import type { ProductSettings } from './types';

/** A product takes what comes. */
export const product: UnitKind<ProductSettings, Record<string, never>> = {
  solve: () => solved(answerOf({}, {}, [])),
  limits: productLimits,
};
