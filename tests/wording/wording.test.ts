import { describe, expect, test } from 'vitest';
import { EQUILIBRIUM_FINDINGS } from '../../src/engine/equilibrium/findings';
import { NETWORK_FINDINGS } from '../../src/engine/network/findings';
import { PAIR_RULES } from '../../src/engine/network/pairLimits';
import type { Finding } from '../../src/engine/outcome';
import { CATALOGUE } from '../../src/engine/units/catalogue';
import { RULES } from '../../src/engine/units/rules';
import { STREAM_FINDINGS } from '../../src/engine/units/streamLimits';
import { EDIT_REFUSALS } from '../../src/sketch/edits';
import { FILE_PROBLEMS } from '../../src/sketch/file/problem';
import { SKETCH_FINDINGS } from '../../src/sketch/findings';
import { kindWord, portWord, resultWord, sayFileProblem, sayFinding, settingWord } from '../../src/wording';
import { SENTENCES } from '../../src/wording/codes';
import { EDIT_CODES } from '../../src/wording/edits';
import { FILE_CODES } from '../../src/wording/files';

const ofKinds = Object.values(CATALOGUE).flatMap((kind) => kind.findings);
const CODES = [
  ...ofKinds,
  ...STREAM_FINDINGS,
  ...NETWORK_FINDINGS,
  ...EQUILIBRIUM_FINDINGS,
  ...SKETCH_FINDINGS,
];

describe('every code', () => {
  test.each([...new Set(CODES)])('%s has a title and a sentence', (code) => {
    expect(SENTENCES[code]?.title).toBeTruthy();
    expect(SENTENCES[code]?.says).toMatch(/[.]$|\{why\}$/);
  });

  test('that carries a threshold is one that a kind, a stream or the model may emit', () => {
    const known = new Set<string>(CODES);
    expect([...RULES, ...PAIR_RULES].filter((r) => !known.has(r.code))).toEqual([]);
    expect(new Set(RULES.map((r) => r.code)).size).toBe(RULES.length);
  });

  test('of an edit that is refused has a line', () => {
    expect(EDIT_REFUSALS.filter((code) => !EDIT_CODES.includes(code))).toEqual([]);
  });

  test('of a file that is not opened has a line', () => {
    expect(FILE_PROBLEMS.filter((code) => !FILE_CODES.includes(code))).toEqual([]);
  });
});

describe('every kind', () => {
  test.each(Object.keys(CATALOGUE))('%s has a name, and words for ports, settings and results', (kind) => {
    const { ports, settings, results } = CATALOGUE[kind]!;
    expect(kindWord(kind)).toBeTruthy();
    const words = [
      ...ports.map((p) => portWord(kind, p.numbered ? `${p.name}2` : p.name)),
      ...Object.keys(settings).map((key) => settingWord(kind, key)),
      ...Object.keys(results).map((key) => resultWord(kind, key)),
    ];
    for (const word of words) expect(word).toMatch(/^[a-zA-Z][a-zA-Z0-9 ()]*$/);
  });

  test('that nobody wrote words for is shown by its own', () => {
    expect(kindWord('steamTrap')).toBe('steam trap');
    expect(portWord('steamTrap', 'in3')).toBe('inlet 3');
    expect(settingWord('steamTrap', 'h.dryness')).toBe('dryness');
    expect(resultWord('steamTrap', 'lostHeat_W')).toBe('lost heat');
    const unheard = { code: 'steamTrap/sticks-open', weight: 'note', at: {}, evidence: [] } as const;
    expect(sayFinding(unheard, { measures: 'SI' })).toEqual({
      title: 'Sticks open',
      sentence: 'Sticks open.',
      where: '',
    });
  });
});

describe('a finding is said', () => {
  const cools: Finding = {
    code: 'valve/cools',
    weight: 'note',
    at: { unit: 'u2' as never },
    evidence: [
      { name: 'cooling', value: 24.5, dim: 'temperatureDifference' },
      { name: 'temperature', value: 283.15, dim: 'temperature' },
      { name: 'limit', value: 20, dim: 'temperatureDifference' },
      { name: 'basis', value: 0, dim: 'number', text: 'balance' },
    ],
  };

  test('with its numbers in the measures asked for, its place, its basis and the next step', () => {
    const said = sayFinding(cools, { measures: 'metric', tag: () => 'PV-1', kind: () => 'valve' });
    expect(said.where).toBe('PV-1');
    expect(said.sentence).toBe('The stream cools by 24.50 K to 10.00 °C; from 20.00 K on this is said.');
    expect(said.basis).toBe('follows from the balance');
    expect(said.next).toMatch(/^Check the material/);
    expect(sayFinding(cools, { measures: 'US' }).sentence).toContain('50.00 °F');
  });

  test('with every unit of a loop by its tag', () => {
    const loop: Finding = {
      code: 'network/loop',
      weight: 'beyond-limit',
      at: {},
      evidence: ['a', 'b', 'c'].map((text) => ({ name: 'unit', value: 0, dim: 'number', text })),
    };
    const said = sayFinding(loop, { measures: 'SI', tag: (unit) => unit.toUpperCase() });
    expect(said.sentence).toContain('in a loop: A, B, C.');
  });

  test('as text that was not taken, with the reason', () => {
    const refused: Finding = {
      code: 'sketch/not-a-quantity',
      weight: 'caution',
      at: { unit: 'u' as never, path: 'p.P' },
      evidence: [
        ['typed', '7 bra'],
        ['why', 'quantity/unknown-unit'],
        ['found', 'bra'],
        ['fits', 'bar, kPa'],
        ['near', 'bar'],
      ].map(([name = '', text = '']) => ({ name, value: 0, dim: 'number', text })),
    };
    const said = sayFinding(refused, { measures: 'SI', kind: () => 'valve' });
    expect(said.sentence).toBe(
      'Outlet pressure: “7 bra” is not taken. “bra” is no unit known here. Perhaps bar?',
    );
    expect(said.next).toBe('It could be in: bar, kPa.');
  });

  test('without an open slot left, whatever the evidence', () => {
    for (const code of new Set(CODES)) {
      const bare = { code: code as Finding['code'], weight: 'note', at: {}, evidence: [] } as const;
      const { title, sentence, next = '' } = sayFinding(bare, { measures: 'metric' });
      expect(`${title} ${sentence} ${next}`).not.toMatch(/[{}]|undefined|NaN/);
    }
  });
});

test('a file that is not opened names the place and the reason', () => {
  const seen = [
    { name: 'line', value: 3, dim: 'number' },
    { name: 'column', value: 12, dim: 'number' },
  ] as const;
  expect(sayFileProblem({ path: '', code: 'file/not-json', evidence: seen })).toBe(
    'The file cannot be read as JSON from line 3, column 12 on.',
  );
  expect(sayFileProblem({ path: 'units.2.tag', code: 'file/missing', evidence: [] })).toMatch(
    /^units\.2\.tag: /,
  );
});
