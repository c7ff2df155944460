import type { Sentence } from '../types';

/** What a stream runs into, whatever unit it leaves. */
export const STREAM_SENTENCES: Readonly<Record<string, Sentence>> = {
  'stream/second-liquid': {
    title: 'Another liquid may form',
    says: 'The stability test finds another liquid, mostly {chemical}. The numbers are for one liquid.',
    next: 'Do not rely on the liquid figures of this stream; a model for two liquids is needed.',
  },
  'stream/liquids-together': {
    title: 'Two liquids',
    says: 'This liquid parts into two, one of them mostly {chemical}. Enthalpy and entropy are those of both liquids together; the composition is that of the whole.',
    next: 'Do not rely on density, viscosity or the composition of either liquid; a model for two liquids is needed.',
  },
  'stream/water-above-solubility': {
    title: 'Water may part from the liquid',
    says: 'The hydrocarbon liquid holds {fraction%} water; at {temperature} it dissolves about {dissolves%}. The numbers are for one liquid.',
    next: 'Take the water out ahead of this stream, or use a model for two liquids.',
  },
  'stream/may-freeze': {
    title: 'A component may freeze',
    says: 'At {temperature} the liquid holds {fraction%} {chemical}, which alone freezes at {meltingPoint}; from {limit%} on this is said.',
    next: 'Check the freezing point of the mixture.',
  },
  'stream/freezes-mostly': {
    title: 'The liquid may freeze',
    says: 'At {temperature} the liquid is {fraction%} {chemical}, which alone freezes at {meltingPoint}; from {limit%} on this is said.',
    next: 'Keep the stream warmer, or check its freezing point.',
  },
  'stream/ice': {
    title: 'Ice may form',
    says: 'The stream holds {fraction%} water at {temperature}; from {limit%} on this is said.',
    next: 'Dry the stream, keep it above 0 °C, or plan for an inhibitor.',
  },
  'stream/dry-ice': {
    title: 'Dry ice may form',
    says: 'The stream holds {fraction%} carbon dioxide at {temperature}; from {limit%} on this is said.',
    next: 'Remove carbon dioxide, or keep the stream warmer.',
  },
  'stream/cold-steel': {
    title: 'Cold for plain steel',
    says: 'The stream is at {temperature}; below {limit} plain carbon steel is not used without testing.',
    next: 'Choose a material and note it at the unit.',
  },
  'stream/too-cold-for-steel': {
    title: 'Too cold for carbon steel',
    says: 'The stream is at {temperature}, below {limit}, and no material is noted.',
    next: 'Choose a material for low temperature and note it at the unit.',
  },
  'stream/vacuum': {
    title: 'Vacuum',
    says: 'The stream is at {pressure}, below {limit}.',
    next: 'Allow for air that leaks in and for what makes the vacuum.',
  },
  'stream/hydrates-not-checked': {
    title: 'Hydrates not checked',
    says: 'Wet gas with {fraction%} of hydrate formers, more than {limit%}, is at {temperature} and {pressure}. Hydrates are not calculated here.',
    next: 'Check the hydrate temperature elsewhere.',
  },
  'stream/near-critical': {
    title: 'Near the critical point',
    says: 'Liquid and vapour differ in density by a factor of {densityRatio} only; below {limit} this is said.',
    next: 'Take the phase split with care.',
  },
  'stream/too-near-critical': {
    title: 'Too near the critical point',
    says: 'Liquid and vapour differ in density by a factor of {densityRatio}, below {limit}: they hardly part.',
    next: 'Lower the pressure, and do not rely on the phase split.',
  },
  'stream/flammable-mixture': {
    title: 'Flammable mixture',
    says: 'The gas holds {oxygen%} oxygen and fuel, mostly {chemical}, at {shareOfLimit%} of its lower flammability limit (25 °C, 1 atm); from {limit%} on this is said.',
    next: 'Take it to a hazard review.',
  },
  'stream/outside-correlation': {
    title: 'Just outside a correlation',
    says: 'At {temperature} the {property} of {chemical} is used {distance} outside its stated range.',
    next: 'Take the figure with a little care.',
  },
  'stream/well-outside-correlation': {
    title: 'Outside a correlation',
    says: 'At {temperature} the {property} of {chemical} is used {distance} outside its stated range; from {limit} on this is said.',
    next: 'Compare with another source, or bring a correlation of your own.',
  },
  'stream/far-outside-correlation': {
    title: 'Far outside a correlation',
    says: 'At {temperature} the {property} of {chemical} is used {distance} outside its stated range; from {limit} on this is said.',
    next: 'Do not rely on this stream; bring a correlation that covers it, or choose another model.',
  },
};
