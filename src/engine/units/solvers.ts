import { chamber } from './chamber/solve';
import { column } from './column/solve';
import { compressor } from './compressor/solve';
import { cooler } from './cooler/solve';
import { divide } from './divide/solve';
import { drum } from './drum/solve';
import { expander } from './expander/solve';
import { feed } from './feed/solve';
import { heater } from './heater/solve';
import { join } from './join/solve';
import { product } from './product/solve';
import { pump } from './pump/solve';
import { reactor } from './reactor/solve';
import type { UnitKind } from './types';
import { valve } from './valve/solve';

/**
 * A kind whose settings' type is its own affair: the network hands it what compile made from its catalogue. Every kind fits,
 * because nothing is assignable to `never` but what came unseen.
 */
export type AnyKind = UnitKind<never, never>;

const seal = <S, R>(kind: UnitKind<S, R>): AnyKind => kind as unknown as AnyKind;

/** How every kind is solved, one line each. */
export const SOLVERS: Readonly<Record<string, AnyKind>> = {
  feed: seal(feed),
  product: seal(product),
  join: seal(join),
  divide: seal(divide),
  valve: seal(valve),
  pump: seal(pump),
  compressor: seal(compressor),
  expander: seal(expander),
  heater: seal(heater),
  cooler: seal(cooler),
  drum: seal(drum),
  column: seal(column),
  chamber: seal(chamber),
  reactor: seal(reactor),
};
