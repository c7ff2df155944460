/** The first solve of a process: prints its time, and that of one evaluation afterwards, as JSON. With `warmed`, after the pre-warm. */
import { prewarm } from '../../src/worker/prewarm';
import { timeModels } from './models';
import { memoryOf, readTrain, solveAll } from './train';

const now = (): number => performance.now();
const train = await readTrain();
if (process.argv[2] === 'warmed')
  await prewarm({
    turns: { turn: async () => undefined, close: () => undefined },
    now,
    overtaken: () => false,
  });
const begun = now();
solveAll(train.asItIs, memoryOf(train), 'nothing');
const first_ms = now() - begun;
const unit_us = timeModels(now, [10], 5).find((t) => t.level === 2)!.us;
process.stdout.write(JSON.stringify({ first_ms, unit_us }));
