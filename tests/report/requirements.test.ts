import { beforeAll, describe, expect, test } from 'vitest';
import { dutiesOf, utilityText } from '../../src/report/duties';
import type { ReportInput } from '../../src/report/input';
import { solvedStream } from '../../src/report/input';
import { judged } from '../../src/report/requirements';
import type { Requirement, UtilityLevel } from '../../src/sketch/documentTypes';
import { solvedExample } from './solved';

let input: ReportInput;
beforeAll(async () => {
  input = await solvedExample('aromatic-condensate.sketch.json');
});

const streamOf = (number: string) => input.sketch.streams.find((s) => s.number === number)!;
const result = (number: string) => solvedStream(input.streams.get(streamOf(number).id))!;
const require = (number: string, of: Omit<Requirement, 'stream'>) =>
  judged(input, { stream: streamOf(number).id, ...of });
const chemical = (id: string) => id as Requirement['chemical'] & string;

describe('a product requirement', () => {
  test('is met or missed by the unrounded result', () => {
    const { z, T_K } = result('17');
    const at = input.basis.chemicals.findIndex((c) => c.id === 'benzene');
    const x = z[at]!;
    const of = { of: 'fraction', chemical: chemical('benzene') } as const;
    expect(require('17', { ...of, min: `${100 * x - 0.001} %` })).toEqual({ is: 'met', value: x, by: 0 });
    const missed = require('17', { ...of, min: `${100 * x + 0.001} %` });
    expect(missed).toMatchObject({ is: 'missed', by: expect.closeTo(1e-5, 12) });
    expect(require('17', { of: 'temperature', max: `${T_K - 1} K` })).toMatchObject({
      is: 'missed',
      by: expect.closeTo(1, 9),
    });
    expect(require('17', { of: 'temperature', min: `${T_K - 1} K`, max: `${T_K + 1} K` }).is).toBe('met');
  });

  test('at exactly what was set is met: the solver’s own slack does not count', () => {
    expect(require('1', { of: 'molarFlow', min: '185 kmol/h', max: '185 kmol/h' }).is).toBe('met');
  });

  test('by mass and as recovery follow their definitions', () => {
    const { z, MW_g_mol, n_mol_s } = result('17');
    const at = input.basis.chemicals.findIndex((c) => c.id === 'benzene');
    const benzene = input.basis.chemicals[at]!;
    const mass = require('17', { of: 'fraction', basis: 'mass', chemical: chemical('benzene'), min: '1 %' });
    expect(mass).toMatchObject({ value: expect.closeTo((z[at]! * benzene.MW_g_mol) / MW_g_mol, 12) });
    // All benzene comes with stream 1; the air has none.
    const fed = result('1').n_mol_s * result('1').z[at]!;
    expect(require('17', { of: 'recovery', chemical: chemical('benzene'), min: '1 %' })).toMatchObject({
      value: expect.closeTo((n_mol_s * z[at]!) / fed, 12),
    });
  });

  test('on a fraction is not judged where nothing flows, nor a recovery while a feed is not solved', () => {
    const { id } = streamOf('17');
    const nothing = {
      ...result('17'),
      n_mol_s: 0,
      m_kg_s: 0,
      MW_g_mol: 0,
      z: new Float64Array(input.basis.chemicals.length),
      phases: [],
    };
    const empty = { ...input, streams: new Map([...input.streams, [id, nothing]]) };
    const benzene = chemical('benzene');
    for (const basis of ['mole', 'mass'] as const)
      expect(
        judged(empty, { stream: id, of: 'fraction', basis, chemical: benzene, max: '1 %' }),
      ).toMatchObject({ is: 'open', why: 'nothing flows in the stream' });
    expect(judged(empty, { stream: id, of: 'massFlow', min: '1 kg/h' }).is).toBe('missed');

    const rest = new Map([...input.streams].filter(([stream]) => stream !== streamOf('1').id));
    const recovery = { stream: id, of: 'recovery', chemical: benzene, min: '1 %' } as const;
    expect(judged({ ...input, streams: rest }, recovery)).toMatchObject({ why: 'a feed is not solved' });
  });

  test('says why it cannot be judged', () => {
    const gone = judged(input, { stream: 'nowhere' as Requirement['stream'], of: 'pressure', min: '1 bar' });
    expect(gone).toMatchObject({ is: 'open', why: expect.stringContaining('not in the sketch') });
    expect(require('17', { of: 'pressure' })).toMatchObject({ why: 'no limit is given' });
    expect(require('17', { of: 'pressure', min: '3 K' })).toMatchObject({ why: 'the limit cannot be read' });
    expect(require('17', { of: 'fraction', chemical: chemical('neon'), min: '1 %' })).toMatchObject({
      why: 'the component is not in the sketch',
    });
    const open = { ...input, streams: new Map() };
    expect(judged(open, { stream: streamOf('17').id, of: 'pressure', min: '1 bar' })).toMatchObject({
      why: 'the stream is not solved',
    });
  });
});

describe('the utility level of a duty', () => {
  const level = (name: string, use: UtilityLevel['use'], supply: string, back?: string): UtilityLevel => ({
    name,
    use,
    supply,
    ...(back ? { back } : {}),
  });
  const named = (
    tag: string,
    part: string,
    utilities: readonly UtilityLevel[],
    approach?: string,
  ): string => {
    const unit = input.sketch.units.find((u) => u.tag === tag)!;
    const duty = dutiesOf(input, unit).find((d) => d.part === part)!;
    const designBasis = { utilities, ...(approach ? { approach } : {}) };
    return utilityText({ ...input, sketch: { ...input.sketch, designBasis } }, duty);
  };

  test('is the mildest that keeps the approach', () => {
    // The reboiler of C-101 boils at 138.7 °C: 150 °C keeps 10 K, 145 °C does not.
    const levels = [
      level('hot', 'heating', '250 degC'),
      level('low', 'heating', '150 degC'),
      level('lower', 'heating', '145 degC'),
    ];
    expect(named('C-101', 'reboiler', levels)).toBe('low');
    expect(named('C-101', 'reboiler', levels, '20 K')).toBe('hot');
    expect(named('C-101', 'reboiler', levels, '5 K')).toBe('lower');
  });

  test('must serve at both ends', () => {
    // E-101 cools from 121 to 38 °C: water may leave at up to 111 °C.
    expect(named('E-101', '', [level('water', 'cooling', '25 degC', '45 degC')])).toBe('water');
    expect(named('E-101', '', [level('water', 'cooling', '25 degC', '115 degC')])).toContain(
      'none of the levels',
    );
  });

  test('is said as a need where none is given or none serves', () => {
    expect(named('E-101', '', [])).toBe('level not given: at most 28.0 °C');
    expect(named('E-101', '', [level('air', 'cooling', '35 degC')])).toBe(
      'none of the levels given: at most 28.0 °C',
    );
    expect(named('C-101', 'condenser', [level('steam', 'heating', '180 degC')])).toMatch(
      /^level not given: at most/,
    );
  });
});

test('duties add up to the heat of their units', () => {
  for (const unit of input.sketch.units) {
    const heat = input.units.get(unit.id)?.heat_W ?? 0;
    const sum = dutiesOf(input, unit).reduce((so, duty) => so + duty.heat_W, 0);
    expect(sum).toBeCloseTo(heat, 3);
  }
});
