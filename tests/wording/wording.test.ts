import { describe, expect, test } from 'vitest';
import { NETWORK_FINDINGS } from '../../src/engine/network/findings';
import type { Finding } from '../../src/engine/outcome';
import { CATALOGUE } from '../../src/engine/units/catalogue';
import { RULES } from '../../src/engine/units/rules';
import { STREAM_FINDINGS } from '../../src/engine/units/streamLimits';
import { kindWord, portWord, resultWord, sayFinding, settingWord } from '../../src/wording';
import { SENTENCES } from '../../src/wording/codes';

const ofKinds = Object.values(CATALOGUE).flatMap((kind) => kind.findings);
const CODES = [...ofKinds, ...STREAM_FINDINGS, ...NETWORK_FINDINGS];

describe('every code', () => {
  test.each([...new Set(CODES)])('%s has a title and a sentence', (code) => {
    expect(SENTENCES[code]?.title).toBeTruthy();
    expect(SENTENCES[code]?.says).toMatch(/[.]$/);
  });

  test('that carries a threshold is one that a kind, a stream or the model may emit', () => {
    const known = new Set<string>(CODES);
    expect(RULES.filter((r) => !known.has(r.code))).toEqual([]);
    expect(new Set(RULES.map((r) => r.code)).size).toBe(RULES.length);
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
    for (const word of words) expect(word).toMatch(/^[a-zA-Z][a-zA-Z0-9 °()-]*$/);
  });

  test('that is called by its service goes by that', () => {
    expect(kindWord('compressor', 'fan')).toBe('fan');
    expect(kindWord('compressor')).toBe('compressor');
    expect(kindWord('valve', 'fan')).toBe('valve');
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
      code: 'network/nothing-enters',
      weight: 'beyond-limit',
      at: {},
      evidence: ['a', 'b', 'c'].map((text) => ({ name: 'unit', value: 0, dim: 'number', text })),
    };
    const said = sayFinding(loop, { measures: 'SI', tag: (unit) => unit.toUpperCase() });
    expect(said.sentence).toContain('the loop of A, B, C,');
  });

  test('by the sentences of the document and of a flash where those are theirs', () => {
    const needs = {
      code: 'sketch/needs-value',
      weight: 'caution',
      at: { unit: 'u' as never, path: 'p.P' },
      evidence: [],
    } as const;
    const said = sayFinding(needs, { measures: 'SI', kind: () => 'valve' });
    expect(said.sentence).toMatch(/outlet pressure/i);
    const stuck = {
      code: 'equilibrium/no-such-state',
      weight: 'beyond-limit',
      at: {},
      evidence: [],
    } as const;
    expect(sayFinding(stuck, { measures: 'SI' }).title).toBe('No such state');
  });

  test('without an open slot left, whatever the evidence', () => {
    for (const code of new Set(CODES)) {
      const bare = { code: code as Finding['code'], weight: 'note', at: {}, evidence: [] } as const;
      const { title, sentence, next = '' } = sayFinding(bare, { measures: 'metric' });
      expect(`${title} ${sentence} ${next}`).not.toMatch(/[{}]|undefined|NaN/);
    }
  });
});
