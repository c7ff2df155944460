import ELK from 'elkjs/lib/elk.bundled.js';
import { arrange, arranged } from '../../src/drawing/arrange';
import { buildScene } from '../../src/drawing/scene';
import type { Sketch } from '../../src/sketch/types';
import { LAWS, openLabels, symbolsStandApart } from '../drawing/laws';
import { randomPlant } from '../drawing/plants';
import { inputOf } from '../drawing/sheets';
import type { GroupReport } from './groups';

/** Texts at 100 %, at the zoom of a whole train on a screen, and at the smallest steady zoom. */
const SCALES = [1, 1.375, 2] as const;

/** Plants of 5 to 60 units and their feeds and products, arranged, drawn, and held against every law of the drawing. */
export async function drawings(seed: number, count: number): Promise<GroupReport> {
  const engine = new ELK();
  const laws = Object.entries({ ...LAWS, 'no two symbols lie on one another': symbolsStandApart });
  const reasons: Record<string, number> = {};
  const cases: unknown[] = [];
  const labels = { wanted: 0, shown: 0, led: 0 };
  let wrong = 0;
  for (let n = 0; n < count; n++) {
    const plant: Sketch = randomPlant(seed + n);
    const sheet = arranged(plant, await arrange(plant, engine));
    const broken: string[] = [];
    for (const textScale of SCALES) {
      const scene = buildScene(sheet, inputOf(sheet, { textScale }));
      for (const [name, law] of laws) {
        const found = law(scene, sheet);
        if (found.length === 0) continue;
        reasons[name] = (reasons[name] ?? 0) + 1;
        broken.push(`${name} (${textScale}): ${found[0]}`);
      }
      if (textScale !== 1) continue;
      labels.wanted += scene.labels.length;
      labels.shown += openLabels(scene).length;
      labels.led += openLabels(scene).filter((label) => label.leader).length;
    }
    if (broken.length === 0) continue;
    wrong += 1;
    cases.push({ seed: seed + n, units: sheet.units.length, broken });
  }
  const answered = count - wrong;
  return {
    tried: count,
    answered,
    reasons,
    wrong,
    share: answered / count,
    wanted: 1,
    cases,
    more: { labels },
  };
}
