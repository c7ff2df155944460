/**
 * Makes the bank from tables of constants and correlations: `tsx src/data/convert.ts TABLES_DIR`.
 *
 * Reads constants.csv, correlations.csv, elements.json, mix-ppr78-assignments.csv, mix-ppr78-interactions.csv and
 * mix-kij-pr.csv; writes src/data/bank/*.json. Same tables, same bytes. A chemical whose data do not agree
 * (checks.ts) is left out, a row that cannot be used is dropped; both are recorded in bank/left-out.json.
 */
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { molarMass_g_mol } from '../engine/chemicals/elements';
import type { ChemicalData, Corr, CorrForm, CorrProperty } from '../engine/chemicals/types';
import { chemicalFaults, rowFaults } from './checks';
import { citationOf } from './citations';
import { type Row, readCsv } from './csv';
import { chunkOf, type IndexEntry } from './families';
import { liquidVolumeConstant } from './volumeConstant';

const CONSTANTS = [
  ['Tb_K', 'Tb_K'],
  ['Tm_K', 'Tm_K'],
  ['Tc_K', 'Tc_K'],
  ['Pc_Pa', 'Pc_Pa'],
  ['Vc_m3_mol', 'Vc_m3_per_mol'],
  ['omega', 'omega'],
  ['Hf_J_mol', 'Hf_ig_298_J_per_mol'],
  ['S0_J_molK', 'S_ig_298_J_per_molK'],
  ['flashPoint_K', 'flash_point_K'],
  ['autoignition_K', 'autoignition_K'],
  ['LFL', 'LFL'],
  ['UFL', 'UFL'],
] as const;

interface LeftOut {
  readonly id: string;
  readonly what: string;
  readonly reasons: readonly string[];
}

const from = process.argv[2];
if (from === undefined) throw new Error('say where the tables are: tsx src/data/convert.ts TABLES_DIR');
const into = join(import.meta.dirname, 'bank');
const table = (name: string): Row[] => readCsv(readFileSync(join(from, name), 'utf8'));
const leftOut: LeftOut[] = [];
const tags = new Set<string>();

const number = (text: string | undefined): number | undefined => {
  if (text === undefined || text === '') return undefined;
  const value = Number(text);
  if (!Number.isFinite(value)) throw new Error(`not a number: "${text}"`);
  return value;
};

function corrOf(row: Row): Corr {
  const last = [7, 6, 5, 4, 3, 2, 1].find((k) => number(row[`c${k}`]) !== undefined) ?? 0;
  const c = Array.from({ length: last }, (_, k) => number(row[`c${k + 1}`]) ?? 0);
  const source = row.source ?? '';
  const shared = { Tmin: number(row.Tmin_K)!, Tmax: number(row.Tmax_K)!, source };
  if (source === 'monatomic') return { form: 'monatomic', ...shared, c: [] };
  return { form: row.equation as CorrForm, ...shared, c, ...(row.note ? { note: row.note } : {}) };
}

function correlations(): Map<string, Partial<Record<CorrProperty, Corr[]>>> {
  const out = new Map<string, Partial<Record<CorrProperty, Corr[]>>>();
  for (const row of table('correlations.csv')) {
    const id = row.id!;
    const of = row.property as CorrProperty;
    const corr = corrOf(row);
    const reasons = rowFaults(of, corr);
    if (reasons.length > 0) {
      leftOut.push({ id, what: `${of} (${corr.source})`, reasons });
      continue;
    }
    const mine = out.get(id) ?? {};
    const rows = mine[of] ?? [];
    rows.push(corr);
    rows.sort((a, b) => (a.Tmin ?? 0) - (b.Tmin ?? 0));
    mine[of] = rows;
    out.set(id, mine);
  }
  return out;
}

function groupsByCas(): Map<string, Record<string, number>> {
  const out = new Map<string, Record<string, number>>();
  for (const row of table('mix-ppr78-assignments.csv')) {
    const mine = out.get(row.cas!) ?? {};
    mine[row.group!] = number(row.count)!;
    out.set(row.cas!, mine);
  }
  return out;
}

function chemicals(): ChemicalData[] {
  const corr = correlations();
  const groups = groupsByCas();
  const elements = JSON.parse(readFileSync(join(from!, 'elements.json'), 'utf8')) as Record<
    string,
    Record<string, number>
  >;
  const out: ChemicalData[] = [];
  for (const row of table('constants.csv')) {
    const id = row.id!;
    const values: Record<string, number> = {};
    const sources: Record<string, string> = {};
    for (const [field, column] of CONSTANTS) {
      const value = number(row[column]);
      if (value === undefined) continue;
      values[field] = value;
      sources[field] = row[`src_${column}`]!;
    }
    const ppr78 = groups.get(row.cas!);
    const bare = {
      id,
      name: row.name!,
      formula: row.formula!,
      cas: row.cas!,
      family: row.family!,
      // To all digits: a balance over a reaction closes in mass only if molar masses are sums of the same atoms.
      MW_g_mol: molarMass(elements[id], number(row.MW_g_per_mol)!, id),
      ...values,
      elements: elements[id] ?? {},
      ...(ppr78 ? { ppr78 } : {}),
      sources,
      corr: corr.get(id) ?? {},
    } satisfies ChemicalData;
    const reasons = chemicalFaults(bare);
    if (reasons.length > 0) {
      leftOut.push({ id, what: 'chemical', reasons });
      continue;
    }
    out.push({ ...bare, ...liquidVolumeConstant(bare) });
  }
  for (const c of out) {
    for (const tag of Object.values(c.sources)) tags.add(tag);
    for (const rows of Object.values(c.corr)) for (const r of rows) tags.add(r.source ?? '');
  }
  return out;
}

function molarMass(counts: Record<string, number> | undefined, listed: number, id: string): number {
  const summed = counts && molarMass_g_mol(counts);
  if (summed === undefined) return listed;
  if (Math.abs(summed - listed) > 2e-4 * listed)
    throw new Error(`${id}: molar mass ${listed} is not that of its atoms, ${summed}`);
  return summed;
}

/** One record a line: differences between two versions of the bank can be read. */
const lines = (items: readonly unknown[]): string =>
  `[\n${items.map((item) => JSON.stringify(item)).join(',\n')}\n]\n`;
const write = (name: string, text: string): void => writeFileSync(join(into, name), text);

const bank = chemicals();
console.log(`${bank.length} chemicals; left out:`);
for (const l of leftOut) console.log(`  ${l.id}: ${l.what}: ${l.reasons.join('; ')}`);
write(
  'index.json',
  lines(
    bank.map(
      ({ id, name, formula, cas, family, MW_g_mol }): IndexEntry => ({
        id,
        name,
        formula: formula!,
        cas: cas!,
        family: family!,
        MW_g_mol,
      }),
    ),
  ),
);
for (const chunk of new Set(bank.map((c) => chunkOf(c.family!)))) {
  write(`chemicals-${chunk}.json`, lines(bank.filter((c) => chunkOf(c.family!) === chunk)));
}

const inBank = new Map(bank.map((c) => [c.cas, c.id]));
write(
  'pairs-pr.json',
  lines(
    table('mix-kij-pr.csv').flatMap((row) => {
      const ids = [row.cas1!, row.cas2!].map((cas) => inBank.get(cas));
      if (ids.includes(undefined))
        throw new Error(`pair of chemicals that are not in the bank: ${row.cas1} ${row.cas2}`);
      const doubt =
        ids.includes('methane') && ids.includes('isopentane')
          ? 'negative in the source although its neighbours are positive; the predicted value is used'
          : undefined;
      return {
        ids,
        cas: [row.cas1, row.cas2],
        kij: number(row.kij),
        status: row.status,
        use: doubt === undefined,
        ...(doubt ? { note: doubt } : {}),
        source: 'Knapp1982',
      };
    }),
  ),
);
const interactions = table('mix-ppr78-interactions.csv').map((row) => ({
  a: row.group1,
  b: row.group2,
  A_MPa: number(row.A_MPa),
  B_MPa: number(row.B_MPa),
  status: row.status,
  ...(row.note ? { note: row.note } : {}),
}));
const groups = table('mix-ppr78-groups.csv').map((row) => ({
  group: row.group,
  label: row.label,
  atoms: row.atoms,
  ...(row.note ? { note: row.note } : {}),
  paper: row.paper_that_introduced_it,
}));
write(
  'ppr78.json',
  `{\n"groups": ${lines(groups).trimEnd()},\n"interactions": ${lines(interactions).trimEnd()}\n}\n`,
);

tags.add('Knapp1982');
const citations = Object.fromEntries(
  [...tags].sort().map((tag) => {
    const text = citationOf(tag);
    if (text === undefined) throw new Error(`no citation for the tag "${tag}"`);
    return [tag, text];
  }),
);
write('sources.json', `${JSON.stringify(citations, null, 1)}\n`);
write('left-out.json', lines(leftOut));
