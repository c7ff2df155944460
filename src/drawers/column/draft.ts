import type { Json } from '../../sketch/types';
import { keysOf, type Path, valueAt, withValue } from '../edits';
import { type Form, withAnswers } from '../unit/form';

/** A row of what fixes the column that has no value yet: kept here until one is typed, so that the train goes on as it was. */
export interface Draft {
  readonly row: number;
  readonly item: Json;
}

/**
 * The drawer's form with one row of `fixedBy` read from and written to a draft; the first value makes the whole row one edit.
 *
 * @param keep  takes a draft that still has no value
 * @param put   takes the row once it has one
 */
export function draftForm(
  form: Form,
  { row, item }: Draft,
  keep: (item: Json) => void,
  put: (item: Json, label: string) => void,
): Form {
  const inside = (path: Path): readonly string[] | undefined => {
    const [first, second, ...rest] = keysOf(path);
    return first === 'fixedBy' && second === String(row) ? rest : undefined;
  };
  const set: Form['set'] = (changes, label) => {
    let next: Json = item;
    for (const { path, value } of changes) {
      const rest = inside(path);
      if (rest) next = withValue(next, rest, value) ?? {};
    }
    if (valueAt(next, 'value') === undefined) keep(next);
    else put(next, label);
  };
  return withAnswers({
    ...form,
    value: (path) => {
      const rest = inside(path);
      return rest ? valueAt(item, rest) : form.value(path);
    },
    set,
    edit: (path, word, beside = [], wrap = (text) => text) => ({
      ...form.edit(path, word, beside, wrap),
      set: (next) =>
        set(
          next === undefined ? [{ path, value: undefined }] : [...beside, { path, value: wrap(next) }],
          `set ${form.unit.tag} ${word}`,
        ),
    }),
  });
}
