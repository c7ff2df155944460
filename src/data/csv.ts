/** Comma-separated tables as records; quoted fields may hold commas and doubled quotes, not line ends. */
export type Row = Readonly<Record<string, string>>;

function fieldsOf(line: string): string[] {
  const out: string[] = [];
  let field = '';
  let quoted = false;
  for (let k = 0; k < line.length; k += 1) {
    const ch = line[k]!;
    if (quoted) {
      if (ch !== '"') field += ch;
      else if (line[k + 1] === '"') {
        field += '"';
        k += 1;
      } else quoted = false;
    } else if (ch === '"') quoted = true;
    else if (ch === ',') {
      out.push(field);
      field = '';
    } else field += ch;
  }
  out.push(field);
  return out;
}

/** Throws when a line has another number of fields than the head line. */
export function readCsv(text: string): Row[] {
  const lines = text.split(/\r?\n/).filter((line) => line !== '');
  const head = fieldsOf(lines[0] ?? '');
  return lines.slice(1).map((line, k) => {
    const fields = fieldsOf(line);
    if (fields.length !== head.length)
      throw new Error(`line ${k + 2}: ${fields.length} fields, not ${head.length}`);
    return Object.fromEntries(head.map((name, c) => [name, fields[c]!]));
  });
}
