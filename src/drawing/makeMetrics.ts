/**
 * Reads advance widths out of TrueType fonts and prints advances.ts:
 *   tsx src/drawing/makeMetrics.ts REGULAR.ttf SEMIBOLD.ttf ITALIC.ttf > src/drawing/advances.ts
 * Tables cmap (format 4 or 12), hhea, hmtx, head after the OpenType specification, ISO/IEC 14496-22.
 */
import { readFileSync } from 'node:fs';
import { glyphOf, needed, tablesOf } from './trueType';

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

/** Advance widths in thousandths of an em, one a character; 0 where the font has no glyph. */
function advancesOf(file: string): number[] {
  const tables = tablesOf(readFileSync(file));
  const perEm = needed(tables, 'head').getUint16(18);
  const metrics = needed(tables, 'hhea').getUint16(34);
  const map = needed(tables, 'cmap');
  const hmtx = needed(tables, 'hmtx');
  return CHARS.map((char) => {
    const glyph = glyphOf(map, char);
    if (glyph === 0) return 0;
    return Math.round((1000 * hmtx.getUint16(4 * Math.min(glyph, metrics - 1))) / perEm);
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
