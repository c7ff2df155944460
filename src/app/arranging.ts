import type { LayoutEngine } from '../drawing/arrange';

let engine: Promise<LayoutEngine> | null = null;

async function load(): Promise<LayoutEngine> {
  const [{ default: Elk }, { default: LayoutWorker }] = await Promise.all([
    import('elkjs/lib/elk-api.js'),
    import('elkjs/lib/elk-worker.min.js?worker'),
  ]);
  return new Elk({ workerFactory: () => new LayoutWorker({ name: 'arrange' }) });
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
