import { expect, test } from 'vitest';
import { basisTable } from '../../src/report/basisTables';
import { printed } from '../../src/report/cells';
import type { Display, Sketch } from '../../src/sketch/types';
import { solvedExample } from './solved';

/** The lines on the site of the let-down's design basis. */
async function siteLines(display: Partial<Display>, site: Sketch['site'] = {}): Promise<readonly string[]> {
  const input = await solvedExample('let-down.sketch.json', (sketch) => ({
    ...sketch,
    site,
    display: { ...sketch.display, ...display },
  }));
  return basisTable(input)
    .rows.filter(({ label }) => /^(Site pressure|Ambient|Cooling)/.test(label))
    .map(({ cells: [cell] }) => (cell ? printed(cell) : ''));
}

// Derived: 101325 Pa is 1.01325 bar, 101.325 kPa and 14.69595 psi; 20 °C is 68 °F, 28 °C is 82.4 °F.
test.each([
  ['metric', ['1.01325 bar(a)', '20 °C', '28 °C']],
  ['SI', ['101.325 kPa(a)', '293.15 K', '301.15 K']],
  ['US', ['14.6959 psi(a)', '68 °F', '82.4 °F']],
] as const)(
  'what the site does not say is printed in the measures of the sketch: %s',
  async (set, values) => {
    const lines = values.map((value) => `${value}, not given: used where needed`);
    expect(await siteLines({ set })).toEqual(lines);
    // Counted from itself it would be nothing.
    expect(await siteLines({ set, gauge: true })).toEqual(lines);
  },
);

test('what it says is printed as it was typed', async () => {
  expect(await siteLines({ set: 'US' }, { pressure: '0.98 bar', coolingWater: '24 degC' })).toEqual([
    '0.98 bar(a)',
    '68 °F, not given: used where needed',
    '24 °C',
  ]);
});
