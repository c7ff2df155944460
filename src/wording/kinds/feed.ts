import type { KindWords } from '../types';

export const feed: KindWords = {
  name: 'feed',
  about: 'Material enters the sketch here.',
  ports: { out: 'outlet' },
  settings: {
    state: 'conditions',
    'state.T': 'temperature',
    'state.P': 'pressure',
    'state.vapourFraction': 'vapour fraction',
    'state.enthalpy': 'molar enthalpy',
    'state.entropy': 'molar entropy',
    flow: 'flow',
    composition: 'composition',
    'composition.parts': 'parts',
    'composition.flows': 'component flows',
    'composition.basis': 'basis',
    'composition.preset': 'ready-made air',
    'composition.relativeHumidity': 'relative humidity',
  },
  sentences: {
    'feed/flow-missing': {
      title: 'Flow missing',
      says: 'The feed has a composition but no flow.',
      next: 'Give a flow, or give the composition as component flows.',
    },
    'feed/flow-not-positive': {
      title: 'No flow',
      says: 'The flow of the feed is not above zero.',
      next: 'Give a flow above zero, or take the feed off the sheet.',
    },
    'feed/no-components': {
      title: 'No components',
      says: 'Every part of the composition is zero.',
      next: 'Give at least one component a part above zero.',
    },
    'feed/share-without-stream': {
      title: 'A share of nothing',
      says: 'A feed has no inlets of its own that its flow could be a share of.',
      next: 'Name the stream that the share is taken of, or give the flow itself.',
    },
    'feed/air-needs-temperature-and-pressure': {
      title: 'Humid air needs T and P',
      says: 'The water in humid air follows from temperature and pressure, and one of them is not given.',
      next: 'Set temperature and pressure of this feed, or choose dry air.',
    },
    'feed/air-component-missing': {
      title: 'Component of air missing',
      says: 'The air chosen holds {chemical}, which is not among the chemicals.',
      next: 'Add {chemical} to the chemicals, or choose another air.',
    },
    'feed/water-data-missing': {
      title: 'No vapour pressure of water',
      says: 'The vapour pressure of water is not known at {temperature}, so the humidity cannot be found.',
      next: 'Choose a temperature below the critical point of water, or choose dry air.',
    },
    'feed/humidity-above-saturation': {
      title: 'More water than air',
      says: 'At this humidity the water alone would have {waterPressure}, which is not below the pressure of {pressure}.',
      next: 'Lower the temperature or the humidity, or raise the pressure.',
    },
  },
};
