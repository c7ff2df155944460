import ELK from 'elkjs/lib/elk.bundled.js';
import { arrange, arranged, type LayoutEngine, placedByHand } from '../../src/drawing/arrange';
import { buildScene } from '../../src/drawing/scene';
import type { Sketch } from '../../src/sketch/types';
import { handPlaced, turnedAbout } from '../drawing/handPlaced';
import { LAWS, openLabels, symbolsStandApart } from '../drawing/laws';
import { randomPlant } from '../drawing/plants';
import { inputOf } from '../drawing/sheets';
import type { GroupReport } from './groups';

/** Texts at 100 %, at the zoom of a whole train on a screen, and at the smallest steady zoom. */
const SCALES = [1, 1.375, 2] as const;
const ALL_LAWS = Object.entries({ ...LAWS, 'no two symbols lie on one another': symbolsStandApart });

interface Arranged {
  readonly sheet: Sketch;
  readonly broken: string[];
}

/** Everything placed anew. */
async function all(seed: number, engine: LayoutEngine): Promise<Arranged> {
  const plant = randomPlant(seed);
  return { sheet: arranged(plant, await arrange(plant, engine)), broken: [] };
}

/** Some units placed by hand, a few or nearly all, the others around them; every second sheet turned and mirrored about. */
async function aroundKept(seed: number, engine: LayoutEngine): Promise<Arranged> {
  const plant = seed % 2 === 0 ? randomPlant(seed) : turnedAbout(randomPlant(seed), seed);
  const before = handPlaced(arranged(plant, await arrange(plant, engine)), seed);
  const keep = placedByHand(before);
  const sheet = arranged(before, await arrange(before, engine, { keep }));
  const was = new Map(before.units.map((unit) => [unit.id, unit]));
  const kept = new Set(keep);
  return {
    sheet,
    broken: sheet.units.flatMap((unit) =>
      kept.has(unit.id) && unit !== was.get(unit.id)
        ? [`a unit placed by hand was changed: ${unit.tag}`]
        : !kept.has(unit.id) && unit.at.some((v) => v % 8 !== 0)
          ? [`a unit is off the grid: ${unit.tag}`]
          : [],
    ),
  };
}

const WAYS = { all, 'around what was placed by hand': aroundKept } as const;

/** Plants of 5 to 60 units and their feeds and products, arranged both ways, drawn, and held against every law of the drawing. */
export async function drawings(seed: number, count: number): Promise<GroupReport> {
  const engine = new ELK();
  const reasons: Record<string, number> = {};
  const cases: unknown[] = [];
  const more: Record<string, { sheets: number; wrong: number; wanted: number; shown: number; led: number }> =
    {};
  for (const [how, way] of Object.entries(WAYS)) {
    const sums = { sheets: 0, wrong: 0, wanted: 0, shown: 0, led: 0 };
    more[how] = sums;
    for (let n = 0; n < count; n++) {
      const { sheet, broken } = await way(seed + n, engine);
      for (const textScale of SCALES) {
        const scene = buildScene(sheet, inputOf(sheet, { textScale }));
        for (const [name, law] of ALL_LAWS) {
          const found = law(scene, sheet);
          if (found.length > 0) broken.push(`${name} (${textScale}): ${found[0]}`);
        }
        if (textScale !== 1) continue;
        const open = openLabels(scene);
        sums.wanted += scene.labels.length;
        sums.shown += open.length;
        sums.led += open.filter((label) => label.leader).length;
      }
      sums.sheets += 1;
      if (broken.length === 0) continue;
      sums.wrong += 1;
      for (const one of broken) {
        const name = one.replace(/( \([\d.]+\))?:.*/, '');
        reasons[name] = (reasons[name] ?? 0) + 1;
      }
      cases.push({ how, seed: seed + n, units: sheet.units.length, broken });
    }
  }
  const tried = Object.values(more).reduce((sum, { sheets }) => sum + sheets, 0);
  const wrong = Object.values(more).reduce((sum, one) => sum + one.wrong, 0);
  const answered = tried - wrong;
  return { tried, answered, reasons, wrong, share: answered / tried, wanted: 1, cases, more };
}
