import { describe, expect, test } from 'vitest';
import { EQUILIBRIUM_FINDINGS } from '../../src/engine/equilibrium/findings';
import * as whole from '../../src/engine/equilibrium/whole';
import type { Evidence, Finding, Place } from '../../src/engine/outcome';
import { type Dimension, parseQuantity, type QuantityCode } from '../../src/quantity';
import { connect, EDIT_REFUSALS, type Edit, setByPath, setChemicals } from '../../src/sketch/edits';
import { FILE_PROBLEMS } from '../../src/sketch/file/problem';
import { SKETCH_FINDINGS } from '../../src/sketch/findings';
import { openSketch } from '../../src/sketch/read';
import { EDIT_WORDS, sayEditRefusal } from '../../src/wording/general/edits';
import { EQUILIBRIUM_WORDS, LEAST_T_K, MOST_T_K } from '../../src/wording/general/equilibrium';
import { FILE_WORDS, placeInFile, sayFileProblem } from '../../src/wording/general/files';
import { QUANTITY_WORDS, sayQuantityRefusal } from '../../src/wording/general/quantity';
import { SKETCH_WORDS } from '../../src/wording/general/sketch';
import { makeSlots, type Names, percentText, quoted, type Words } from '../../src/wording/general/slots';
import { compiled, feedSketch, letDown, loose, u } from '../sketch/help';

const QUANTITY_CODES: Readonly<Record<QuantityCode, true>> = {
  'quantity/empty': true,
  'quantity/not-a-number': true,
  'quantity/decimal-comma': true,
  'quantity/digit-grouping': true,
  'quantity/out-of-range': true,
  'quantity/no-unit': true,
  'quantity/unknown-unit': true,
  'quantity/unit-syntax': true,
  'quantity/second-slash': true,
  'quantity/unbracketed': true,
  'quantity/reference-in-compound': true,
  'quantity/wrong-dimension': true,
  'quantity/volume-flow': true,
  'quantity/drop-has-no-reference': true,
  'quantity/below-absolute-zero': true,
  'quantity/below-vacuum': true,
};

const number = (name: string, value: number, dim: Dimension = 'number'): Evidence => ({ name, value, dim });
const word = (name: string, text: string): Evidence => ({ name, value: 0, dim: 'number', text });

/** Nothing to say it with; everything as words; everything as numbers, some of which cannot be shown. */
const NAMES =
  'given wanted known beside port stream number tag kind what typed why found fits near chemical lacks code label pair place path from to unit note line column'.split(
    ' ',
  );
const EVIDENCE: readonly (readonly Evidence[])[] = [
  [],
  NAMES.map((name) => word(name, name === 'why' ? 'quantity/no-unit' : 'P, drop')),
  NAMES.map((name) => word(name, '')),
  [...NAMES, 'sum', 'part', 'value', 'minimum', 'maximum', 'count', 'temperature', 'vapourFraction'].map(
    (name) => number(name, Number.NaN, 'temperature'),
  ),
  [...NAMES, 'sum', 'part', 'value', 'minimum', 'maximum', 'count', 'above', 'largest'].map((name) =>
    number(name, 2),
  ),
];
const PLACES: readonly Place[] = [{}, { path: '' }, { path: 'p.drop', port: 'in1' }, { path: 'composition' }];

function sound(text: string): void {
  expect(text).toMatch(/^\S.*\.$/);
  expect(text).not.toMatch(/undefined|null|NaN|Infinity|\[object|\.\.|\s\s|\{|\}/);
  expect(text).not.toMatch(/\b(file|edit|sketch|quantity|equilibrium)\/[a-z]/);
  expect(text.charAt(0)).toBe(text.charAt(0).toUpperCase());
}

function soundWords(words: Words | undefined): void {
  expect(words).toBeDefined();
  if (!words) return;
  expect(words.title).toMatch(/^[A-Z0-9][^.]*$/);
  for (const evidence of EVIDENCE)
    for (const at of PLACES) {
      const slots = makeSlots(evidence, at, 'metric');
      sound(words.sentence(slots));
      expect(words.next).toBeDefined();
      if (words.next) sound(words.next(slots));
    }
}

const distinct = (texts: readonly string[]): void => expect(new Set(texts).size).toBe(texts.length);

describe('every code has a sentence of its own', () => {
  test.each(SKETCH_FINDINGS)('%s', (code) => soundWords(SKETCH_WORDS[code]));
  test.each(EQUILIBRIUM_FINDINGS)('%s', (code) => soundWords(EQUILIBRIUM_WORDS[code]));
  test.each(FILE_PROBLEMS)('%s', (code) => {
    expect(Object.keys(FILE_WORDS)).toContain(code);
    for (const evidence of EVIDENCE)
      for (const path of ['', 'units.2.tag', 'chemicals.11.own.Cp.0.c'])
        sound(sayFileProblem({ path, code, evidence }).replace(` (${path})`, ''));
  });
  test.each(EDIT_REFUSALS)('%s', (code) => {
    expect(Object.keys(EDIT_WORDS)).toContain(code);
    for (const evidence of EVIDENCE) sound(sayEditRefusal({ code, evidence }));
  });
  test.each(Object.keys(QUANTITY_CODES))('%s', (code) => {
    expect(Object.keys(QUANTITY_WORDS)).toContain(code);
    for (const found of ['', 'bar(g)'])
      for (const fits of [[], ['bar', 'kPa']])
        for (const near of [{}, { near: 'bar' }]) {
          const said = sayQuantityRefusal({ code, found, fits, ...near });
          sound(said.sentence);
          sound(said.fits);
        }
  });

  test('that no other code of its list shares', () => {
    const none = makeSlots([], {}, 'SI');
    const [files, edits] = [FILE_WORDS, EDIT_WORDS].map((words) => Object.values(words).map((w) => w(none)));
    distinct(files ?? []);
    distinct(edits ?? []);
    distinct(Object.values(QUANTITY_WORDS).map((w) => w({ found: 'x', fits: [] })));
    distinct(Object.values(SKETCH_WORDS).map((w) => w.sentence(none)));
    distinct(Object.values(EQUILIBRIUM_WORDS).map((w) => w.sentence(none)));
  });

  test('and no sentence stands for a code that is gone', () => {
    const gone = (words: object, codes: readonly string[]) =>
      Object.keys(words).filter((code) => !codes.includes(code));
    expect(gone(SKETCH_WORDS, SKETCH_FINDINGS)).toEqual([]);
    expect(gone(EQUILIBRIUM_WORDS, EQUILIBRIUM_FINDINGS)).toEqual([]);
    expect(gone(FILE_WORDS, FILE_PROBLEMS)).toEqual([]);
    expect(gone(EDIT_WORDS, EDIT_REFUSALS)).toEqual([]);
    expect(gone(QUANTITY_WORDS, Object.keys(QUANTITY_CODES))).toEqual([]);
  });
});

describe('a code that nobody wrote a sentence for is shown by its own words', () => {
  test('of a file, an edit and a quantity', () => {
    const odd = { path: '', evidence: [] };
    expect(sayFileProblem({ ...odd, code: 'file/torn-page' })).toBe('Torn page.');
    expect(sayEditRefusal({ ...odd, code: 'edit/torn-page' })).toBe('That cannot be done here: torn page.');
    expect(sayQuantityRefusal({ code: 'quantity/torn-page', found: '', fits: [] }).sentence).toBe(
      'Torn page.',
    );
    for (const code of ['', 'constructor', 'file/']) sound(sayFileProblem({ ...odd, code }));
  });
});

describe('a file that is not opened', () => {
  const said = (source: unknown): readonly string[] => {
    const opened = openSketch(source);
    return opened.ok ? [] : opened.problems.map(sayFileProblem);
  };

  test('tells line and column of what cannot be read', () => {
    expect(said('{\n  "format": "splitwright.sketch",,\n}')).toEqual([
      'Line 2, column 34: the text cannot be read from “,” on; look for a missing comma, bracket or quotation mark just before it.',
    ]);
    expect(said('{ "format": ')).toEqual([
      'Line 1, column 13: the text breaks off here; the file may be cut short, so fetch or save it again.',
    ]);
    expect(said('{"tag": 1,\n"tag": 2}')).toEqual([
      'Line 2, column 1: the name “tag” stands twice in one group; delete one of the two.',
    ]);
    expect(said('  ')).toEqual(['The file is empty; choose another.']);
  });

  test('tells the place in words and as it is written', () => {
    expect(placeInFile('units.2.tag')).toBe('Units, third entry, tag (units.2.tag)');
    expect(placeInFile('chemicals.21.own.Cp.0.c')).toBe(
      'Chemicals, 22nd entry, own data, ideal-gas heat capacity, first entry, coefficients (chemicals.21.own.Cp.0.c)',
    );
    const twice = loose();
    for (const unit of twice.units) unit.tag = 'V-1';
    expect(said(twice)[0]).toBe(
      'Units, second entry, tag (units.1.tag): the tag “V-1” is used twice; give every unit its own.',
    );
    const turned = loose();
    turned.units[0]!.turn = 45;
    delete turned.units[1]!.tag;
    expect(said(turned)).toEqual([
      'Units, first entry, turn on the sheet (units.0.turn): “45” is not known here; choose “0”, “90”, “180” or “270”.',
      'Units, second entry, tag (units.1.tag): this is missing and a sketch needs it; add it.',
    ]);
  });

  test('says so when it is no sketch, or one of a later version', () => {
    expect(said({ format: 'other' })).toEqual([
      'This is not a sketch of Splitwright (it says “other”); choose a file that was saved here.',
    ]);
    expect(said({ ...loose(), version: 7 })).toEqual([
      'The sketch was saved by a later version of Splitwright (its form is 7, and this version reads up to 1); open it with that version.',
    ]);
  });
});

describe('an edit that is refused', () => {
  const said = (edit: Edit): string => (edit.ok ? '' : sayEditRefusal(edit));

  test('names tags, ports and places', () => {
    const sketch = letDown();
    const tag = (id: string) => sketch.units.find((unit) => unit.id === id)?.tag;
    expect(said(connect(sketch, [u('u1'), 'out'], [u('u2'), 'out']))).toBe(
      `Both ends are outlets (${tag('u1')} and ${tag('u2')}), and an outlet cannot receive; end the stream at an inlet.`,
    );
    expect(said(setChemicals(sketch, sketch.chemicals.slice(1)))).toBe(
      'The chemical is still in use at FEED-1 (fraction of methane); set it to zero there, or remove it together with these values.',
    );
    expect(said(setByPath(sketch, 'XX-9.p.P', '3 bar'))).toContain('“XX-9.p.P”');
  });
});

describe('a quantity that is refused', () => {
  const said = (text: string, dim: Dimension) => {
    const read = parseQuantity(text, dim);
    return read.ok ? undefined : sayQuantityRefusal(read);
  };

  test('says why a gauge unit cannot be a drop, and what to write', () => {
    expect(said('0.3 bar(g)', 'pressureDifference')).toEqual({
      sentence: '“bar(g)” cannot be used for a drop: a pressure difference is neither gauge nor absolute.',
      fits: 'Perhaps “bar” is meant. Units that fit: bar, mbar, kPa or psi.',
    });
  });

  test('names three ways to say a flow in place of a volume, in the user’s own kind of units', () => {
    expect(said('10 m3/h', 'molarFlow')?.fits).toBe(
      'Say it as an amount in kmol/h, as a mass in kg/h, or as a gas volume at its reference state in Nm3/h.',
    );
    expect(said('10 ft3/h', 'molarFlow')?.fits).toContain('lbmol/h, as a mass in lb/h');
  });

  test('repeats the number without comma or gaps', () => {
    expect(said('3,5 bar', 'pressure')?.fits).toBe('Write “3.5”.');
    expect(said('1,000 bar', 'pressure')?.fits).toBe('Write “1000” if that is meant.');
    expect(said('J', 'power')?.fits).toMatch(/^Type a number with its unit: kW/);
  });

  test('is quoted no longer than a line can bear', () => {
    expect(quoted('x'.repeat(500)).length).toBeLessThan(50);
  });
});

const ctx: Names = {
  kind: () => 'feed',
  tag: () => 'FEED-1',
  chemical: (id) => (id === 'n-butane' ? 'butane' : id),
};
function said(words: Readonly<Record<string, Words>>, f: Finding | undefined) {
  const w = f && words[f.code];
  if (!f || !w) throw new Error('no such finding');
  const slots = makeSlots(f.evidence, f.at, 'metric', ctx);
  return { sentence: w.sentence(slots), next: w.next?.(slots) };
}

describe('a gap of a sketch', () => {
  const first = async (settings: Parameters<typeof feedSketch>[0]) =>
    said(
      SKETCH_WORDS,
      (await compiled(feedSketch(settings))).gaps.find((g) => g.at.path !== undefined),
    );

  test('names what is missing and the ways to give it', async () => {
    expect(await first({ state: {} })).toEqual({
      sentence: 'Needs two values: temperature, pressure, vapour fraction, molar enthalpy or molar entropy.',
      next: 'Give two of them and leave the others empty.',
    });
    expect((await first({ state: { T: '40 degC' } })).sentence).toBe(
      'Needs one more value beside the temperature: pressure, vapour fraction, molar enthalpy or molar entropy.',
    );
    expect(await first({ flow: '' })).toEqual({
      sentence: 'Needs a value: flow.',
      next: 'Type the flow with its unit: kmol/h, kg/h or Nm3/h.',
    });
    expect((await first({ composition: {} })).next).toBe(
      'Choose fractions by chemical, flows by chemical or ready-made air.',
    );
  });

  test('says why a text is not the quantity asked for', async () => {
    expect(await first({ flow: '10 m3/h' })).toEqual({
      sentence:
        'The flow “10 m3/h” cannot be used. “m3/h” does not say how much flows: a volume holds more or less with temperature and pressure.',
      next: 'Say it as an amount in kmol/h, as a mass in kg/h, or as a gas volume at its reference state in Nm3/h.',
    });
  });

  test('shows numbers in the measures asked for', async () => {
    expect(await first({ state: { T: '40 degC', vapourFraction: 1.5 } })).toEqual({
      sentence: 'The vapour fraction is 1.500 and may not be above 1.000.',
      next: 'Give 1.000 or less.',
    });
  });

  test('tells fractions that do not add up, and never as 100 % when they miss it', async () => {
    const parts = { methane: '30 %', 'n-butane': '40 %', 'n-decane': '20 %' };
    expect((await first({ composition: { basis: 'mole', parts } })).sentence).toBe(
      'The fractions add up to 90.0 % and should make 100 %.',
    );
    expect(percentText(0.99995)).toBe('99.995 %');
    expect(percentText(1.00002)).toBe('100.002 %');
    expect(percentText(1)).toBe('100.0 %');
    expect(percentText(-0.0005)).toBe('−0.0500 %');
  });

  test('calls chemicals by their names', async () => {
    const parts = { methane: '30 %', 'n-butane': '-40 %', 'n-decane': '30 %' };
    expect((await first({ composition: { basis: 'mole', parts } })).sentence).toBe(
      'The fraction of butane is −40.0 %, and nothing can be present in less than none.',
    );
    const strange = { methane: '30 %', toluene: '70 %' };
    expect((await first({ composition: { basis: 'mole', parts: strange } })).sentence).toBe(
      '“toluene” is not among the chemicals.',
    );
  });
});

describe('a finding of the sketch', () => {
  const sentence = (code: string, at: Place, ...evidence: Evidence[]) =>
    said(SKETCH_WORDS, { code: code as Finding['code'], weight: 'caution', at, evidence }).sentence;

  test('calls ports, pairs and settings by words that fit the sentence', () => {
    expect(sentence('sketch/needs-inlet', { port: 'in2' }, word('port', 'in2'))).toBe(
      'No stream enters at inlet 2.',
    );
    expect(sentence('sketch/needs-inlet', { port: 'in' })).toBe('No stream enters at the inlet.');
    expect(sentence('sketch/pair-not-read', { path: 'model.pairs.0' })).toMatch(
      /^Pair 1 of the model cannot/,
    );
    expect(sentence('sketch/without-meaning', { path: 'flow' }, word('beside', 'composition.flows'))).toBe(
      'The flow has no meaning here: it is already settled by the flows by chemical.',
    );
    expect(sentence('sketch/unknown-port', { path: 'shares.bad' }, word('port', 'bad'))).toBe(
      '“bad” is no port of this unit that could stand here.',
    );
  });

  test('asks for the keys of a choice that are still open, and counts streams and entries', () => {
    const known = word('known', 'P, drop, ratio');
    expect(
      sentence('sketch/needs-one-of', { path: 'p' }, known, number('wanted', 1), word('given', '')),
    ).toBe('Needs a value: outlet pressure, pressure drop or ratio of outlet to inlet pressure.');
    const both = word('given', 'P, drop');
    expect(sentence('sketch/too-many', { path: 'p' }, known, number('wanted', 1), both)).toBe(
      'Outlet pressure and pressure drop are given, and only one of them can count.',
    );
    expect(sentence('sketch/too-many', {}, word('port', 'in'), number('wanted', 12))).toBe(
      'More streams are at the inlet than fit: there is room for 12.',
    );
    expect(sentence('sketch/too-few', { path: 'feeds' }, number('given', 0), number('wanted', 1))).toBe(
      'In the feeds nothing stands, and it takes at least one.',
    );
  });
});

describe('a flash without an answer', () => {
  test('repeats the two conditions in the measures asked for', () => {
    const evidence = [number('pressure', 6e6, 'pressure'), number('vapourFraction', 0.5, 'fraction')];
    const f: Finding = { code: 'equilibrium/no-such-state', weight: 'beyond-limit', at: {}, evidence };
    expect(said(EQUILIBRIUM_WORDS, f)).toEqual({
      sentence: 'There is no state with a pressure of 60.00 bar(a) and a vapour fraction of 0.5000.',
      next: 'Choose a lower pressure, where liquid and vapour exist side by side, or give another condition than the vapour fraction.',
    });
  });

  test('names the ends of the search that the flash has', () => {
    expect([LEAST_T_K, MOST_T_K]).toEqual([whole.LEAST_T_K, whole.MOST_T_K]);
  });

  test('names every chemical without a standard entropy', () => {
    const evidence = [word('chemical', 'x1'), word('chemical', 'n-butane')];
    const f: Finding = { code: 'equilibrium/no-entropy', weight: 'beyond-limit', at: {}, evidence };
    expect(said(EQUILIBRIUM_WORDS, f).sentence).toContain('of x1 and butane is not known');
  });
});
