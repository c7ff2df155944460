import { KIND_WORDS } from '../kinds';
import type { Sentence } from '../types';
import { NETWORK_SENTENCES } from './network';
import { STREAM_SENTENCES } from './streams';
import { UNIT_SENTENCES } from './units';

/** Sentences of units, streams and network by code; what the document and a flash say stands in general/. */
export const SENTENCES: Readonly<Record<string, Sentence>> = Object.assign(
  {},
  UNIT_SENTENCES,
  STREAM_SENTENCES,
  NETWORK_SENTENCES,
  ...Object.values(KIND_WORDS).map((words) => words.sentences ?? {}),
);
