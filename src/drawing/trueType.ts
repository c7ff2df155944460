/** Reading TrueType fonts: tables and character map after the OpenType specification, ISO/IEC 14496-22. */

export type Tables = ReadonlyMap<string, DataView>;

/** Tables of a font file by their tags. */
export function tablesOf(font: Uint8Array): Tables {
  const all = new DataView(font.buffer, font.byteOffset, font.byteLength);
  const tables = new Map<string, DataView>();
  for (let k = 0; k < all.getUint16(4); k += 1) {
    const at = 12 + 16 * k;
    const tag = String.fromCharCode(...font.subarray(at, at + 4));
    tables.set(
      tag,
      new DataView(font.buffer, font.byteOffset + all.getUint32(at + 8), all.getUint32(at + 12)),
    );
  }
  return tables;
}

/** Throws when the font lacks the table. */
export function needed(tables: Tables, tag: string): DataView {
  const table = tables.get(tag);
  if (!table) throw new Error(`the font has no table ${tag}`);
  return table;
}

function glyphIn4(map: DataView, at: number, char: number): number {
  const twice = map.getUint16(at + 6);
  for (let k = 0; k < twice; k += 2) {
    if (char > map.getUint16(at + 14 + k)) continue;
    const start = map.getUint16(at + 16 + twice + k);
    if (char < start) return 0;
    const delta = map.getUint16(at + 16 + 2 * twice + k);
    const offsetAt = at + 16 + 3 * twice + k;
    const offset = map.getUint16(offsetAt);
    if (offset === 0) return (char + delta) & 0xffff;
    const glyph = map.getUint16(offsetAt + offset + 2 * (char - start));
    return glyph === 0 ? 0 : (glyph + delta) & 0xffff;
  }
  return 0;
}

function glyphIn12(map: DataView, at: number, char: number): number {
  for (let k = 0; k < map.getUint32(at + 12); k += 1) {
    const group = at + 16 + 12 * k;
    const start = map.getUint32(group);
    if (char >= start && char <= map.getUint32(group + 4)) return map.getUint32(group + 8) + char - start;
  }
  return 0;
}

/** Number of a character's glyph, 0 where the font has none; `map` is the table cmap. Throws when it has no known format. */
export function glyphOf(map: DataView, char: number): number {
  for (let k = 0; k < map.getUint16(2); k += 1) {
    const at = map.getUint32(4 + 8 * k + 4);
    const format = map.getUint16(at);
    if (format === 4 || format === 12) return (format === 4 ? glyphIn4 : glyphIn12)(map, at, char);
  }
  throw new Error('the font has no character map of format 4 or 12');
}
