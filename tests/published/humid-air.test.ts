import { describe, expect, test } from 'vitest';
import type { UnitId } from '../../src/engine/ids';
import { makeModel } from '../../src/engine/thermo/model';
import { airFractions } from '../../src/engine/units/air';
import { chemical, specOf } from '../laws/thermoCases';

const IDS = ['nitrogen', 'oxygen', 'argon', 'carbon-dioxide', 'water'];
const AT = { N2: 0, O2: 1, Ar: 2, CO2: 3, H2O: 4, SO2: -1, HCl: -1 };

// Saturation pressure of water from the steam tables (IAPWS-IF97), to the printed digits, recalled from memory.
describe.each([
  [10, 1.2282e3],
  [24, 2.9858e3],
  [35, 5.6291e3],
])('air at %d degC', (t_degC, Psat_Pa) => {
  test.each(['peng-robinson', 'raoult'] as const)(
    'holds the water that the steam tables say, under %s',
    (kind) => {
      const model = makeModel(specOf({ kind }), IDS.map(chemical));
      const air = airFractions(
        { unit: 'u1' as UnitId, model },
        { is: 'preset', preset: 'humid air', relativeHumidity: 0.55, at: AT },
        { T: t_degC + 273.15, P: 101_300 },
      );
      if (air.state !== 'solved') throw new Error('no air');
      expect(air.value[4]! / ((0.55 * Psat_Pa) / 101_300)).toBeCloseTo(1, 2);
      expect(air.value.reduce((a, b) => a + b)).toBeCloseTo(1, 12);
    },
  );
});
