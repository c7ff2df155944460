import { CATALOGUE } from '../../engine/units/catalogue';
import type { KindCatalogue, PortSpec } from '../../engine/units/types';
import type { SketchUnit } from '../../sketch/types';
import type { SymbolData } from '../types';
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
import { plainBox } from './plainBox';
import { product } from './product';
import { pump } from './pump';
import { reactor } from './reactor';
import type { SymbolKind } from './shapes';
import { valve } from './valve';

/** Every kind's symbol, one line each. A kind that is not here is drawn as a box with its ports. */
export const SYMBOLS: Readonly<Record<string, SymbolKind>> = {
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

const drawn = new WeakMap<SketchUnit, SymbolData>();
const boxes = new Map<string, SymbolData>();

function boxOf(ports: readonly PortSpec[]): SymbolData {
  const key = ports.map((p) => `${p.dir} ${p.name} ${p.numbered ? 'n' : ''}`).join();
  let box = boxes.get(key);
  if (!box) {
    box = plainBox(ports);
    boxes.set(key, box);
  }
  return box;
}

/**
 * A unit's symbol; the same record gives the same object.
 *
 * @param kinds where a kind without a symbol finds its ports
 * @param used  ports that streams are joined to: all there is to know of a kind that is in neither
 */
export function symbolOf(
  unit: SketchUnit,
  kinds: Readonly<Record<string, KindCatalogue>> = CATALOGUE,
  used: readonly PortSpec[] = [],
): SymbolData {
  const kind = Object.hasOwn(SYMBOLS, unit.kind) ? SYMBOLS[unit.kind] : undefined;
  if (!kind) return boxOf(Object.hasOwn(kinds, unit.kind) ? kinds[unit.kind]!.ports : used);
  let data = drawn.get(unit);
  if (!data) {
    data = kind.draw(unit);
    drawn.set(unit, data);
  }
  return data;
}

/** A kind's plain symbol, without settings or a name. */
export function plainSymbol(
  kind: string,
  kinds: Readonly<Record<string, KindCatalogue>> = CATALOGUE,
): SymbolData {
  const own = Object.hasOwn(SYMBOLS, kind) ? SYMBOLS[kind] : undefined;
  return own ? own.draw({ tag: '', kind, settings: {} }) : boxOf(kinds[kind]?.ports ?? []);
}
