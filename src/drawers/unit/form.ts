import type { ReactNode } from 'react';
import type { Finding } from '../../engine/outcome';
import type { KindCatalogue, SettingSpec } from '../../engine/units/types';
import type { FieldEdit } from '../../parts/fieldEdit';
import type { Site } from '../../quantity';
import type { Assumption, Json, Quantity, SketchUnit } from '../../sketch/types';
import type { SketchStore } from '../../store/sketchStore';
import { keysOf, type Path, type SettingChange, setSettings, valueAt } from '../edits';
import { settingWord } from '../words';

export interface EditorProps {
  readonly spec: SettingSpec;
  readonly path: string;
  /** The group it belongs to may be absent, and is. */
  readonly dormant?: boolean;
}

/** What every setting of one unit's drawer needs: the unit, its kind, and how to edit. */
export interface Form {
  readonly unit: SketchUnit;
  readonly kind: KindCatalogue;
  readonly site: Site;
  readonly disabled: boolean;
  readonly findings: readonly Finding[];
  readonly assumptions: readonly Assumption[];
  /** The editor of any setting, for settings that hold others. */
  readonly Editor: (props: EditorProps) => ReactNode;
  value(path: Path): Json | undefined;
  /** Whether there is a value, whatever it is. */
  has(path: Path): boolean;
  /** What a view makes of the settings, where that stays the same while they change. */
  ask<T>(question: (form: Form) => T): T;
  word(path: string): string;
  set(changes: readonly SettingChange[], label: string): void;
  /** For a field at a path; `beside`: changes that go with a new text (another key that it replaces). */
  edit(
    path: Path,
    word: string,
    beside?: readonly SettingChange[],
    wrap?: (text: Quantity) => Json,
  ): FieldEdit;
}

export const dotted = (path: Path): string => keysOf(path).join('.');
export const joined = (base: string, key: string): string => (base === '' ? key : `${base}.${key}`);

export function makeForm(
  parts: Pick<Form, 'unit' | 'kind' | 'site' | 'disabled' | 'findings' | 'assumptions' | 'Editor'>,
  store: SketchStore,
): Form {
  const { unit, kind } = parts;
  const set: Form['set'] = (changes, label) => void store.apply(label, setSettings(unit.id, changes));
  return withAnswers({
    ...parts,
    value: (path) => valueAt(unit.settings, path),
    word: (path) => settingWord(kind.kind, path),
    set,
    edit: (path, word, beside = [], wrap = (text) => text) => ({
      set: (next) =>
        set(
          next === undefined ? [{ path, value: undefined }] : [...beside, { path, value: wrap(next) }],
          `${next === undefined ? 'clear' : 'set'} ${unit.tag} ${word}`,
        ),
      begin: () => store.begin(`slide ${unit.tag} ${word}`),
      change: (text) => store.change(setSettings(unit.id, [{ path, value: wrap(text) }])),
      commit: () => store.commit(),
      cancel: () => store.cancel(),
    }),
  });
}

/** A form whose answers rest on its own values. */
export function withAnswers(form: Omit<Form, 'has' | 'ask'>): Form {
  const whole: Form = {
    ...form,
    has: (path) => form.value(path) !== undefined,
    ask: (question) => question(whole),
  };
  return whole;
}
