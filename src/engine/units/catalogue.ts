import { chamber } from './chamber/catalogue';
import { column } from './column/catalogue';
import { compressor } from './compressor/catalogue';
import { cooler } from './cooler/catalogue';
import { divide } from './divide/catalogue';
import { drum } from './drum/catalogue';
import { expander } from './expander/catalogue';
import { feed } from './feed/catalogue';
import { heater } from './heater/catalogue';
import { join } from './join/catalogue';
import { product } from './product/catalogue';
import { pump } from './pump/catalogue';
import { reactor } from './reactor/catalogue';
import type { KindCatalogue } from './types';
import { valve } from './valve/catalogue';

/** Every kind of unit, one line each, in the shelf's order. Imports no solver: safe for the page. */
export const CATALOGUE: Readonly<Record<string, KindCatalogue>> = {
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
