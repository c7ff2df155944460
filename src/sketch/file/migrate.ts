import type { JsonObject } from '../json';

/** The version this code writes and reads without change. */
export const VERSION = 1;

/** Turns a document of version `from` into one of version `from + 1`. Pure; must keep fields it does not know. */
export interface Migration {
  readonly from: number;
  readonly what: string;
  readonly change: (old: JsonObject) => JsonObject;
}

/** In order and without gaps: the first entry is from version 1. None yet. */
export const MIGRATIONS: readonly Migration[] = [];

/**
 * Brings a document up to date step by step.
 * @param version  the document's version, 1 .. migrations.length + 1
 * @returns the document of the newest version, and what was changed
 */
export function migrate(
  old: JsonObject,
  version: number,
  migrations: readonly Migration[] = MIGRATIONS,
): { readonly document: JsonObject; readonly steps: readonly string[] } {
  let document = old;
  const steps: string[] = [];
  for (const [k, step] of migrations.entries()) {
    if (step.from !== k + 1) throw new Error(`migrations have a gap at version ${k + 1}`);
    if (step.from < version) continue;
    document = { ...step.change(document), version: step.from + 1 };
    steps.push(step.what);
  }
  return { document, steps };
}
