/**
 * A text cell that a spreadsheet will not take for a formula: a leading = + - @, tab or return gets an apostrophe.
 * Numbers are written by number writers and never pass here.
 */
export const guarded = (value: string): string => (/^[=+\-@\t\r]/.test(value) ? `'${value}` : value);
