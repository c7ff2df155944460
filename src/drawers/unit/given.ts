import type { SettingSpec } from '../../engine/units/types';
import type { Json, Quantity } from '../../sketch/types';
import { type Form, joined } from './form';

/** A settings value as a field shows it; anything that is no quantity reads as nothing given. */
export const quantityOf = (value: Json | undefined): Quantity | undefined =>
  typeof value === 'string' || typeof value === 'number' ? value : undefined;

export interface Assumed {
  readonly text: string;
  readonly why: string;
}

/** What is used in a setting's place while nothing is given there. */
export function assumedAt(form: Form, path: string, spec: SettingSpec | undefined): Assumed | undefined {
  const known = form.assumptions.find((a) => a.unit === form.unit.id && a.path === path);
  if (known) return { text: known.unitText, why: known.reason };
  return spec?.otherwise ? { text: spec.otherwise.text, why: spec.otherwise.why } : undefined;
}

/** Of a group of which one is assumed: which key, and its text. */
export function assumedKey(
  form: Form,
  base: string,
  spec: SettingSpec | undefined,
): (Assumed & { readonly key: string }) | undefined {
  const value = spec?.otherwise?.value;
  if (!spec?.otherwise || typeof value !== 'object' || value === null) return undefined;
  const key = Object.keys(value)[0];
  if (key === undefined) return undefined;
  const at = assumedAt(form, joined(base, key), undefined);
  return { key, ...(at ?? { text: spec.otherwise.text, why: spec.otherwise.why }) };
}
