import { absorbers } from './absorbers';
import { columns } from './columns';
import { drawings } from './drawings';
import { examples } from './examples';
import { files } from './files';
import { flashes } from './flashes';
import { oneEnded } from './oneEnded';

/** What a group found: cases tried, how they ended, and every case that needs looking at. */
export interface GroupReport {
  readonly tried: number;
  /** With an answer that passes all checks. */
  readonly answered: number;
  /** With a reason instead, by code. */
  readonly reasons: Readonly<Record<string, number>>;
  /** Answers that fail a check: always a defect. */
  readonly wrong: number;
  readonly share: number;
  readonly wanted: number;
  readonly cases: readonly unknown[];
  readonly more?: unknown;
}

/** `only`: one case by its number, in groups that can run one alone. */
export type Group = (seed: number, count: number, only?: number) => Promise<GroupReport>;

/** One line a group. */
export const GROUPS: Readonly<Record<string, Group>> = {
  flashes,
  columns,
  oneEnded,
  absorbers,
  examples,
  drawings,
  files,
};

/** Groups that drive a browser and take seconds a case: run only when named, and loaded only then. */
export const SLOW_GROUPS: Readonly<Record<string, Group>> = {
  kills: async (seed, count) => (await import('./kills')).kills(seed, count),
};
