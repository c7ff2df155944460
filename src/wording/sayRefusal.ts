import { sayQuantityRefusal } from './general/quantity';

/** Why a typed quantity is not taken, without what to type instead; `near` is what was most likely meant. */
export const sayRefusal = (code: string, found = '', near?: string): string =>
  sayQuantityRefusal({ code, found, fits: [], ...(near === undefined ? {} : { near }) }).sentence;
