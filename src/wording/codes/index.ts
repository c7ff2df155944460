import { KIND_WORDS } from '../kinds';
import type { Sentence } from '../types';
import { NETWORK_SENTENCES } from './network';
import { SKETCH_SENTENCES } from './sketch';
import { STREAM_SENTENCES } from './streams';
import { UNIT_SENTENCES } from './units';

/** Every sentence by its code. */
export const SENTENCES: Readonly<Record<string, Sentence>> = Object.assign(
  {},
  UNIT_SENTENCES,
  STREAM_SENTENCES,
  NETWORK_SENTENCES,
  SKETCH_SENTENCES,
  ...Object.values(KIND_WORDS).map((words) => words.sentences ?? {}),
);
