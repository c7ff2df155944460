import './awake';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { emptySketch } from '../sketch/fresh';
import { createCompiledStore } from '../store/compiledStore';
import { afterPaint, markEdit, markOnce } from '../store/marks';
import type { Stores } from '../store/react';
import { createResultsStore } from '../store/resultsStore';
import { createSession } from '../store/session';
import { createSketchStore } from '../store/sketchStore';
import { App } from './App';
import { storedSingleKeys } from './actions/singleKeys';
import { startAutosave } from './autosaving';
import { ErrorBoundary } from './ErrorBoundary';
import { keepFolds } from './folds';
import { watchMissing } from './missing';
import { keepOffline } from './offline';
import { watchLinks } from './share/opening';
import { startSolving } from './solving';
import { applyTheme, storedTheme } from './theme';

/** How long a page waits with drawing itself until its sketch has been sent to the solver [ms]. */
const ASKED_MS = 150;

const nextCompiled = ({ compiled }: Stores): Promise<void> =>
  new Promise((done) => {
    const stop = compiled.subscribe(() => {
      stop();
      done();
    });
  });

const root = document.getElementById('root');
if (!root) throw new Error('index.html has no element with the id "root"');

const theme = storedTheme();
applyTheme(theme);
const autosave = await startAutosave();
const stores: Stores = {
  sketch: createSketchStore(autosave.last ?? emptySketch(crypto.randomUUID()), markEdit),
  results: createResultsStore(),
  session: createSession(),
  compiled: createCompiledStore(),
};
stores.session.setState({ theme, singleKeys: storedSingleKeys() });
keepFolds(stores.session);
watchMissing(stores.session);
startSolving(stores);
autosave.watch(stores);
await watchLinks(stores);
// A sketch of last time is on its way to the solver before the page takes the processor to draw itself; not for long.
if (autosave.last) await Promise.race([nextCompiled(stores), new Promise((go) => setTimeout(go, ASKED_MS))]);

createRoot(root).render(
  <StrictMode>
    <ErrorBoundary stores={stores}>
      <App stores={stores} />
    </ErrorBoundary>
  </StrictMode>,
);
afterPaint(() => markOnce('app-ready'));
keepOffline(stores.session);
