import { serveSolver } from './jobs';
import type { JobPort } from './port';

/** Entry of the solver's worker: the engine behind the protocol, nothing of the page. It warms up while the page is built. */
serveSolver(globalThis as unknown as JobPort, { warmUp: true });
