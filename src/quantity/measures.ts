import type { Dimension } from './dimension';
import { toDouble } from './exact';
import { formatNumber, type NumberStyle, SCREEN } from './format';
import { measuredBy, type Site, STANDARD_SITE } from './parse';
import { readUnit, type UnitOfMeasure } from './unit';

export type MeasureSet = 'SI' | 'metric' | 'US';

/** What numbers are shown in: a set, and units chosen for single dimensions. The site counts for (g). */
export interface Measures {
  readonly set: MeasureSet;
  readonly units?: Readonly<Partial<Record<Dimension, string>>>;
  readonly site?: Site;
}

export interface DisplayUnit {
  /** As it can be typed: "degC", "bar(a)", "m3/h"; empty for a pure number. */
  readonly unit: string;
  /** As it is shown: "°C", "bar(a)", "m³/h". */
  readonly label: string;
  readonly toDisplay: (si: number) => number;
  readonly fromDisplay: (shown: number) => number;
}

const SETS: Readonly<Record<Dimension, readonly [SI: string, metric: string, US: string]>> = {
  number: ['', '', ''],
  fraction: ['', '', ''],
  temperature: ['K', 'degC', 'degF'],
  temperatureDifference: ['K', 'K', 'degF'],
  pressure: ['kPa(a)', 'bar(a)', 'psi(a)'],
  pressureDifference: ['kPa', 'bar', 'psi'],
  molarFlow: ['mol/s', 'kmol/h', 'lbmol/h'],
  massFlow: ['kg/s', 'kg/h', 'lb/h'],
  volumeFlow: ['m3/s', 'm3/h', 'ft3/h'],
  power: ['kW', 'kW', 'BTU/h'],
  molarEnergy: ['kJ/mol', 'kJ/mol', 'BTU/lbmol'],
  molarEntropy: ['J/(mol K)', 'J/(mol K)', 'BTU/(lbmol degF)'],
  massEnergy: ['kJ/kg', 'kJ/kg', 'BTU/lb'],
  heatCapacity: ['kJ/(kg K)', 'kJ/(kg K)', 'BTU/(lb degF)'],
  length: ['m', 'm', 'ft'],
  area: ['m2', 'm2', 'ft2'],
  density: ['kg/m3', 'kg/m3', 'lb/ft3'],
  molarMass: ['g/mol', 'kg/kmol', 'lb/lbmol'],
  molarVolume: ['cm3/mol', 'm3/kmol', 'ft3/lbmol'],
  conductance: ['kW/K', 'kW/K', 'BTU/(h degF)'],
  time: ['s', 's', 's'],
  viscosity: ['mPa s', 'mPa s', 'cP'],
  thermalConductivity: ['W/(m K)', 'W/(m K)', 'BTU/(h ft degF)'],
  surfaceTension: ['mN/m', 'mN/m', 'dyn/cm'],
  velocity: ['m/s', 'm/s', 'ft/s'],
};

/** Reference states of gas volumes, by the symbol that stands for a volume at them. */
const GAS_STATES: Readonly<Record<string, string>> = {
  Nm3: '0 °C, 1.01325 bar',
  Sm3: '15 °C, 1.01325 bar',
  scf: '60 °F, 14.696 psi',
};

const GAS_UNITS: Readonly<Record<MeasureSet, string>> = { SI: 'Nm3/h', metric: 'Nm3/h', US: 'scf/h' };

/**
 * What an amount per time is shown in as volume of ideal gas: the unit chosen for molar flows where that is a gas volume, else
 * the set's own.
 *
 * @returns  the measures with that unit for molar flows, and in words the reference state that it stands for
 */
export function gasVolumes(measures: Measures): { readonly measures: Measures; readonly state: string } {
  const chosen = measures.units?.molarFlow;
  const symbol = (unit: string): string => unit.split('/')[0] ?? '';
  const unit = chosen !== undefined && symbol(chosen) in GAS_STATES ? chosen : GAS_UNITS[measures.set];
  return {
    measures: { ...measures, units: { ...measures.units, molarFlow: unit } },
    state: GAS_STATES[symbol(unit)] ?? '',
  };
}

const COLUMN: Readonly<Record<MeasureSet, 0 | 1 | 2>> = { SI: 0, metric: 1, US: 2 };
const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** A typed unit as it is shown: "m3/h" -> "m³/h", "BTU/(lb degF)" -> "BTU/(lb °F)". Pressures without a mark get (a). */
export function unitLabel(unit: string, dim?: Dimension): string {
  const pretty = unit
    .replace(/\bdeg([CFR])\b/g, '°$1')
    .replace(
      /([A-Za-z])\^?(-?)(\d)/g,
      (_, letter: string, sign: string, digit: string) =>
        letter + (sign === '' ? '' : '⁻') + (RAISED[Number(digit)] ?? digit),
    );
  if (dim !== 'pressure' || /\([ag]\)$/.test(pretty)) return pretty;
  const marked = /^(bar|psi)([ag])$/.exec(pretty);
  return marked ? `${marked[1]}(${marked[2]})` : `${pretty}(a)`;
}

const SAME = (x: number): number => x;

/** Multiplies by the factor's parts one after the other where both are exact, so that whole numbers stay whole. */
function converted(
  unit: UnitOfMeasure,
  dim: Dimension,
  site: Site,
): Pick<DisplayUnit, 'toDisplay' | 'fromDisplay'> {
  const exact = unit.factor.n <= Number.MAX_SAFE_INTEGER && unit.factor.d <= Number.MAX_SAFE_INTEGER;
  const up = exact ? Number(unit.factor.n) : toDouble(unit.factor);
  const down = exact ? Number(unit.factor.d) : 1;
  const zero = dim === 'temperature' && unit.zero ? toDouble(unit.zero) : 0;
  const base_Pa = unit.reference === 'gauge' ? site.P_Pa : 0;
  return {
    toDisplay: (si) => ((si - base_Pa) * down) / up - zero,
    fromDisplay: (shown) => ((shown + zero) * up) / down + base_Pa,
  };
}

/**
 * The unit a dimension is shown in.
 *
 * @param measures  a set's name, or a set with chosen units and the site pressure for (g)
 * Throws when a chosen unit does not measure the dimension: check it with unitRefusal where it comes in.
 */
export function displayUnit(dim: Dimension, measures: Measures | MeasureSet): DisplayUnit {
  const { set, units, site }: Measures = typeof measures === 'string' ? { set: measures } : measures;
  const text = units?.[dim] ?? SETS[dim][COLUMN[set]];
  if (text === '') return { unit: '', label: '', toDisplay: SAME, fromDisplay: SAME };
  const unit = readUnit(text);
  if (!unit.ok || measuredBy(unit, [dim]) !== dim) throw new Error(`"${text}" does not measure ${dim}`);
  return {
    unit: unit.text,
    label: unitLabel(unit.text, dim),
    ...converted(unit, dim, site ?? STANDARD_SITE),
  };
}

/** Measures with fractions in per cent, unless another unit was chosen for them. */
export function inPercent(measures: Measures | MeasureSet): Measures {
  const own: Measures = typeof measures === 'string' ? { set: measures } : measures;
  return { ...own, units: { fraction: '%', ...own.units } };
}

export interface ShownQuantity {
  readonly number: string;
  readonly unit: string;
}

/** An SI value as number and unit for a screen: show(1e6, 'pressure', 'metric') is { number: "10.00", unit: "bar(a)" }. */
export function show(
  si: number | null | undefined,
  dim: Dimension,
  measures: Measures | MeasureSet,
  style: NumberStyle = SCREEN,
): ShownQuantity {
  const { label, toDisplay } = displayUnit(dim, measures);
  return { number: formatNumber(typeof si === 'number' ? toDisplay(si) : undefined, style), unit: label };
}
