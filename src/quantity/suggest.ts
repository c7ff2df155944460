import type { Dimension } from './dimension';

/** Units to offer for a dimension, the usual ones first, in the spelling that is typed. */
const USUAL: Readonly<Record<Dimension, readonly string[]>> = {
  number: [],
  fraction: ['%', 'ppm'],
  temperature: ['degC', 'K', 'degF', 'degR'],
  temperatureDifference: ['K', 'degC', 'degF'],
  pressure: ['bar(a)', 'bar(g)', 'kPa', 'MPa', 'psi', 'psig', 'atm', 'mmHg', 'kgf/cm2'],
  pressureDifference: ['bar', 'mbar', 'kPa', 'psi'],
  molarFlow: ['kmol/h', 'mol/s', 'lbmol/h', 'Nm3/h', 'Sm3/h', 'scf/d'],
  massFlow: ['kg/h', 't/h', 'kg/s', 'lb/h'],
  volumeFlow: ['m3/h', 'm3/s', 'ft3/h'],
  power: ['kW', 'MW', 'MJ/h', 'kcal/h', 'BTU/h', 'MMBTU/h', 'hp'],
  molarEnergy: ['kJ/mol', 'kJ/kmol', 'J/mol', 'kcal/mol', 'BTU/lbmol'],
  molarEntropy: ['J/(mol K)', 'kJ/(kmol K)', 'BTU/(lbmol degF)'],
  massEnergy: ['kJ/kg', 'J/kg', 'kcal/kg', 'BTU/lb'],
  heatCapacity: ['kJ/(kg K)', 'J/(kg K)', 'kcal/(kg K)', 'BTU/(lb degF)'],
  length: ['m', 'mm', 'cm', 'ft', 'in'],
  area: ['m2', 'cm2', 'ft2'],
  density: ['kg/m3', 'lb/ft3'],
  molarMass: ['g/mol', 'kg/kmol', 'lb/lbmol'],
  molarVolume: ['cm3/mol', 'm3/kmol', 'm3/mol', 'ft3/lbmol'],
  conductance: ['kW/K', 'W/K', 'BTU/(h degF)'],
  time: ['s', 'min', 'h', 'd'],
  viscosity: ['mPa s', 'cP', 'Pa s'],
  thermalConductivity: ['W/(m K)', 'mW/(m K)', 'BTU/(h ft degF)'],
  surfaceTension: ['mN/m', 'N/m', 'dyn/cm'],
  velocity: ['m/s', 'ft/s'],
};

/** Units to offer when a text is refused, or in a field's list. Every one is accepted by parseQuantity for these dimensions. */
export function suggestedUnits(dims: Dimension | readonly Dimension[]): readonly string[] {
  const wanted = typeof dims === 'string' ? [dims] : dims;
  return [...new Set(wanted.flatMap((d) => USUAL[d]))];
}
