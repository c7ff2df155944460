import { describe, expect, test } from 'vitest';
import { endWords, fixedByText, fixingText, stagesText } from '../../src/wording';

const names = {
  number: (id: string) => ({ s1: '1' })[id],
  chemical: (id: string) => ({ b: 'Benzene' })[id],
};

describe('what fixes a column, in words', () => {
  test.each([
    [{ fix: 'refluxRatio', value: 2.4 }, 'reflux ratio 2.4'],
    [{ fix: 'boilup', value: '3' }, 'boil-up ratio 3'],
    [
      {
        fix: 'flow',
        product: 'vapourDistillate',
        value: { share: '14 %', of: { stream: 's1' }, basis: 'mole' },
      },
      'vapour distillate 14 % of stream 1, mol',
    ],
    [
      {
        fix: 'flow',
        product: 'bottoms',
        value: { share: '9 %', of: 'feed', basis: 'mass', chemical: 'b' },
      },
      'bottoms 9 % of Benzene in all feeds, mass',
    ],
    [{ fix: 'reflux', value: '30 m3' }, 'reflux 30 m3'],
    [
      { fix: 'purity', product: 'bottoms', chemical: 'b', value: '0.9 %', basis: 'mass' },
      'Benzene in bottoms 0.9 %, mass',
    ],
    [
      { fix: 'recovery', product: 'liquidDistillate', chemical: 'b', value: '98.8 %' },
      'recovery of Benzene in liquid distillate 98.8 %',
    ],
    [{ fix: 'temperature', stage: 12, value: '95 degC' }, '95 °C at stage 12'],
    [{ fix: 'temperature', stage: 'condenser', value: '313 K' }, '313 K at the condenser'],
    [{ fix: 'duty', at: 'condenser', value: '-550 kW' }, 'condenser duty 550 kW removed'],
    [{ fix: 'duty', at: 'reboiler', value: '1.2 MW' }, 'reboiler duty 1.2 MW added'],
  ])('%j', (item, text) => {
    expect(fixingText(item, names)).toBe(text);
  });

  test('leaves a gap where something is missing, and never says undefined', () => {
    for (const fix of ['refluxRatio', 'flow', 'purity', 'recovery', 'temperature', 'duty', 'unheard'])
      expect(fixingText({ fix }, names)).not.toMatch(/undefined|null|NaN/);
    expect(fixingText({ fix: 'purity', value: '2 %' }, names)).toBe('… in … 2 %, mol');
    expect(fixedByText({}, names)).toBe('');
  });

  test('counts stages between the ends and names the ends', () => {
    const of = (distillate: string, reboiler: boolean, stages = 26): string =>
      stagesText({ stages, top: { distillate }, bottom: { reboiler } });
    expect(of('vapour', true)).toBe('26 stages + partial condenser + reboiler');
    expect(of('liquid', false)).toBe('26 stages + total condenser');
    expect(of('none', false, 1)).toBe('1 stage');
    expect(endWords({})).toEqual([]);
  });
});
