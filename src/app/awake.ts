import { loadPairTables } from '../data/bank';
import { wakeWorker } from './solverWorker';

// Imported before anything else of the page: the worker loads and warms up, and the tables that every sketch needs are on their
// way, while the page is still being built. Whoever needs the tables asks again, and hears if they cannot be had.
wakeWorker();
void Promise.allSettled([loadPairTables()]);
