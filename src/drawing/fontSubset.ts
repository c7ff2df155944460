import { glyphOf, needed, type Tables, tablesOf } from './trueType';

/**
 * A TrueType font with the glyphs of some characters and nothing else: small enough to travel inside a drawing.
 * Tables after the OpenType specification, ISO/IEC 14496-22. Layout tables (kerning, ligatures) stay behind: the widths
 * that the drawing was laid out with know none. Only fonts with glyf outlines and a character map of format 4 or 12.
 */

const COMPOSITE = {
  wordArguments: 1,
  scale: 8,
  more: 0x20,
  twoScales: 0x40,
  matrix: 0x80,
  instructions: 0x100,
};
/** Copyright, names and the address of the licence. */
const NAMES: readonly number[] = [0, 1, 2, 4, 6, 14];

/** Glyphs that a composite one is built of, with the place of each number. */
function partsOf(glyph: DataView): { readonly at: number; readonly id: number }[] {
  if (glyph.byteLength === 0 || glyph.getInt16(0) >= 0) return [];
  const parts: { readonly at: number; readonly id: number }[] = [];
  let at = 10;
  for (let flags = COMPOSITE.more; flags & COMPOSITE.more; ) {
    flags = glyph.getUint16(at);
    parts.push({ at: at + 2, id: glyph.getUint16(at + 2) });
    at += flags & COMPOSITE.wordArguments ? 8 : 6;
    if (flags & COMPOSITE.scale) at += 2;
    else if (flags & COMPOSITE.twoScales) at += 4;
    else if (flags & COMPOSITE.matrix) at += 8;
  }
  return parts;
}

const bytesOf = (view: DataView): Uint8Array =>
  new Uint8Array(view.buffer, view.byteOffset, view.byteLength).slice();

function outlines(tables: Tables): (id: number) => DataView {
  const glyf = needed(tables, 'glyf');
  const loca = needed(tables, 'loca');
  const isLong = needed(tables, 'head').getInt16(50) === 1;
  const offset = (id: number): number => (isLong ? loca.getUint32(4 * id) : 2 * loca.getUint16(2 * id));
  return (id) => new DataView(glyf.buffer, glyf.byteOffset + offset(id), offset(id + 1) - offset(id));
}

function joined(parts: readonly Uint8Array[]): Uint8Array {
  const all = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    all.set(part, at);
    at += part.length;
  }
  return all;
}

function sized(bytes: number, fill: (view: DataView) => void): Uint8Array {
  const table = new Uint8Array(bytes);
  fill(new DataView(table.buffer));
  return table;
}
const write16 = (view: DataView, at: number, values: readonly number[]): void => {
  for (const [k, value] of values.entries()) view.setUint16(at + 2 * k, value);
};
const padded = (part: Uint8Array): Uint8Array => joined([part, new Uint8Array(-part.length & 3)]);

/** Glyph numbers are those of the small font. */
function glyphTables(glyph: (id: number) => DataView, ids: readonly number[]): [Uint8Array, Uint8Array] {
  const place = new Map(ids.map((id, k) => [id, k]));
  const all = ids.map((id) => {
    const of = bytesOf(glyph(id));
    const view = new DataView(of.buffer);
    for (const part of partsOf(view)) view.setUint16(part.at, place.get(part.id) ?? 0);
    return padded(of);
  });
  const loca = sized(4 * (ids.length + 1), (view) => {
    let at = 0;
    all.forEach((of, k) => {
      at += of.length;
      view.setUint32(4 * (k + 1), at);
    });
  });
  return [joined(all), loca];
}

/** A character map of format 4: characters in order, and glyph numbers with them, from 1 on. */
function characterMap(chars: readonly number[]): Uint8Array {
  const segments: { readonly from: number; to: number; readonly glyph: number }[] = [];
  chars.forEach((char, k) => {
    const last = segments.at(-1);
    if (last && last.to === char - 1) last.to = char;
    else segments.push({ from: char, to: char, glyph: k + 1 });
  });
  const count = segments.length + 1;
  const power = 2 ** Math.floor(Math.log2(count));
  return sized(12 + 16 + 8 * count, (view) => {
    // One map, for Windows and all who follow it: platform 3, encoding 1.
    write16(view, 0, [0, 1, 3, 1, 0, 12, 4, 16 + 8 * count, 0]);
    const at = 18;
    write16(view, at, [2 * count, 2 * power, Math.log2(power), 2 * (count - power)]);
    [...segments, { from: 0xffff, to: 0xffff, glyph: 0 }].forEach(({ from, to, glyph }, k) => {
      view.setUint16(at + 8 + 2 * k, to);
      view.setUint16(at + 10 + 2 * (count + k), from);
      view.setUint16(at + 10 + 2 * (2 * count + k), (glyph - from) & 0xffff);
    });
  });
}

function metrics(tables: Tables, ids: readonly number[]): Uint8Array {
  const hmtx = needed(tables, 'hmtx');
  const long = needed(tables, 'hhea').getUint16(34);
  return sized(4 * ids.length, (view) =>
    ids.forEach((id, k) => {
      const bearing = id < long ? 4 * id + 2 : 4 * long + 2 * (id - long);
      view.setUint16(4 * k, hmtx.getUint16(4 * Math.min(id, long - 1)));
      view.setInt16(4 * k + 2, hmtx.getInt16(bearing));
    }),
  );
}

function names(table: DataView): Uint8Array {
  const kept = Array.from({ length: table.getUint16(2) }, (_, k) => 6 + 12 * k).filter(
    (at) => table.getUint16(at) === 3 && NAMES.includes(table.getUint16(at + 6)),
  );
  const texts = kept.map((at) => {
    const from = table.getUint16(4) + table.getUint16(at + 10);
    return bytesOf(new DataView(table.buffer, table.byteOffset + from, table.getUint16(at + 8)));
  });
  const head = sized(6 + 12 * kept.length, (view) => {
    view.setUint16(2, kept.length);
    view.setUint16(4, 6 + 12 * kept.length);
    let offset = 0;
    kept.forEach((at, k) => {
      for (let j = 0; j < 10; j += 2) view.setUint16(6 + 12 * k + j, table.getUint16(at + j));
      view.setUint16(6 + 12 * k + 10, offset);
      offset += texts[k]?.length ?? 0;
    });
  });
  return joined([head, ...texts]);
}

function changed(table: DataView, change: (view: DataView) => void, length = table.byteLength): Uint8Array {
  const of = bytesOf(table).slice(0, length);
  change(new DataView(of.buffer));
  return of;
}

function checksum(table: Uint8Array): number {
  const view = new DataView(table.buffer, table.byteOffset, table.byteLength);
  let sum = 0;
  for (let at = 0; at < table.length; at += 4) sum = (sum + view.getUint32(at)) >>> 0;
  return sum;
}

/** Directory and tables in one file, with the sums that the format asks for. */
function file(tables: Readonly<Record<string, Uint8Array>>): Uint8Array {
  const entries = Object.entries(tables).sort(([a], [b]) => (a < b ? -1 : 1));
  const power = 2 ** Math.floor(Math.log2(entries.length));
  let at = 12 + 16 * entries.length;
  let headAt = 0;
  const directory = sized(at, (view) => {
    write16(view, 0, [1, 0, entries.length, 16 * power, Math.log2(power), 16 * (entries.length - power)]);
    entries.forEach(([tag, table], k) => {
      for (let j = 0; j < 4; j += 1) view.setUint8(12 + 16 * k + j, tag.charCodeAt(j));
      const sums = [checksum(padded(table)), at, table.length];
      for (const [j, value] of sums.entries()) view.setUint32(12 + 16 * k + 4 + 4 * j, value);
      if (tag === 'head') headAt = at;
      at += (table.length + 3) & ~3;
    });
  });
  const all = joined([directory, ...entries.map(([, table]) => padded(table))]);
  new DataView(all.buffer).setUint32(headAt + 8, (0xb1b0afba - checksum(all)) >>> 0);
  return all;
}

/**
 * The font with nothing but the glyphs of these characters; those that it lacks, and those outside Unicode's first plane,
 * are left out. The same input gives the same bytes. Throws when the file is no TrueType font: ours are.
 */
export function fontSubset(font: Uint8Array, characters: Iterable<string>): Uint8Array {
  const tables = tablesOf(font);
  const map = needed(tables, 'cmap');
  const chars = [...new Set(characters)]
    .map((c) => c.codePointAt(0) ?? 0)
    .filter((char) => char < 0xffff && glyphOf(map, char) > 0)
    .sort((a, b) => a - b);
  const glyph = outlines(tables);
  // The glyph for what is missing comes first; parts of composite glyphs come last, whoever asks for them.
  const ids = [0, ...chars.map((char) => glyphOf(map, char))];
  const known = new Set(ids);
  for (let k = 0; k < ids.length; k += 1)
    for (const { id } of partsOf(glyph(ids[k] ?? 0)))
      if (!known.has(id)) {
        known.add(id);
        ids.push(id);
      }
  const [glyf, loca] = glyphTables(glyph, ids);
  return file({
    'OS/2': bytesOf(needed(tables, 'OS/2')),
    cmap: characterMap(chars),
    glyf,
    head: changed(needed(tables, 'head'), (view) => {
      view.setUint32(8, 0);
      view.setInt16(50, 1);
    }),
    hhea: changed(needed(tables, 'hhea'), (view) => view.setUint16(34, ids.length)),
    hmtx: metrics(tables, ids),
    loca,
    maxp: changed(needed(tables, 'maxp'), (view) => view.setUint16(4, ids.length)),
    name: names(needed(tables, 'name')),
    // Version 3: no names of glyphs.
    post: changed(needed(tables, 'post'), (view) => view.setUint32(0, 0x00030000), 32),
  });
}
