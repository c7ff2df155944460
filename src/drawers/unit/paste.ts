/** A chemical by every name a spreadsheet may use for it. */
export interface PasteTarget {
  readonly id: string;
  readonly names: readonly string[];
}

export interface Pasted {
  /** Chemical id -> text as it will stand in the field. */
  readonly values: ReadonlyMap<string, string>;
  /** Names that belong to none of the sketch's chemicals. */
  readonly unknown: readonly string[];
  /** More rows than there are chemicals below the field. */
  readonly surplus: number;
}

const NUMBER = /^[+\-−]?(?:\d+\.?\d*|\.\d+)(?:[eE][+\-−]?\d+)?$/;
const QUANTITY = /^[+\-−]?(?:\d+\.?\d*|\.\d+)(?:[eE][+\-−]?\d+)?\s*(?:[A-Za-z%].*)?$/;

const plain = (text: string): string =>
  text
    .trim()
    .replace(/^"(.*)"$/, '$1')
    .toLowerCase()
    .replace(/[\s_]+/g, ' ');

/** Splits a line by the first separator that it uses: tab, semicolon, then comma. */
function cells(line: string): readonly string[] {
  const mark = line.includes('\t') ? '\t' : line.includes(';') ? ';' : ',';
  return line.split(mark).map((cell) =>
    cell
      .trim()
      .replace(/^"(.*)"$/, '$1')
      .trim(),
  );
}

/**
 * Reads what was copied from a spreadsheet: a column of numbers, fitted from the chemical in `from` downwards, or names with
 * numbers, fitted by name. Bare numbers that sum to about a hundred are per cent, to about one fractions; others take
 * `unit`. A header line is passed over.
 *
 * @returns undefined when the text is a single number or no table at all: then it is typed like any text
 */
export function readPaste(
  text: string,
  targets: readonly PasteTarget[],
  from: number,
  unit: string,
): Pasted | undefined {
  const lines = text
    .split(/\r?\n/)
    .filter((line) => line.trim() !== '')
    .map(cells);
  const acrossOne = lines.length === 1 ? lines[0] : undefined;
  const isRow =
    acrossOne !== undefined && acrossOne.length > 1 && acrossOne.every((cell) => QUANTITY.test(cell));
  const rows = isRow ? acrossOne.map((cell) => [cell]) : lines;
  if (rows.length < 2 && (rows[0]?.length ?? 0) < 2) return undefined;

  const values = new Map<string, string>();
  const unknown: string[] = [];
  let surplus = 0;
  let next = from;
  for (const row of rows) {
    const at = row.findIndex((cell) => QUANTITY.test(cell));
    const name = row.find((cell) => cell !== '' && !QUANTITY.test(cell));
    const known = name === undefined ? undefined : targetOf(targets, name);
    // A name such as "1,3-butadiene" is split by its comma: try the cells before the number as one name.
    const whole = known ?? targetOf(targets, row.slice(0, -1).join(','));
    const number = whole && !known ? row.at(-1) : row[at];
    if (number === undefined || !QUANTITY.test(number)) continue;
    if (name === undefined && whole === undefined) {
      const target = targets[next];
      next += 1;
      if (target) values.set(target.id, number);
      else surplus += 1;
    } else if (whole) values.set(whole.id, number);
    else if (name !== undefined) unknown.push(name);
  }
  if (values.size === 0 && unknown.length === 0) return undefined;
  return { values: withUnits(values, unit), unknown, surplus };
}

const targetOf = (targets: readonly PasteTarget[], name: string): PasteTarget | undefined =>
  targets.find((target) => target.names.some((known) => plain(known) === plain(name)));

function withUnits(values: ReadonlyMap<string, string>, unit: string): ReadonlyMap<string, string> {
  const bare = [...values.values()].filter((text) => NUMBER.test(text));
  const sum = bare.reduce((total, text) => total + Number(text.replace('−', '-')), 0);
  const isFraction = unit === '%' && bare.length === values.size && Math.abs(sum - 1) < 0.05;
  const behind = isFraction || unit === '' ? '' : ` ${unit}`;
  return new Map([...values].map(([id, text]) => [id, NUMBER.test(text) ? text + behind : text]));
}
