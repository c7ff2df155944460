import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';

const root = join(import.meta.dirname, '..');
const read = (name: string): string => readFileSync(join(root, name), 'utf8');

const AGREED = [
  'package.json',
  'vite.config.ts',
  'index.html',
  'README.md',
  'DEVELOPERS.md',
  'LICENSE',
  'src',
  'public',
  'tests',
  'e2e',
  'tsconfig.json',
  'biome.json',
  'package-lock.json',
  '.npmrc',
  '.gitignore',
  '.ci',
];
const MADE_BY_TOOLS = ['.git', 'node_modules', 'dist', 'coverage', 'test-results', 'playwright-report'];

describe('the house', () => {
  test('the top level holds the agreed names and nothing else', () => {
    const others = readdirSync(root).filter(
      (name) => !AGREED.includes(name) && !MADE_BY_TOOLS.includes(name),
    );
    expect(others).toEqual([]);
    expect(AGREED.filter((name) => !existsSync(join(root, name)))).toEqual([]);
  });

  test('the lock file names no registry address', () => {
    const lock: unknown = JSON.parse(read('package-lock.json'));
    expect(JSON.stringify(lock)).not.toContain('"resolved"');
  });

  test('every package is pinned to one exact version', () => {
    const { dependencies, devDependencies } = JSON.parse(read('package.json')) as Record<
      'dependencies' | 'devDependencies',
      Record<string, string>
    >;
    const exact = /^(npm:@xyflow\/react@)?\d+\.\d+\.\d+$/;
    const loose = Object.entries({ ...dependencies, ...devDependencies }).filter(([, v]) => !exact.test(v));
    expect(loose).toEqual([]);
  });

  test.each(['SourceSans3-Regular.ttf', 'SourceSans3-SemiBold.ttf', 'SourceSans3-Italic.ttf'])(
    '%s is a TrueType font and its licence lies beside it',
    (name) => {
      const bytes = readFileSync(join(root, 'public/fonts', name));
      expect(bytes.readUInt32BE(0)).toBe(0x00010000);
      expect(read('public/fonts/OFL.txt')).toContain('SIL Open Font License');
    },
  );
});
