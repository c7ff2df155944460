import type { Sentence } from '../types';

/** Order, loops, closure, and the model's pairs. */
export const NETWORK_SENTENCES: Readonly<Record<string, Sentence>> = {
  'network/nothing-enters': {
    title: 'Nothing enters the loop',
    says: 'No stream leads into the loop of {unit...}, so nothing says how much flows in it.',
    next: 'Say how much shall go round: delete one of its streams, best one that leaves a heater or a cooler with a set temperature. Draw a feed to the inlet that is free then, with that flow, temperature and pressure, and a product from the free outlet. The answer is that of the closed loop when the product comes out in the state in which the feed goes in; change the feed until it does. Or let a feed join the loop, and something leave it.',
  },
  'network/no-way-out': {
    title: 'No way out',
    says: 'The loop of {unit...} has no way out for {chemical...}: {entering} enter, {leaving} leave, and with {round} going round it still gathers.',
    next: 'Give it a purge: drop a divide from the shelf onto stream {stream}, {fraction%} of which is that, draw a product from its free outlet, and set the share that leaves there. Or let more of it leave elsewhere.',
  },
  'network/loop-unsettled': {
    title: 'The loop does not settle',
    says: 'After {passes} passes stream {stream} still comes back changed by {residual%} of what was assumed; the loop is {unit...}.',
    next: 'Open the loop: delete stream {stream}, draw a product from the outlet that is free then and a feed to the free inlet. See what comes out for what goes in, and change what it reacts to most.',
  },
  'network/pressure-falls': {
    title: 'The pressure falls on every way round',
    says: 'The loop of {unit...} comes back at stream {stream} {fall} lower than it left there at {pressure}, and so on every way round.',
    next: 'Put a pump, a compressor or a fan into the loop that brings the pressure up again; where streams join, the lowest of their pressures counts.',
  },
  'network/unknown-kind': {
    title: 'Not available',
    says: 'This kind of unit is not available in this version.',
    next: 'Replace the unit, or open the sketch with a later version.',
  },
  'network/inlet-missing': {
    title: 'Nothing comes in',
    says: 'No stream enters at the {port}.',
    next: 'Draw a stream to it.',
  },
  'network/source-missing': {
    title: 'A stream from nowhere',
    says: 'Stream {stream} comes from no unit.',
    next: 'Draw its start to a feed or to an outlet.',
  },
  'network/outlet-missing': {
    title: 'Nothing leaves',
    says: 'No stream leaves at the {port}.',
    next: 'Draw a stream from it.',
  },
  'network/waits-for': {
    title: 'Waiting',
    says: 'Waiting for stream {stream} of {unit...}.',
    next: 'Look at {unit...} first.',
  },
  'network/does-not-close': {
    title: 'Does not close',
    says: 'The balance around this unit misses by {relative}, more than is called solved.',
    next: 'Change the conditions a little; if it stays, please report the sketch.',
  },
  'network/several-answers': {
    title: 'Several answers',
    says: 'Solved from nothing, stream {stream} comes out otherwise than on the screen: the flow of a component by {flow%}, the temperature by {temperature}, the vapour fraction by {vapourFraction}. The answer from nothing stands.',
    next: 'Look for conditions that allow more than one state.',
  },
  'model/pair-none': {
    title: 'Pair without a parameter',
    says: 'Nothing is known of how {first} and {second} act on each other; stream {stream} holds {fraction%} of {first} and {other%} of {second}, {limit%} or more. Zero is used.',
    next: 'Give the pair a parameter of your own.',
  },
  'model/pair-predicted': {
    title: 'Predicted pairs',
    says: 'Of the pairs that meet in the sketch {count} have a parameter that group contributions predict.',
    next: 'See the list of pairs; give measured values where they matter.',
  },
  'model/pair-predicted-far': {
    title: 'Predicted pairs far from zero',
    says: 'The parameters of {pair...} are predicted at 25 °C and held constant at every temperature; they lie far from zero, the first at {kij}.',
    next: 'Check them against data at the temperatures of the sketch, or give values of your own.',
  },
};
