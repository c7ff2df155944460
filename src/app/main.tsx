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
import { startAutosave } from './autosaving';
import { ErrorBoundary } from './ErrorBoundary';
import { keepFolds } from './folds';
import { startSolving, wakeSolver } from './solving';
import { applyTheme, storedTheme } from './theme';

const root = document.getElementById('root');
if (!root) throw new Error('index.html has no element with the id "root"');

const theme = storedTheme();
applyTheme(theme);
// While the sketch of last time is looked up, the solver's script is on its way.
const solver = wakeSolver();
const autosave = await startAutosave();
const stores: Stores = {
  sketch: createSketchStore(autosave.last ?? emptySketch(crypto.randomUUID()), markEdit),
  results: createResultsStore(),
  session: createSession(),
  compiled: createCompiledStore(),
};
stores.session.setState({ theme });
keepFolds(stores.session);
startSolving(stores, solver);
autosave.watch(stores);

createRoot(root).render(
  <StrictMode>
    <ErrorBoundary stores={stores}>
      <App stores={stores} />
    </ErrorBoundary>
  </StrictMode>,
);
afterPaint(() => markOnce('app-ready'));
