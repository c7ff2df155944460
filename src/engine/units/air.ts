import { named, noSolution, type Outcome, saw, solved } from '../outcome';
import { preparePure } from '../thermo/pure/pure';
import type { Call, CompositionSI } from './types';

type Preset = Extract<CompositionSI, { is: 'preset' }>;

/**
 * Dry air [mol/mol], rounded so that the four sum to one.
 * Source: U.S. Standard Atmosphere 1976, table 3 (78.084 % N2, 20.9476 % O2, 0.934 % Ar; CO2 brought to 0.04 %, neon and the
 * rest left out); not checked against the printed table.
 */
export const DRY_AIR = { N2: 0.7808, O2: 0.2095, Ar: 0.0093, CO2: 0.0004 } as const;
/** The two-gas stand-in used in combustion sums [mol/mol]. */
export const SIMPLE_AIR = { N2: 0.79, O2: 0.21 } as const;

/**
 * Mole fractions of an air preset over the full list. Humid air: water's share is its vapour pressure at T (by its correlation)
 * times the relative humidity over P, the rest is dry air in proportion.
 *
 * @param at  temperature [K] and pressure [Pa] of the air; asked of humid air only
 * @returns   fractions, length nc, that sum to 1; or feed/air-needs-temperature-and-pressure, feed/air-component-missing,
 *            feed/water-data-missing, feed/humidity-above-saturation
 */
export function airFractions(
  call: Pick<Call<unknown>, 'unit' | 'model'>,
  air: Preset,
  at: { readonly T?: number; readonly P?: number },
): Outcome<Float64Array> {
  const z = new Float64Array(call.model.nc);
  const dry: Readonly<Record<string, number>> = air.preset === '79/21' ? SIMPLE_AIR : DRY_AIR;
  const place = { unit: call.unit, path: 'composition' };
  let y_water = 0;
  if (air.preset === 'humid air') {
    if (at.T === undefined || at.P === undefined)
      return noSolution({
        code: 'feed/air-needs-temperature-and-pressure',
        weight: 'beyond-limit',
        at: { ...place, path: 'state' },
        evidence: [],
      });
    if (air.at.H2O < 0) return missing(call, 'H2O');
    // Humidity is a measured thing: the correlation of water's vapour pressure says how much water the air holds, not the model
    // of the sketch, whose own saturation pressure may be off by a tenth and more.
    const water = call.model.chemicals[air.at.H2O]!;
    const Psat = preparePure(water).psat?.(at.T) ?? call.model.of([air.at.H2O]).saturationP_Pa(0, at.T);
    if (Psat === undefined)
      return noSolution({
        code: 'feed/water-data-missing',
        weight: 'beyond-limit',
        at: place,
        evidence: [saw('temperature', at.T, 'temperature')],
      });
    y_water = (air.relativeHumidity * Psat) / at.P;
    if (!(y_water < 1))
      return noSolution({
        code: 'feed/humidity-above-saturation',
        weight: 'beyond-limit',
        at: place,
        evidence: [
          saw('waterPressure', air.relativeHumidity * Psat, 'pressure'),
          saw('pressure', at.P, 'pressure'),
        ],
      });
    z[air.at.H2O] = y_water;
  }
  for (const [name, y] of Object.entries(dry)) {
    const index = air.at[name as keyof typeof DRY_AIR];
    if (index < 0) return missing(call, name);
    z[index] = y * (1 - y_water);
  }
  return solved(z);
}

const missing = (call: Pick<Call<unknown>, 'unit'>, formula: string): Outcome<Float64Array> =>
  noSolution({
    code: 'feed/air-component-missing',
    weight: 'beyond-limit',
    at: { unit: call.unit, path: 'composition' },
    evidence: [named('chemical', formula)],
  });
