/** Writes the hand-made sheets as SVG, to be looked at: tsx tests/drawing/look.ts DIRECTORY */
import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { frameOf, pageOf } from '../../src/drawing/frame';
import { buildScene } from '../../src/drawing/scene';
import { sceneToSvg } from '../../src/drawing/svg';
import { symbolToSvg } from '../../src/drawing/symbols/icon';
import { SYMBOLS } from '../../src/drawing/symbols/registry';
import { DARK, LIGHT } from '../../src/drawing/tokens';
import { randomSheet } from './random';
import { CROSSED, inputOf, LET_DOWN, RECYCLE } from './sheets';

const directory = process.argv[2];
if (!directory) throw new Error('name the directory to write to');
mkdirSync(directory, { recursive: true });
const write = (name: string, svg: string): void => writeFileSync(join(directory, `${name}.svg`), svg);

const pictures = {
  letdown: [LET_DOWN, inputOf(LET_DOWN, { limits: { 'PV-101': 'caution' } })],
  recycle: [
    RECYCLE,
    inputOf(RECYCLE, {
      states: { 'V-102': 'needs-value', 'E-102': 'out-of-date', 'PV-101': 'no-solution', 'E-101': 'waiting' },
      limits: { 'V-101': 'beyond-limit', 'E-101': 'note', 'PV-101': 'caution' },
    }),
  ],
  crossed: [CROSSED, inputOf(CROSSED)],
  ...Object.fromEntries(
    [1, 2, 3, 4].map((seed) => {
      const sketch = randomSheet(seed);
      return [`random${seed}`, [sketch, inputOf(sketch)]];
    }),
  ),
} as const;
for (const [name, [sketch, input]] of Object.entries(pictures)) {
  const scene = buildScene(sketch, input);
  write(
    name,
    sceneToSvg(scene, name === 'crossed' ? DARK : LIGHT, { frame: frameOf(pageOf(scene.box)), ground: true }),
  );
  write(`${name}-small`, sceneToSvg(scene, LIGHT, { bare: true, ground: true, width: 220, height: 128 }));
}
const icons = Object.keys(SYMBOLS).map(
  (kind, k) => `<g transform="translate(${10 + 60 * k} 10)">${symbolToSvg(kind)}</g>`,
);
write('icons', `<svg xmlns="http://www.w3.org/2000/svg" width="500" height="50">${icons.join('')}</svg>`);
