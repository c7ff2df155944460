/**
 * What a number measures. Every stored number is in the SI unit named here; flows of substance are molar.
 *
 * 'fraction' is a share (0.3, "30 %", "300 ppm"; mole or mass as its basis says), 'number' any other pure number.
 * 'pressure' is absolute; 'pressureDifference' and 'temperatureDifference' are dimensions of their own.
 */
export type Dimension =
  | 'number' // -
  | 'fraction' // -
  | 'temperature' // K
  | 'temperatureDifference' // K
  | 'pressure' // Pa, absolute
  | 'pressureDifference' // Pa
  | 'molarFlow' // mol/s; normal and standard gas volumes are converted to it as ideal gas
  | 'massFlow' // kg/s
  | 'volumeFlow' // m3/s, shown only: as an input it is ambiguous
  | 'power' // W
  | 'molarEnergy' // J/mol
  | 'molarEntropy' // J/(mol K), molar heat capacity too
  | 'massEnergy' // J/kg
  | 'heatCapacity' // J/(kg K)
  | 'length' // m
  | 'area' // m2
  | 'density' // kg/m3
  | 'molarMass' // kg/mol
  | 'molarVolume' // m3/mol
  | 'conductance' // W/K
  | 'time' // s
  | 'viscosity' // Pa s
  | 'thermalConductivity' // W/(m K)
  | 'surfaceTension' // N/m
  | 'velocity'; // m/s
