import type { Schema } from './types';

/** A rule that counts where a field has a value. Made from entries: a literal `then` would look like a promise. */
export const when = (key: string, value: string, rule: Schema): Schema =>
  Object.fromEntries([
    ['if', { required: [key], properties: { [key]: { const: value } } }],
    ['then', rule],
  ]);
