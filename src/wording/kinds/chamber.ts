import type { KindWords } from '../types';

export const chamber: KindWords = {
  name: 'combustion chamber',
  about: 'Burns what burns completely, by its elements; no dissociation, no CO, no NOx.',
  ports: { fuel: 'fuel', air: 'air', out: 'flue gas' },
  settings: {
    air: 'air drawn from outside',
    'air.excess': 'excess air',
    'air.stackO2Dry': 'oxygen in the dry flue gas',
    'air.flow': 'air flow',
    'air.T': 'air temperature',
    'air.P': 'air pressure',
    'air.composition': 'composition of the air',
    'air.composition.preset': 'ready-made air',
    'air.composition.relativeHumidity': 'relative humidity',
    p: 'pressure',
    heat: 'heat',
    'heat.duty': 'duty (into the chamber)',
    'heat.lossOfLHV': 'loss, of the lower heating value',
    'heat.T': 'flue gas temperature',
  },
  results: {
    T_K: 'flue gas temperature',
    P_Pa: 'pressure',
    excess: 'excess air',
    O2Dry: 'oxygen in the dry flue gas (molar)',
    O2Wet: 'oxygen in the wet flue gas (molar)',
    CO2Dry: 'carbon dioxide in the dry flue gas (molar)',
    CO2_kg_s: 'carbon dioxide that leaves',
    air_mol_s: 'air drawn from outside',
    theoreticalO2_mol_s: 'theoretical oxygen',
    LHV_W: 'lower heating value at 25 °C as ideal gas',
    HHV_W: 'higher heating value at 25 °C as ideal gas',
    duty_W: 'duty',
  },
  sentences: {
    'chamber/element-not-burnt': {
      title: 'Cannot be burnt here',
      says: '{chemical} holds {element}; what becomes of {element} in a flame is not known here.',
      next: 'Take {chemical} out before the chamber.',
    },
    'chamber/product-missing': {
      title: 'A product has no place',
      says: 'Burning {chemical} needs {product} among the chemicals, and it is not there.',
      next: 'Add {product} to the chemicals.',
    },
    'chamber/chlorine-without-hydrogen': {
      title: 'Not enough hydrogen for the chlorine',
      says: 'Chlorine leaves as HCl and would need {water} more of water than there is.',
      next: 'Bring in a fuel with more hydrogen, or water.',
    },
    'chamber/nothing-burns': {
      title: 'Nothing burns',
      says: 'Nothing that comes in burns: the chamber only mixes.',
      next: 'Check what the fuel ports bring.',
    },
    'chamber/air-short': {
      title: 'Air is short',
      says: 'Air is short by {short}; {enough} gives 15 % excess.',
      next: 'Bring in {enough} of this air.',
    },
    'chamber/no-oxygen': {
      title: 'Oxygen is short',
      says: 'Oxygen is short by {short}, and what comes in as air has none to give.',
      next: 'Bring in air that holds oxygen.',
    },
    'chamber/oxygen-without-air': {
      title: 'More oxygen than asked for',
      says: 'The fuels already bring {oxygen} of oxygen, which is more than what is set asks for.',
      next: 'Raise the {setting}, or give the air flow itself.',
    },
    'chamber/air-below-zero': {
      title: 'Air flow below zero',
      says: 'The flow of the air is {flow}.',
      next: 'Give an air flow of zero or more.',
    },
    'chamber/stack-oxygen-out-of-reach': {
      title: 'More oxygen than the air has',
      says: 'The dry flue gas cannot hold {wanted%} of oxygen: the air itself has {air%}.',
      next: 'Give less oxygen in the flue gas.',
    },
    'chamber/air-by-component-flows': {
      title: 'Air by component flows',
      says: 'The composition of the air is given by flows, beside another figure for how much air there is.',
      next: 'Give the composition of the air as parts.',
    },
    'chamber/air-setting-idle': {
      title: 'Air comes by stream',
      says: 'A stream is joined to the air port, so the air that is set to be drawn from outside is left out.',
      next: 'Clear the setting, or take the stream off.',
    },
    'chamber/cold': {
      title: 'Cold flame',
      says: 'The flue gas has {temperature}, below {limit}: it may not burn out.',
      next: 'Use less air, preheat it, or add fuel.',
    },
    'chamber/hot': {
      title: 'Hot flame',
      says: 'The flue gas has {temperature}, above {limit}.',
      next: 'Use more air, or take heat out.',
    },
    'chamber/too-hot-for-lining': {
      title: 'Too hot for a lining',
      says: 'The flue gas has {temperature}, above the {limit} that linings bear.',
      next: 'Use more air, or take heat out.',
    },
    'chamber/dissociation-neglected': {
      title: 'Dissociation is neglected',
      says: 'At {temperature}, above {limit}, carbon dioxide and water begin to come apart, which is left out here: the real flame is colder.',
      next: 'Read the temperature as an upper bound.',
    },
    'chamber/little-oxygen': {
      title: 'Little oxygen left',
      says: 'The dry flue gas holds {oxygen%} of oxygen, below {limit%}: it may not burn out.',
      next: 'Use more air.',
    },
    'chamber/takes-heat': {
      title: 'The chamber takes heat',
      says: 'Heat of {added} must be added to reach {temperature}.',
      next: 'Check the heat that is set, or use less air.',
    },
  },
};
