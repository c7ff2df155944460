import type { Problem } from '../engine/network/types';
import { loadBankData } from '../sketch/bank';
import { type BankData, makeCompile, neededChemicals } from '../sketch/compile';
import { afterPaint, markOnce, markShown } from '../store/marks';
import type { Stores } from '../store/react';
import { connectSolver, type SolverClient, type WorkerLike } from '../store/solverClient';
import { takeWorker } from './solverWorker';

/** The solver is warmed up when the page is idle, or after this [ms]. */
const IDLE_MS = 500;

const NO_DATA =
  'The data of the chemicals could not be fetched. Load the page again with a network; the sketch is kept.';

/**
 * Keeps the results answering the document: compiles each new document (memoised), loads chemicals of the bank that it
 * newly names, and sends the problem to the worker. What changes no number (a label moved) is not sent.
 */
export function startSolving(
  stores: Stores,
  make: () => WorkerLike = takeWorker,
  load: typeof loadBankData = loadBankData,
): SolverClient {
  const compile = makeCompile();
  let data: BankData | null = null;
  let loadedFor = '';
  let sent: Problem | null = null;
  /** How it stands with what was sent last. */
  let stand: 'asked' | 'answered' | 'stopped' = 'asked';
  /** Edit with which the sketch that is shown came. */
  let since = 0;
  const started = new Map<number, number>();
  /** An answer to another sketch, which may have the same ids, comes too late. A copy is sent as the problem it is a copy of. */
  const isLate = (edit: number): boolean => edit < since && edit !== sent?.edit;

  const client = connectSolver(make, {
    results: (edit, last, batch) => {
      if (isLate(edit)) return;
      // What is answered although it was stopped a moment before needs no asking again.
      if (last && edit === sent?.edit) stand = 'answered';
      const begun = started.get(edit);
      stores.results.take(edit, last, batch, begun === undefined ? 0 : performance.now() - begun);
      if (!last) return;
      for (const known of started.keys()) if (known <= edit) started.delete(known);
      if (edit === sent?.edit) answered(stores.compiled.getState().edit);
    },
    at: (edit, unit, loop) => {
      if (!isLate(edit) && stand !== 'stopped') stores.results.at(edit, unit, loop ?? null);
    },
    broke: (_edit, message, unit) => {
      const tag = stores.sketch.getState().sketch.units.find((u) => u.id === unit)?.tag;
      stores.results.broke(
        tag ? `The solver stopped in ${tag}: ${message}` : `The solver stopped: ${message}`,
      );
    },
    answer: () => undefined,
  });

  /** The numbers on the screen now belong to this edit. */
  const answered = (edit: number): void => {
    stores.results.setState({ solvedEdit: edit });
    markOnce('first-solved');
    afterPaint(() => {
      document.documentElement.dataset.solvedEdit = String(edit);
      const root = document.getElementById('root');
      if (root) root.dataset.solvedEdit = String(edit);
      markShown(edit);
    });
  };

  const run = (): void => {
    const { sketch, edit } = stores.sketch.getState();
    const needed = neededChemicals(sketch).join();
    if (!data || needed !== loadedFor) {
      const isWanted = (): boolean => neededChemicals(stores.sketch.getState().sketch).join() === needed;
      load(sketch).then(
        (loaded) => {
          if (!isWanted()) return;
          data = loaded;
          loadedFor = needed;
          run();
        },
        (error: unknown) => {
          if (!isWanted()) return;
          const trouble = `${NO_DATA} (${error instanceof Error ? error.message : error})`;
          stores.compiled.setState({ trouble });
          stores.results.broke(trouble);
        },
      );
      return;
    }
    const { basis, problem, gaps, notes, assumptions } = compile(sketch, data, edit);
    stores.compiled.setState({
      edit,
      basis: basis ?? null,
      problem,
      gaps,
      notes,
      assumptions,
      loading: [],
      trouble: undefined,
    });
    // Results may have been cleared (another file, a model that cannot be solved) while the worker remembers handing them out.
    const blank = problem.units.length > 0 && stores.results.getState().units.size === 0;
    if (problem === sent && !blank) {
      // A label that is moved while the solve runs, or after it was stopped, makes no answer out of the one before.
      if (stand === 'answered') answered(edit);
      return;
    }
    if (!basis) {
      stores.results.clear();
      stores.results.setState({ solvedEdit: edit });
      sent = null;
      return;
    }
    sent = problem;
    stand = 'asked';
    if (stores.results.getState().stopped) stores.results.resume();
    started.set(problem.edit, performance.now());
    client.solve(basis, problem, 'warm', blank);
  };

  stores.sketch.subscribe((state, before) => {
    if (state.sketch.id !== before.sketch.id) [since, sent] = [state.edit, null];
    if (state.sketch !== before.sketch) run();
  });
  stores.results.subscribe(({ stopped }, before) => {
    if (stopped === before.stopped) return;
    if (stopped) {
      stand = 'stopped';
      client.stop();
    } else if (stand === 'stopped') {
      sent = null;
      run();
    }
  });
  run();
  // A worker warms up as soon as it starts; what a first solve has cut short goes on when the page is idle.
  const prewarm = (): void => client.ask(0, { ask: 'prewarm' });
  if (window.requestIdleCallback) window.requestIdleCallback(prewarm, { timeout: IDLE_MS });
  else setTimeout(prewarm, IDLE_MS);
  return client;
}
