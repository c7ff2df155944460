import type { ComponentType } from 'react';
import { ColumnOutcome } from './column/ColumnOutcome';
import { ColumnSettings } from './column/ColumnSettings';

/** Parts of the unit drawer that a kind draws itself, in place of those made from its catalogue. */
export interface OwnParts {
  /** Width the drawer begins with [px]; absent: the usual one. */
  readonly width?: number;
  readonly Settings?: ComponentType;
  readonly Results?: ComponentType;
}

/** Kinds whose drawer says more than a list of settings could. */
export const OWN_PARTS: Readonly<Record<string, OwnParts>> = {
  column: { width: 472, Settings: ColumnSettings, Results: ColumnOutcome },
};
