/** Random trials with a seed: `npm run robust -- [--what GROUP] [--seed N] [--count M] [--case K] [--json OUT]`. */
import { writeFileSync } from 'node:fs';
import { parseArgs } from 'node:util';
import { GROUPS, type GroupReport, SLOW_GROUPS } from './groups';

const { values } = parseArgs({
  options: {
    what: { type: 'string' },
    seed: { type: 'string', default: '1' },
    count: { type: 'string', default: '2000' },
    /** One case alone, by the number that a failure was listed with. */
    case: { type: 'string' },
    json: { type: 'string' },
  },
});

async function main(): Promise<number> {
  const seed = Number(values.seed);
  const count = Number(values.count);
  const only = values.case === undefined ? undefined : Number(values.case);
  if (!Number.isInteger(seed) || !Number.isInteger(count) || count < 1) {
    process.stderr.write('--seed and --count are whole numbers\n');
    return 2;
  }
  const names = values.what === undefined ? Object.keys(GROUPS) : [values.what];
  const reports: Record<string, GroupReport & { seconds: number }> = {};
  let good = true;
  for (const name of names) {
    const group = GROUPS[name] ?? SLOW_GROUPS[name];
    if (group === undefined) {
      process.stderr.write(
        `no group "${name}"; there are: ${Object.keys({ ...GROUPS, ...SLOW_GROUPS }).join(', ')}\n`,
      );
      return 2;
    }
    const start = performance.now();
    const found = await group(seed, count, only);
    const seconds = (performance.now() - start) / 1000;
    reports[name] = { ...found, seconds };
    good &&= found.wrong === 0 && found.share >= found.wanted;
    process.stdout.write(
      `${name}: seed ${seed}, ${found.tried} tried, ${found.answered} answered (${(100 * found.share).toFixed(2)} %), ` +
        `${found.wrong} wrong, reasons ${JSON.stringify(found.reasons)}, ${seconds.toFixed(1)} s\n`,
    );
  }
  if (values.json !== undefined) {
    const file = { format: 'splitwright.robust', seed, count, groups: reports };
    writeFileSync(values.json, `${JSON.stringify(file, null, 1)}\n`);
  }
  return good ? 0 : 1;
}

main().then((code) => {
  process.exitCode = code;
});
