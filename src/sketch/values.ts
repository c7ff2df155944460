/** Anything that JSON text can hold. */
export type Json = string | number | boolean | null | readonly Json[] | { readonly [key: string]: Json };

/** "number unit" as the user typed it, or a plain number where dimensionless. */
export type Quantity = string | number;
