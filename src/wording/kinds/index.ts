import type { KindWords } from '../types';
import { chamber } from './chamber';
import { column } from './column';
import { compressor } from './compressor';
import { cooler } from './cooler';
import { divide } from './divide';
import { drum } from './drum';
import { expander } from './expander';
import { feed } from './feed';
import { heater } from './heater';
import { join } from './join';
import { product } from './product';
import { pump } from './pump';
import { reactor } from './reactor';
import { valve } from './valve';

/** The words of every kind of unit, one line each. */
export const KIND_WORDS: Readonly<Record<string, KindWords>> = {
  feed,
  product,
  join,
  divide,
  valve,
  pump,
  compressor,
  expander,
  heater,
  cooler,
  drum,
  column,
  chamber,
  reactor,
};
