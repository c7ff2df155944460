import { beforeAll, describe, expect, test } from 'vitest';
import { preparePure } from '../../src/engine/thermo/pure/pure';
import type { ReportInput, SolvedStream } from '../../src/report/input';
import { buildReport } from '../../src/report/model';
import { resultsJson } from '../../src/report/resultsJson';
import { noStandardLiquid } from '../../src/report/volumeFlows';
import { chemical } from '../laws/thermoCases';
import { solvedExample } from './solved';

const solvedStreams = (input: ReportInput): [string, SolvedStream][] =>
  input.sketch.streams.flatMap((s): [string, SolvedStream][] => {
    const result = input.streams.get(s.id);
    return result?.state === 'solved' ? [[s.number, result]] : [];
  });

/** Volume [m3/s] from the bank's density correlations of the pure liquids at 15 degC, without the model. */
const byHand = (input: ReportInput, { n_mol_s, z }: SolvedStream): number =>
  input.basis.chemicals.reduce((sum, c, i) => {
    if (z[i]! * c.MW_g_mol < 1e-9) return sum;
    const density = preparePure(chemical(c.id)).rhoL!(288.15);
    return sum + n_mol_s * z[i]! * density ** -1;
  }, 0);

describe.each([
  ['aromatic-condensate.sketch.json', '20', 'Methane in 1 to 5, 10 to 13; Nitrogen, Oxygen, Argon in 6 to 9'],
  ['light-hydrocarbons.sketch.json', '10', 'Methane in 1 to 3'],
])('the standard liquid flow of %s', (file, product, reason) => {
  let input: ReportInput;
  beforeAll(async () => {
    input = await solvedExample(file);
  }, 60_000);

  test('is there for the liquid products, as the densities of the pure liquids give it', () => {
    const filled = solvedStreams(input).filter(([, s]) => s.standardLiquid_m3_s !== undefined);
    expect(filled.map(([number]) => number)).toContain(product);
    for (const [number, stream] of filled)
      expect([number, stream.standardLiquid_m3_s! / byHand(input, stream)]).toEqual([
        number,
        expect.closeTo(1, 3),
      ]);
  });

  test('is blank only where the foot note names the chemical and the stream', () => {
    const { streams } = buildReport(input);
    const row = streams.rows.find(({ key }) => key === 'standardLiquid')!;
    const note = streams.notes.find((text) => text.startsWith('Standard liquid'))!;
    const blank = streams.columns.filter((_, at) => row.cells[at]?.is !== 'number').map(({ head }) => head);
    const lacking = solvedStreams(input).filter(([, s]) => s.noStandardLiquid);
    expect(blank).toEqual(lacking.map(([number]) => number));
    expect(note).toContain(`No figure where more of it flows: ${reason}.`);
  });

  test('and its reason stand in the results file, one or the other', () => {
    const { streams } = resultsJson(input, 0) as unknown as {
      readonly streams: Readonly<
        Record<string, { readonly standardLiquid_m3_s?: number; readonly noStandardLiquid?: string[] }>
      >;
    };
    for (const { standardLiquid_m3_s, noStandardLiquid: lacking } of Object.values(streams))
      expect(standardLiquid_m3_s === undefined).toBe(lacking !== undefined);
    expect(streams['1']!.noStandardLiquid).toContain('methane');
  });

  test('needs no foot note about streams where its row is left out', () => {
    const without = {
      ...input,
      sketch: { ...input.sketch, documents: { ...input.sketch.documents, withoutRows: ['standardLiquid'] } },
    };
    expect(buildReport(without).streams.notes.join(' ')).not.toContain('Standard liquid');
  });
});

test('the reason names every chemical in a sentence', () => {
  const of = (...lacking: number[]) =>
    noStandardLiquid(
      { noStandardLiquid: lacking } as unknown as SolvedStream,
      (k) => ['methane', 'nitrogen', 'argon'][k]!,
    );
  expect(of(0)).toBe('methane has no liquid density at 15 °C');
  expect(of(0, 1, 2)).toBe('methane, nitrogen and argon have no liquid density at 15 °C');
  expect(of()).toBeUndefined();
});

describe('Cp/Cv', () => {
  test('is a row of vapours alone, and a note says why liquids have none', async () => {
    const { streams } = buildReport(await solvedExample('let-down.sketch.json'));
    const rows = streams.rows.map(({ key }) => key);
    expect(rows.filter((key) => key.endsWith('.cpcv'))).toEqual(['vapour.cpcv']);
    expect(streams.notes.join(' ')).toContain('No Cp/Cv of liquids');
  });
});
