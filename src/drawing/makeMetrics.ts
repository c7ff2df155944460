/**
 * Reads advance widths out of TrueType fonts and prints advances.ts:
 *   tsx src/drawing/makeMetrics.ts REGULAR.ttf SEMIBOLD.ttf ITALIC.ttf > src/drawing/advances.ts
 * Tables cmap (format 4 or 12), hhea, hmtx, head after the OpenType specification, ISO/IEC 14496-22.
 */
import { readFileSync } from 'node:fs';

const range = (from: number, to: number): number[] =>
  Array.from({ length: to - from + 1 }, (_, k) => from + k);

/** Latin-1, Latin Extended-A, and the signs numbers, units and formulas need. */
const CHARS: readonly number[] = [
  ...range(0x20, 0x7e),
  ...range(0xa0, 0x17f),
  ...[...'ΔΩΣαβγηλμνρφω\u2009\u202f\u2007–—‘’“”…•′″⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻₀₁₂₃₄₅₆₇₈₉₊₋−∞≈≠≤≥√∂'].map(
    (c) => c.codePointAt(0)!,
  ),
];

function tablesOf(font: Buffer): Map<string, number> {
  const tables = new Map<string, number>();
  const count = font.readUInt16BE(4);
  for (let k = 0; k < count; k++) {
    const at = 12 + 16 * k;
    tables.set(font.toString('latin1', at, at + 4), font.readUInt32BE(at + 8));
  }
  return tables;
}

function glyphIn4(font: Buffer, at: number, char: number): number {
  const twice = font.readUInt16BE(at + 6);
  for (let k = 0; k < twice; k += 2) {
    const end = font.readUInt16BE(at + 14 + k);
    if (char > end) continue;
    const start = font.readUInt16BE(at + 16 + twice + k);
    if (char < start) return 0;
    const delta = font.readUInt16BE(at + 16 + 2 * twice + k);
    const offsetAt = at + 16 + 3 * twice + k;
    const offset = font.readUInt16BE(offsetAt);
    if (offset === 0) return (char + delta) & 0xffff;
    const glyph = font.readUInt16BE(offsetAt + offset + 2 * (char - start));
    return glyph === 0 ? 0 : (glyph + delta) & 0xffff;
  }
  return 0;
}

function glyphIn12(font: Buffer, at: number, char: number): number {
  const groups = font.readUInt32BE(at + 12);
  for (let k = 0; k < groups; k++) {
    const group = at + 16 + 12 * k;
    const start = font.readUInt32BE(group);
    if (char >= start && char <= font.readUInt32BE(group + 4))
      return font.readUInt32BE(group + 8) + char - start;
  }
  return 0;
}

function glyphFinder(font: Buffer, cmap: number): (char: number) => number {
  const count = font.readUInt16BE(cmap + 2);
  for (let k = 0; k < count; k++) {
    const at = cmap + font.readUInt32BE(cmap + 4 + 8 * k + 4);
    const format = font.readUInt16BE(at);
    if (format === 12) return (char) => glyphIn12(font, at, char);
    if (format === 4) return (char) => glyphIn4(font, at, char);
  }
  throw new Error('the font has no character map of format 4 or 12');
}

/** Advance widths in thousandths of an em, one a character; 0 where the font has no glyph. */
function advancesOf(file: string): number[] {
  const font = readFileSync(file);
  const tables = tablesOf(font);
  const table = (name: string): number => {
    const at = tables.get(name);
    if (at === undefined) throw new Error(`${file}: table ${name} is missing`);
    return at;
  };
  const perEm = font.readUInt16BE(table('head') + 18);
  const metrics = font.readUInt16BE(table('hhea') + 34);
  const glyphOf = glyphFinder(font, table('cmap'));
  const hmtx = table('hmtx');
  return CHARS.map((char) => {
    const glyph = glyphOf(char);
    if (glyph === 0) return 0;
    return Math.round((1000 * font.readUInt16BE(hmtx + 4 * Math.min(glyph, metrics - 1))) / perEm);
  });
}

const names = ['REGULAR', 'SEMIBOLD', 'ITALIC'];
const files = process.argv.slice(2);
if (files.length !== names.length) throw new Error('give three fonts: regular, semibold, italic');
console.log('/** Made by makeMetrics.ts from the shipped fonts; advance widths in thousandths of an em. */');
console.log(`export const CHARS: readonly number[] = [${CHARS.join(', ')}];`);
files.forEach((file, k) => {
  console.log(`export const ${names[k]}: readonly number[] = [${advancesOf(file).join(', ')}];`);
});
