import { describe, expect, test } from 'vitest';
import { type BankData, compile, makeCompile } from '../../src/sketch/compile';
import {
  addUnit,
  clearSetting,
  connect,
  deleteStream,
  deleteUnits,
  disconnect,
  type Edit,
  insertUnitOnStream,
  mirrorUnit,
  moveUnits,
  setChemicals,
  setModel,
  setSetting,
  setSite,
  setTag,
  turnUnit,
} from '../../src/sketch/edits';
import { openSketch } from '../../src/sketch/read';
import { KNOWN_KINDS } from '../../src/sketch/registry';
import type { Json, Sketch } from '../../src/sketch/types';
import { writeSketch } from '../../src/sketch/write';
import { makeRandom } from '../robust/random';
import { STRANGE, spoilValues } from '../robust/spoil';
import { bankOf, exampleText, letDown, s, twoFlashes, u } from './help';

const seeded = (seed: number): (() => number) => makeRandom(seed).next;
const pick = <T>(items: readonly T[], random: () => number): T => items[Math.floor(random() * items.length)]!;

type Node = Parameters<typeof spoilValues>[0];

/** The settings of one unit, which compiling reads; the whole document once there are none. */
function someSettings(raw: Node, random: () => number): Node {
  const { units } = raw as { units?: unknown };
  const unit: unknown = Array.isArray(units) ? pick(units, random) : undefined;
  const settings = (unit as { settings?: unknown } | null | undefined)?.settings;
  return typeof settings === 'object' && settings !== null && Object.keys(settings).length > 0
    ? (settings as Node)
    : raw;
}

describe('spoilt sketches', () => {
  const SEED = 20_26;
  test(`300 of seed ${SEED} open or are refused with a reason; what opens compiles and survives writing`, async () => {
    const bank = await bankOf({
      ...twoFlashes(),
      chemicals: [...twoFlashes().chemicals, 'argon', 'oxygen', 'water'],
    });
    const values = makeRandom(SEED);
    const random = values.next;
    let openedCount = 0;
    let gapCount = 0;
    for (let k = 0; k < 300; k += 1) {
      const raw = JSON.parse(exampleText(pick(['let-down', 'condensate-flash'], random))) as Node;
      const times = 1 + Math.floor(random() * 2);
      for (let j = 0; j < times; j += 1)
        spoilValues(random() < 0.4 ? raw : someSettings(raw, random), values);
      const result = openSketch(raw, { newId: () => 'x' });
      if (!result.ok) {
        expect(result.problems.length).toBeGreaterThan(0);
        for (const p of result.problems) expect(p.code).toMatch(/^file\//);
        continue;
      }
      openedCount += 1;
      const c = compile(result.sketch, bank);
      gapCount += c.gaps.length;
      for (const unit of c.problem.units)
        if (unit.settings === null) expect(c.gaps.length).toBeGreaterThan(0);
        else expectFinite(unit.settings);
      const again = openSketch(writeSketch(result.sketch));
      expect(again.ok && writeSketch(again.sketch)).toBe(writeSketch(result.sketch));
    }
    // Both ways must have been walked often, else this test shows little.
    expect(openedCount).toBeGreaterThan(60);
    expect(openedCount).toBeLessThan(240);
    expect(gapCount).toBeGreaterThan(60);
  });

  test('600 spoilt texts of seed 7 are opened or refused, as JSON.parse does or stricter', () => {
    const random = seeded(7);
    const text = exampleText('let-down');
    for (let k = 0; k < 600; k += 1) {
      const at = Math.floor(random() * text.length);
      const long = Math.floor(random() * 4);
      const put = pick(['', '"', '{', ']', ',', ':', '\\', '\n', '1', 'e', '\u0000', 'null'], random);
      const spoilt = text.slice(0, at) + put + text.slice(at + long);
      const result = openSketch(spoilt);
      let parses = true;
      try {
        JSON.parse(spoilt);
      } catch (error) {
        if (!(error instanceof SyntaxError)) throw error;
        parses = false;
      }
      const code = result.ok ? '' : result.problems[0].code;
      // A key that stands twice may be met before the place that is no JSON.
      if (parses) expect(code).not.toBe('file/not-json');
      else expect(['file/not-json', 'file/repeated-key']).toContain(code);
    }
  });
});

function expectFinite(value: unknown): void {
  if (typeof value === 'number') expect(Number.isFinite(value)).toBe(true);
  else if (value instanceof Float64Array) for (const x of value) expectFinite(x);
  else if (typeof value === 'object' && value !== null) for (const x of Object.values(value)) expectFinite(x);
}

describe('random edits', () => {
  const step = (sketch: Sketch, random: () => number): Edit => {
    const unit = pick(sketch.units, random)?.id ?? u('u1');
    const stream = pick(sketch.streams, random)?.id ?? s('s1');
    const end = () =>
      [
        pick(sketch.units, random)?.id ?? u('u1'),
        pick(['in', 'out', 'vapour', 'liquid', 'in1'], random),
      ] as const;
    const at = [random() * 1000, random() * 600] as const;
    const edits: readonly (() => Edit)[] = [
      () => addUnit(sketch, pick(Object.keys(KNOWN_KINDS), random), at),
      () => connect(sketch, end(), end()),
      () => connect(sketch, end(), end()),
      () => disconnect(sketch, stream),
      () => deleteStream(sketch, stream),
      () => deleteUnits(sketch, new Set([unit])),
      () => insertUnitOnStream(sketch, stream, pick(Object.keys(KNOWN_KINDS), random), at),
      () => moveUnits(sketch, new Map([[unit, at]])),
      () => turnUnit(sketch, unit),
      () => mirrorUnit(sketch, unit),
      () => setTag(sketch, unit, `T-${Math.floor(random() * 40)}`),
      () =>
        setSetting(
          sketch,
          unit,
          pick(
            ['p.P', 'T', 'h.T', 'flow', 'state.P', 'shares.out1', 'composition', 'composition.preset'],
            random,
          ),
          pick(
            STRANGE.filter((x) => x !== undefined && !Number.isNaN(x)),
            random,
          ) as Json,
        ),
      () => clearSetting(sketch, unit, pick(['p', 'p.P', 'h', 'flow', 'state.T', 'shares'], random)),
      () => setSite(sketch, 'pressure', pick(['1 bar', 'x', '', '0.9 bar'], random)),
      () => setModel(sketch, { kind: pick(['peng-robinson', 'raoult', 'nrtl'], random) }),
      () => setChemicals(sketch, [...sketch.chemicals].reverse()),
    ];
    return pick(edits, random)();
  };

  test.each([11, 12, 13])(
    'of seed %i leave a sketch that opens without a word and compiles step by step as from nothing',
    async (seed) => {
      const random = seeded(seed);
      let sketch = letDown();
      const bank: BankData = await bankOf({
        ...sketch,
        chemicals: [...sketch.chemicals, 'nitrogen', 'oxygen', 'argon', 'carbon-dioxide', 'water'],
      });
      const compileStep = makeCompile();
      const before = new Map<Sketch, string>();
      let changes = 0;
      for (let k = 0; k < 150; k += 1) {
        before.set(sketch, JSON.stringify(sketch));
        const edit = step(sketch, random);
        if (edit.ok) {
          if (edit.sketch !== sketch) changes += 1;
          sketch = edit.sketch;
        }
        const result = openSketch(JSON.parse(JSON.stringify(sketch)));
        if (!result.ok) throw new Error(`${k}: ${JSON.stringify(result.problems)}`);
        expect(result.notes.filter((n) => n.code !== 'sketch/model-not-available')).toEqual([]);
        expect(result.sketch).toEqual(sketch);
        const warm = compileStep(sketch, bank, k);
        const cold = compile(sketch, bank, warm.problem.edit);
        expect(warm).toEqual(cold);
      }
      // No edit touched the document it was given.
      for (const [document, text] of before) expect(JSON.stringify(document)).toBe(text);
      expect(changes).toBeGreaterThan(50);
    },
  );
});
