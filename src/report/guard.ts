/**
 * A text cell that a spreadsheet will not take for a formula: a leading = + - @, also in its full width, tab, return or new
 * line gets an apostrophe (OWASP, "CSV injection"). Numbers are written by number writers and never pass here.
 */
export const guarded = (value: string): string =>
  /^[=+\-@\t\r\n\uFF1D\uFF0B\uFF0D\uFF20]/.test(value) ? `'${value}` : value;
