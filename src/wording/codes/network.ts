import type { Sentence } from '../types';

/** Order, loops, closure, and the model's pairs. */
export const NETWORK_SENTENCES: Readonly<Record<string, Sentence>> = {
  'network/loop': {
    title: 'Loop',
    says: 'These units feed each other in a loop: {unit...}. Loops are not solved in this version.',
    next: 'Open the loop at one stream and give the recycle as a feed.',
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
    says: 'Solved from nothing, stream {stream} comes out otherwise than on the screen, by {temperature} in temperature. The answer from nothing stands.',
    next: 'Look for conditions that allow more than one state.',
  },
  'model/pair-none': {
    title: 'Pair without a parameter',
    says: 'Nothing is known of how {first} and {second} act on each other; both reach {fraction%} in stream {stream}. Zero is used.',
    next: 'Give the pair a parameter of your own.',
  },
  'model/pair-predicted': {
    title: 'Predicted pairs',
    says: 'Of the pairs that meet in the sketch {count} have a parameter that group contributions predict.',
    next: 'See the list of pairs; give measured values where they matter.',
  },
};
