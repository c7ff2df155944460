/** Timings: `npm run bench -- [--what NAME] [--json OUT]`. */
import { writeFileSync } from 'node:fs';
import { cpus } from 'node:os';
import { parseArgs } from 'node:util';
import { timeBrowser } from './browser';
import { growth, timeColumns } from './column';
import { timeDrag } from './drag';
import { timeExample } from './example';
import { timeFlashes } from './flash';
import { timeModels } from './models';
import { timeScene } from './scene';
import { timeSummary } from './summary';
import { timeTwoColumns } from './twoColumns';

const now = (): number => performance.now();

/** One line a bench; each gives a table of figures. */
const BENCHES: Readonly<Record<string, () => Promise<readonly object[]>>> = {
  models: async () => timeModels(now),
  flash: () => timeFlashes(now),
  columns: () => timeColumns(now),
  growth: async () => (await growth(now)).map(([stages, ms, steps]) => ({ stages, ms, steps })),
  train: () => timeTwoColumns(now),
  example: () => timeExample(now),
  scene: async () => timeScene(now),
  summary: () => timeSummary(now),
  browser: timeBrowser,
  drag: timeDrag,
};

const { values } = parseArgs({ options: { what: { type: 'string' }, json: { type: 'string' } } });

async function main(): Promise<number> {
  const names = values.what === undefined ? Object.keys(BENCHES) : [values.what];
  const results: Record<string, readonly object[]> = {};
  for (const name of names) {
    const bench = BENCHES[name];
    if (bench === undefined) {
      process.stderr.write(`no bench "${name}"; there are: ${Object.keys(BENCHES).join(', ')}\n`);
      return 2;
    }
    results[name] = await bench();
    process.stdout.write(`${name}\n`);
    for (const row of results[name]) {
      const words = Object.entries(row).map(
        ([key, value]) =>
          `${key} ${typeof value === 'number' ? Number(value.toPrecision(4)) : String(value)}`,
      );
      process.stdout.write(`  ${words.join('  ')}\n`);
    }
  }
  if (values.json !== undefined) {
    const machine = { node: process.version, processor: cpus()[0]?.model ?? 'unknown', cores: cpus().length };
    const file = { format: 'splitwright.bench', machine, results };
    writeFileSync(values.json, `${JSON.stringify(file, null, 1)}\n`);
  }
  return 0;
}

main().then((code) => {
  process.exitCode = code;
});
