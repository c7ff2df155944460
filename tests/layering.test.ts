import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { layerFaults } from './setup/checkLayers';
import { blanked, importsOf } from './setup/imports';
import { ROOMS } from './setup/layers';

const root = join(import.meta.dirname, '..');

function projectFiles(): Map<string, string> {
  const names = readdirSync(join(root, 'src'), { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map((entry) =>
      join(entry.parentPath, entry.name)
        .slice(root.length + 1)
        .replaceAll('\\', '/'),
    );
  const text = (path: string): string => (/\.tsx?$/.test(path) ? readFileSync(join(root, path), 'utf8') : '');
  return new Map([
    ['index.html', readFileSync(join(root, 'index.html'), 'utf8')],
    ...names.map((path): [string, string] => [path, text(path)]),
  ]);
}

const PAGE = '<script type="module" src="/src/app/main.tsx"></script>';

/** A small project that breaks no rule; each test plants one fault in it. */
const SOUND: Readonly<Record<string, string>> = {
  'index.html': PAGE,
  'src/app/main.tsx':
    "import { createRoot } from 'react-dom/client';\nimport { start } from '../store/solver';\n",
  'src/store/solver.ts':
    "import { kinds } from '../engine/units/catalogue';\n" +
    "new Worker(new URL('../worker/entry.ts', import.meta.url), { type: 'module' });\n",
  'src/worker/entry.ts': "import { solve } from '../engine/network/solve';\n",
  'src/engine/network/solve.ts': "import { solvers } from '../units/solvers';\n",
  'src/engine/units/solvers.ts': "import { solvePump } from './pump/solve';\n",
  'src/engine/units/catalogue.ts': "import { pump } from './pump/catalogue';\n",
  'src/engine/units/pump/catalogue.ts': "import type { Kind } from '../types';\n",
  'src/engine/units/pump/solve.ts': "import { lu } from '../../numerics/lu';\n",
  'src/engine/units/types.ts': '',
  'src/engine/numerics/lu.ts': '',
  'src/quantity/parse.ts': '',
  'src/sketch/compile.ts': "import type { Kind } from '../engine/units/types';\n",
  'src/drawers/UnitDrawer.tsx': '',
};

const faultsWith = (changes: Readonly<Record<string, string>>): string[] =>
  layerFaults(new Map(Object.entries({ ...SOUND, ...changes })));

describe('the imports of src', () => {
  test('go in the agreed directions, make no circle, and leave the solvers to the worker', () => {
    expect(layerFaults(projectFiles())).toEqual([]);
  });

  test('are found at all: the page and the engine are among the files read', () => {
    const paths = [...projectFiles().keys()];
    expect(paths).toContain('src/app/main.tsx');
    expect(paths.some((path) => path.startsWith('src/engine/'))).toBe(true);
  });
});

describe('the checker of imports', () => {
  test('accepts a sound project', () => {
    expect(faultsWith({})).toEqual([]);
  });

  test.each([
    [
      'the engine loading the sketch',
      'src/engine/numerics/lu.ts',
      "import { c } from '../../sketch/compile';\n",
    ],
    [
      'the engine naming a type of the sketch',
      'src/engine/numerics/lu.ts',
      "import type { C } from '../../sketch/compile';\n",
    ],
    [
      'a lower floor of the engine loading a higher one',
      'src/engine/numerics/lu.ts',
      "import { k } from '../units/types';\n",
    ],
    [
      'the ground of the engine loading a floor',
      'src/engine/outcome.ts',
      "import { lu } from './numerics/lu';\n",
    ],
    ['quantity loading the engine', 'src/quantity/parse.ts', "export { lu } from '../engine/numerics/lu';\n"],
    [
      'a drawer loading a number method',
      'src/drawers/UnitDrawer.tsx',
      "import { lu } from '../engine/numerics/lu';\n",
    ],
    ['the sketch loading the store', 'src/sketch/compile.ts', "import '../store/solver';\n"],
    [
      'a lazy import against the direction',
      'src/quantity/parse.ts',
      "const c = await import('../sketch/compile');\n",
    ],
  ])('catches %s', (_, path, text) => {
    expect(faultsWith({ [path]: text })).toEqual([expect.stringMatching(/against the direction/)]);
  });

  test.each(Object.keys(ROOMS).filter((room) => room !== 'app'))('catches %s loading the app', (room) => {
    const faults = faultsWith({ [`src/${room}/planted.ts`]: "import { x } from '../app/main';\n" });
    expect(faults).toContainEqual(expect.stringMatching(/planted\.ts imports src\/app\/main\.tsx/));
  });

  test('catches a circle, also one through a re-export, and tells the way round', () => {
    const faults = faultsWith({
      'src/quantity/parse.ts': "import { a } from './format';\n",
      'src/quantity/format.ts': "export * from './table';\n",
      'src/quantity/table.ts': "import {\n  // the way back\n  b,\n} from './parse';\n",
    });
    expect(faults).toEqual([
      expect.stringMatching(/circle.*parse\.ts -> .*format\.ts -> .*table\.ts -> .*parse\.ts/),
    ]);
  });

  test('lets two files name each other’s types', () => {
    const faults = faultsWith({
      'src/quantity/parse.ts': "import type { A } from './format';\n",
      'src/quantity/format.ts': "import type { B } from './parse';\n",
    });
    expect(faults).toEqual([]);
  });

  test.each([
    ['a unit’s solver', "import { solvePump } from '../engine/units/pump/solve';\n"],
    ['the network', "import { solve } from '../engine/network/solve';\n"],
    ['the worker’s code', "import '../worker/entry';\n"],
    ['the network, lazily', "const { solve } = await import('../engine/network/solve');\n"],
  ])('catches the page reaching %s without the worker', (_, text) => {
    const faults = faultsWith({ 'src/store/solver.ts': text });
    expect(faults).toContainEqual(
      expect.stringMatching(/the page reaches a solver.*main\.tsx -> src\/store\/solver\.ts -> /),
    );
  });

  test('catches a solver reached through a long way round', () => {
    const faults = faultsWith({
      'src/engine/units/types.ts': '',
      'src/engine/units/pump/catalogue.ts': "import { e } from './law';\n",
      'src/engine/units/pump/law.ts': "import { s } from './solve';\n",
    });
    expect(faults).toContainEqual(
      expect.stringMatching(/reaches a solver.*catalogue\.ts -> .*law\.ts -> .*solve\.ts/),
    );
  });

  test('catches a catalogue that imports its solver, even one the page does not load yet', () => {
    const faults = faultsWith({
      'src/engine/units/mixer/catalogue.ts': "import { solveMixer } from './solve';\n",
      'src/engine/units/mixer/solve.ts': '',
    });
    expect(faults).toEqual([expect.stringMatching(/a catalogue reaches a solver.*mixer\/solve\.ts/)]);
  });

  test('catches a worker started from a drawer', () => {
    const text = "new Worker(new URL('../worker/entry.ts', import.meta.url), { type: 'module' });\n";
    expect(faultsWith({ 'src/drawers/UnitDrawer.tsx': text })).toEqual([
      expect.stringMatching(/starts .* as a worker/),
    ]);
  });

  test.each([
    [
      'React in the engine',
      'src/engine/numerics/lu.ts',
      "import { useState } from 'react';\n",
      /package react,/,
    ],
    [
      'the canvas package in a drawer',
      'src/drawers/UnitDrawer.tsx',
      "import { Handle } from 'reactflow';\n",
      /package reactflow/,
    ],
    [
      'Node in the sketch',
      'src/sketch/compile.ts',
      "import { readFile } from 'node:fs/promises';\n",
      /package node:fs/,
    ],
    [
      'a clock in the engine',
      'src/engine/numerics/lu.ts',
      'const t = performance.now();\n',
      /uses performance/,
    ],
    ['chance in the engine', 'src/engine/numerics/lu.ts', 'const x = Math.random();\n', /uses Math\.random/],
    ['the document in quantity', 'src/quantity/parse.ts', 'document.title;\n', /uses document/],
    [
      'a file that is not there',
      'src/quantity/parse.ts',
      "import { x } from './nowhere';\n",
      /does not exist/,
    ],
    ['a room nobody agreed on', 'src/helpers/things.ts', '', /no known room/],
  ])('catches %s', (_, path, text, fault) => {
    expect(faultsWith({ [path]: text })).toEqual([expect.stringMatching(fault)]);
  });

  test('catches a page whose script is missing', () => {
    expect(faultsWith({ 'index.html': '<p></p>' })).toEqual(['index.html loads no script from src']);
  });
});

describe('reading imports', () => {
  test('tells values, types, lazy loads and workers apart', () => {
    const source = [
      "import a, { type B } from './value';",
      "import type { C } from './type';",
      "export type { D } from './retype';",
      "export type E = 1;\nexport { f } from './reexport';",
      "import './side.css';",
      "const g = () => import('./lazy');",
      "new Worker(\n  new URL('./entry.ts', import.meta.url),\n  { type: 'module' },\n);",
    ].join('\n');
    expect(new Map(importsOf(source).map(({ target, how }) => [target, how]))).toEqual(
      new Map([
        ['./value', 'value'],
        ['./type', 'type'],
        ['./retype', 'type'],
        ['./reexport', 'value'],
        ['./side.css', 'value'],
        ['./lazy', 'lazy'],
        ['./entry.ts', 'worker'],
      ]),
    );
  });

  test('reads no import in a comment, and is not misled by globs, addresses, apostrophes or regular expressions', () => {
    const source = [
      "// import { a } from './comment';",
      "/* \nimport { b } from './block';\n*/",
      "const glob = 'data/*.json'; const site = 'https://example.org';",
      "const view = <p>It's here</p>;",
      'const quote = /["\'`]/;',
      "import { c } from './real';",
    ].join('\n');
    expect(importsOf(source)).toEqual([{ target: './real', how: 'value' }]);
  });

  test('blanks strings and comments without moving anything', () => {
    const source = "a('document.x') // window.y\nb";
    expect(blanked(source, true)).toBe("a('          ')            \nb");
  });
});
