import type { Sentence } from '../types';

/** Sentences that several kinds of unit share. */
export const UNIT_SENTENCES: Readonly<Record<string, Sentence>> = {
  'pressure/not-positive': {
    title: 'No pressure left',
    says: 'The outlet pressure would be {pressure}; the inlet has {inletPressure}.',
    next: 'Lower the pressure drop, or give the outlet pressure itself.',
  },
  'pressure/enters-below': {
    title: 'Flows against the pressure',
    says: 'The stream at the {port} has {streamPressure}; inside there are {unitPressure}, more than {limit} above it.',
    next: 'Raise the pressure of the stream, or lower the pressure of the unit.',
  },
  'temperature/not-positive': {
    title: 'Below absolute zero',
    says: 'The outlet temperature would be {temperature}.',
    next: 'Give a smaller change of temperature.',
  },
  'reaction/no-formula': {
    title: 'No formula',
    says: '{chemical} has no formula, so its elements cannot be followed.',
    next: 'Give the formula of {chemical}, or keep it out of this unit.',
  },
  'reaction/no-formation-enthalpy': {
    title: 'No enthalpy of formation',
    says: '{chemical} has no enthalpy of formation, so the heat of its reaction is not known.',
    next: 'Give the enthalpy of formation of {chemical} as ideal gas at 25 °C.',
  },
  'reaction/molar-mass': {
    title: 'Molar mass against formula',
    says: 'The molar mass of {chemical} is given as {given}; its formula has {byFormula} g/mol, and mass would not close.',
    next: 'Give {chemical} the molar mass of its formula.',
  },
  'cooling/below-air': {
    title: 'Too cool for air',
    says: 'The outlet of {temperature} is below {limit}, which air reaches on a warm day.',
    next: 'Plan for cooling water.',
  },
  'cooling/below-cooling-water': {
    title: 'Too cool for cooling water',
    says: 'The outlet of {temperature} is nearer than {limit} to cooling water, which comes in at {coolingWater}, or below it.',
    next: 'Plan for chilled water, or let the outlet be warmer.',
  },
  'cooling/below-chilled-water': {
    title: 'Too cool for chilled water',
    says: 'The outlet of {temperature} is below {limit}, which chilled water reaches.',
    next: 'Plan for a refrigerant, or let the outlet be warmer.',
  },
  'cooling/second-refrigerant': {
    title: 'A second level of refrigerant',
    says: 'The outlet of {temperature} is below {limit}, which one level of refrigerant reaches.',
    next: 'Plan for a second level, or let the outlet be warmer.',
  },
  'heating/above-low-pressure-steam': {
    title: 'Needs medium-pressure steam',
    says: 'The outlet of {temperature} is above {limit}, which low-pressure steam reaches.',
    next: 'Plan for medium-pressure steam.',
  },
  'heating/above-medium-pressure-steam': {
    title: 'Needs high-pressure steam',
    says: 'The outlet of {temperature} is above {limit}, which medium-pressure steam reaches.',
    next: 'Plan for high-pressure steam.',
  },
  'heating/above-high-pressure-steam': {
    title: 'Hotter than steam',
    says: 'The outlet of {temperature} is above {limit}, which high-pressure steam reaches.',
    next: 'Plan for hot oil or a fired heater.',
  },
  'heating/cracks': {
    title: 'Hot enough to crack',
    says: 'The outlet of {temperature} is above {limit}, where hydrocarbons begin to crack.',
    next: 'Lower the temperature, or treat the unit as a reactor.',
  },
  'heating/polymerises': {
    title: 'May polymerise',
    says: '{chemical} is heated to {temperature}; above {limit} it tends to polymerise on hot walls.',
    next: 'Lower the pressure so that the temperature falls, or plan for an inhibitor.',
  },
};
