import { word } from '../findings';
import type { JsonObject } from '../json';
import type { Problems } from './problem';

/** The version this code writes, and reads without change. */
export const VERSION = 1;

/**
 * Turns a document of version `from` into one of version `from + 1`. Pure; keeps fields it does not know. It runs before
 * the document's shape is checked, so that it may meet anything; where it throws, the file is refused.
 */
export interface Migration {
  readonly from: number;
  /** What was changed, as a user may read it: "Limits are now kept by unit". */
  readonly what: string;
  readonly change: (old: JsonObject) => JsonObject;
}

/**
 * In order and without gaps, the last one ending at VERSION. To change the form of the file: raise VERSION, add the step
 * here, and keep a file of the version before under tests/sheets/. None yet: version 1 is the first.
 */
export const MIGRATIONS: readonly Migration[] = [];

/** The oldest version that a chain of migrations leads on from. */
export const oldest = (migrations: readonly Migration[] = MIGRATIONS): number => VERSION - migrations.length;

/**
 * Brings a document up to date step by step.
 * @param version  the document's version, oldest .. VERSION
 * @returns the document of the newest version, and what was changed; undefined, with the problem told, where a step failed
 */
export function migrate(
  old: JsonObject,
  version: number,
  problems: Problems,
  migrations: readonly Migration[] = MIGRATIONS,
): { readonly document: JsonObject; readonly steps: readonly string[] } | undefined {
  const first = oldest(migrations);
  let document = old;
  const steps: string[] = [];
  for (const [k, step] of migrations.entries()) {
    if (step.from !== first + k) throw new Error(`migrations have a gap at version ${first + k}`);
    if (step.from < version) continue;
    try {
      document = { ...step.change(document), version: step.from + 1 };
    } catch (error) {
      // A step reads what nobody has checked: what breaks it is the file.
      const why = error instanceof Error ? error.message : String(error);
      problems.add('', 'file/not-migrated', word('what', step.what), word('why', why));
      return undefined;
    }
    steps.push(step.what);
  }
  return { document, steps };
}
