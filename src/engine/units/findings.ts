import type { CHAMBER_FINDINGS } from './chamber/findings';
import type { COLUMN_FINDINGS } from './column/findings';
import type { COMPRESSOR_FINDINGS } from './compressor/findings';
import type { COOLER_FINDINGS } from './cooler/findings';
import type { DIVIDE_FINDINGS } from './divide/findings';
import type { DRUM_FINDINGS } from './drum/findings';
import type { EXPANDER_FINDINGS } from './expander/findings';
import type { FEED_FINDINGS } from './feed/findings';
import type { HEATER_FINDINGS } from './heater/findings';
import type { JOIN_FINDINGS } from './join/findings';
import type { PRODUCT_FINDINGS } from './product/findings';
import type { PUMP_FINDINGS } from './pump/findings';
import type { REACTOR_FINDINGS } from './reactor/findings';
import type { STREAM_FINDINGS } from './streamLimits';
import type { VALVE_FINDINGS } from './valve/findings';

/** Every code that a kind of unit or a stream may emit, derived from their own lists. */
export type UnitFindingCode =
  | (typeof FEED_FINDINGS)[number]
  | (typeof PRODUCT_FINDINGS)[number]
  | (typeof JOIN_FINDINGS)[number]
  | (typeof DIVIDE_FINDINGS)[number]
  | (typeof VALVE_FINDINGS)[number]
  | (typeof PUMP_FINDINGS)[number]
  | (typeof COMPRESSOR_FINDINGS)[number]
  | (typeof EXPANDER_FINDINGS)[number]
  | (typeof HEATER_FINDINGS)[number]
  | (typeof COOLER_FINDINGS)[number]
  | (typeof DRUM_FINDINGS)[number]
  | (typeof COLUMN_FINDINGS)[number]
  | (typeof CHAMBER_FINDINGS)[number]
  | (typeof REACTOR_FINDINGS)[number]
  | (typeof STREAM_FINDINGS)[number];
