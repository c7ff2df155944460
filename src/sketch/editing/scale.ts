import { type Dimension, parseQuantity, withNumber } from '../../quantity';
import { isObject, type JsonObject } from '../json';
import type { Json, Sketch, SketchUnit } from '../types';
import { type Edit, refuse } from './edited';

const FLOWS: readonly Dimension[] = ['molarFlow', 'massFlow'];
/** More figures than anybody types, fewer than a product of two decimals leaves behind by binary rounding. */
const FIGURES = 14;
/** Figures of flows that a computed factor gives: far closer than anybody asks, and still readable in a field. */
export const READABLE = 7;

/** One flow of a feed as it is typed, before and after. */
export interface ScaledFlow {
  readonly unit: SketchUnit;
  /** Path in the settings. */
  readonly path: string;
  readonly from: string;
  readonly to: string;
}

/** What scaling would change, feed by feed. Flows that cannot be read and shares of a stream are not among them. */
export function scaledFlows(
  sketch: Pick<Sketch, 'units'>,
  factor: number,
  figures = FIGURES,
): readonly ScaledFlow[] {
  const found: ScaledFlow[] = [];
  for (const unit of sketch.units)
    if (unit.kind === 'feed')
      scaledSettings(unit.settings, { factor, figures }, (path, from, to) =>
        found.push({ unit, path, from, to }),
      );
  return found;
}

/**
 * Multiplies every flow typed at the feeds, total flows and flows of single chemicals, by a factor. Units of measure stay as
 * typed. Flows given elsewhere (air of a chamber, a product, a share) are not touched: those that follow the feeds follow.
 *
 * @param factor   [-], above 0
 * @param figures  of the flows that are written
 */
export function scaleFeeds(sketch: Sketch, factor: number, figures = FIGURES): Edit {
  if (!Number.isFinite(factor) || factor <= 0) return refuse('edit/bad-factor');
  let count = 0;
  const units = sketch.units.map((unit) => {
    if (unit.kind !== 'feed') return unit;
    const settings = scaledSettings(unit.settings, { factor, figures }, () => {
      count += 1;
    });
    return settings === unit.settings ? unit : { ...unit, settings };
  });
  if (count === 0) return refuse('edit/nothing-to-scale');
  const isSame = units.every((unit, k) => unit === sketch.units[k]);
  return {
    ok: true,
    sketch: isSame ? sketch : { ...sketch, units },
    label: `scale all feeds by ${Number(factor.toPrecision(4))}`,
  };
}

interface Times {
  readonly factor: number;
  readonly figures: number;
}

function scaledSettings(
  settings: JsonObject,
  times: Times,
  tell: (path: string, from: string, to: string) => void,
): JsonObject {
  const scaled = (value: Json | undefined, path: string): Json | undefined => {
    if (typeof value !== 'string') return value;
    const read = parseQuantity(value, FLOWS);
    const next = read.ok ? timesText(value, read.si, times) : undefined;
    if (next === undefined) return value;
    tell(path, value, next);
    return next;
  };
  let next = settings;
  const { flow, composition } = settings;
  const total = scaled(flow, 'flow');
  if (total !== undefined && total !== flow) next = { ...next, flow: total };
  if (isObject(composition) && isObject(composition.flows)) {
    const before = composition.flows;
    const flows = Object.fromEntries(
      Object.entries(before).map(([id, value]) => [id, scaled(value, `composition.flows.${id}`) ?? value]),
    );
    if (Object.keys(flows).some((id) => flows[id] !== before[id]))
      next = { ...next, composition: { ...composition, flows } };
  }
  return next;
}

/** The text with its number multiplied; the very same text for a factor of 1. */
const timesText = (text: string, si: number, { factor, figures }: Times): string | undefined =>
  factor === 1 ? text : withNumber(text, si * factor, FLOWS, undefined, { figures });
