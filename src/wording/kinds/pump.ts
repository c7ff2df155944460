import type { KindWords } from '../types';

export const pump: KindWords = {
  name: 'pump',
  about: 'Raises the pressure of a liquid.',
  ports: { in: 'inlet', out: 'outlet' },
  settings: {
    p: 'outlet pressure',
    'p.P': 'outlet pressure',
    'p.drop': 'pressure drop (negative for a rise)',
    'p.ratio': 'outlet to inlet pressure',
    'p.head': 'head',
    efficiency: 'efficiency (hydraulic over shaft power)',
    staticHead: 'static head above the pump',
    drive: 'efficiency of motor and drive',
  },
  results: {
    power_W: 'shaft power',
    hydraulicPower_W: 'hydraulic power',
    electric_W: 'electric power',
    head_m: 'head',
    npshAvailable_m: 'NPSH available',
    bubbleP_Pa: 'bubble pressure at the inlet',
    volume_m3_s: 'volume flow at the inlet',
    P_Pa: 'outlet pressure',
    T_K: 'outlet temperature',
  },
  sentences: {
    'pump/vapour-enters': {
      title: 'Vapour enters the pump',
      says: 'By mole {vapour%} of what enters is vapour; a pump takes liquid only, and its power here means nothing.',
      next: 'Cool what enters, raise its pressure, or take the vapour off in a drum before the pump.',
    },
    'pump/low-suction-head': {
      title: 'Low NPSH available',
      says: 'NPSH available is {head}, below {limit}; the bubble pressure at the inlet is {bubblePressure}.',
      next: 'Set the static head above the pump, or more of it, or cool the liquid before it.',
    },
    'pump/static-head-only': {
      title: 'NPSH available: static head only',
      says: 'The liquid enters at its bubble point, so NPSH available is the static head only, which is not set and counts 0.',
      next: 'Set the height of the liquid level above the pump.',
    },
    'pump/gives-power': {
      title: 'The pump gives power',
      says: 'The pressure falls from {inletPressure} to {outletPressure}.',
      next: 'Check the outlet pressure, or use a valve.',
    },
  },
};
