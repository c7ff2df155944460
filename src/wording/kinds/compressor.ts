import { MACHINE_RESULTS, MACHINE_SETTINGS } from '../machine';
import type { KindWords } from '../types';

export const compressor: KindWords = {
  name: 'compressor',
  about: 'Raises the pressure of a gas; with the service “fan” it is one.',
  ports: { in: 'inlet', out: 'outlet' },
  settings: { ...MACHINE_SETTINGS, drive: 'efficiency of motor and drive' },
  results: MACHINE_RESULTS,
  options: { compressor: 'compressor', fan: 'fan' },
  sentences: {
    'compression/path-breaks-off': {
      title: 'The path breaks off',
      says: 'On the way to {pressure} a state of the fluid could not be found, so the polytropic path has no end.',
      next: 'Give the isentropic efficiency instead, or another outlet pressure.',
    },
    'compression/temperature-out-of-reach': {
      title: 'Temperature out of reach',
      says: 'From {inletTemperature} no outlet pressure leads to {temperature}.',
      next: 'Give another discharge temperature, or the outlet pressure itself.',
    },
    'compressor/temperature-below-inlet': {
      title: 'Discharge colder than the inlet',
      says: 'The discharge temperature of {temperature} is below the {inletTemperature} at the inlet; compressing heats.',
      next: 'Give a higher discharge temperature, or use an expander or a cooler.',
    },
    'compressor/liquid-enters': {
      title: 'Liquid enters the compressor',
      says: 'By mass {liquid%} of what enters is liquid; a compressor takes {limit%} at most.',
      next: 'Take the liquid off in a drum, or warm the gas before the compressor.',
    },
    'compressor/near-dew-point': {
      title: 'Inlet near its dew point',
      says: 'The gas enters {margin} above its dew point, less than {limit}: droplets may form in the suction line.',
      next: 'Warm the gas, or plan a suction drum and traced piping.',
    },
    'compressor/high-ratio': {
      title: 'High pressure ratio',
      says: 'The pressure rises {ratio} times, more than the {limit} of one stage.',
      next: 'Compress in two steps with a cooler between them.',
    },
    'compressor/hot': {
      title: 'Hot discharge',
      says: 'The gas leaves at {temperature}, above {limit}.',
      next: 'Lower the pressure ratio, cool the inlet, or compress in steps with coolers between them.',
    },
    'compressor/hot-light-gas': {
      title: 'Hot discharge of a light gas',
      says: 'A gas of {molarMass} leaves at {temperature}, above {limit}.',
      next: 'Lower the pressure ratio, cool the inlet, or compress in steps with coolers between them.',
    },
    'compressor/hot-olefins': {
      title: 'Hot discharge of olefins',
      says: 'With {olefins%} of olefins and dienes the gas leaves at {temperature}, above {limit}: it may foul by polymerising.',
      next: 'Compress in steps with coolers between them, or inject liquid.',
    },
    'compressor/gives-power': {
      title: 'The compressor gives power',
      says: 'The pressure falls from {inletPressure} to {outletPressure}.',
      next: 'Check the outlet pressure, or use an expander or a valve.',
    },
  },
};
