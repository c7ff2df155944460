import type { LayoutEngine } from '../drawing/arrange';
import { watchLoading } from './missing';

let engine: Promise<LayoutEngine> | null = null;

async function load(): Promise<LayoutEngine> {
  const [{ default: Elk }, { default: LayoutWorker }] = await Promise.all([
    import('elkjs/lib/elk-api.js'),
    import('elkjs/lib/elk-worker.min.js?worker'),
  ]);
  let fail = (_: Error): void => undefined;
  const broken = new Promise<never>((_, reject) => {
    fail = reject;
  });
  broken.catch(() => {
    engine = null;
  });
  const elk = new Elk({
    workerFactory: () => {
      const worker = watchLoading(new LayoutWorker({ name: 'arrange' }));
      worker.addEventListener('error', (event) =>
        fail(new Error(event.message || 'What arranges could not be loaded.')),
      );
      return worker;
    },
  });
  // A worker that cannot be loaded answers nothing at all.
  return { layout: (...asked) => Promise.race([elk.layout(...asked), broken]) };
}

/** The layout engine in a worker of its own, loaded when somebody arranges for the first time. */
export function layoutEngine(): Promise<LayoutEngine> {
  // What could not be loaded is asked for again the next time.
  engine ??= load().catch((error: unknown) => {
    engine = null;
    throw error;
  });
  return engine;
}
