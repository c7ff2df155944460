import type { Dimension } from './dimension';

/** Exponents of metre, kilogram, second, kelvin, mole. */
export type Shape = readonly [m: number, kg: number, s: number, K: number, mol: number];

/** What each dimension is made of. Temperature and pressure share theirs with the differences; dims decide which is meant. */
export const SHAPES: Readonly<Record<Dimension, Shape>> = {
  number: [0, 0, 0, 0, 0],
  fraction: [0, 0, 0, 0, 0],
  temperature: [0, 0, 0, 1, 0],
  temperatureDifference: [0, 0, 0, 1, 0],
  pressure: [-1, 1, -2, 0, 0],
  pressureDifference: [-1, 1, -2, 0, 0],
  molarFlow: [0, 0, -1, 0, 1],
  massFlow: [0, 1, -1, 0, 0],
  volumeFlow: [3, 0, -1, 0, 0],
  power: [2, 1, -3, 0, 0],
  molarEnergy: [2, 1, -2, 0, -1],
  molarEntropy: [2, 1, -2, -1, -1],
  massEnergy: [2, 0, -2, 0, 0],
  heatCapacity: [2, 0, -2, -1, 0],
  length: [1, 0, 0, 0, 0],
  area: [2, 0, 0, 0, 0],
  density: [-3, 1, 0, 0, 0],
  molarMass: [0, 1, 0, 0, -1],
  molarVolume: [3, 0, 0, 0, -1],
  conductance: [2, 1, -3, -1, 0],
  time: [0, 0, 1, 0, 0],
  viscosity: [-1, 1, -1, 0, 0],
  thermalConductivity: [1, 1, -3, -1, 0],
  surfaceTension: [0, 1, -2, 0, 0],
  velocity: [1, 0, -1, 0, 0],
};

/** Every dimension, in the order of the table above. */
export const DIMENSIONS = Object.keys(SHAPES) as readonly Dimension[];

/** Whether two units measure the same. */
export const sameShape = (a: Shape, b: Shape): boolean => a.every((e, i) => e === b[i]);

/** Shape of a times b to the power n. */
export const addShape = (a: Shape, b: Shape, n: number): Shape => [
  a[0] + n * b[0],
  a[1] + n * b[1],
  a[2] + n * b[2],
  a[3] + n * b[3],
  a[4] + n * b[4],
];
