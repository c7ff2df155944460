import { useEffect, useMemo } from 'react';
import { Balance } from '../balance/Balance';
import { Sheet } from '../canvas/Sheet';
import { Shelf } from '../canvas/Shelf';
import { PairsPage } from '../drawers/chemicals/Pairs';
import { DrawerHost } from '../drawers/DrawerHost';
import { ScaleFeeds } from '../drawers/scale/ScaleFeeds';
import { actionFor } from '../store/action';
import { BankContext } from '../store/bank';
import { type Stores, StoresProvider, useSession, useSketch, useStores } from '../store/react';
import { actions } from './actions';
import { Bar } from './Bar';
import { bankIndex } from './bankIndex';
import { Dialogue } from './Dialogue';
import { DocumentsPage } from './export/DocumentsPage';
import { UnderWayList } from './export/UnderWayList';
import { cancelNewest } from './export/underWay';
import { FindField } from './find/FindField';
import { isTyping } from './isTyping';
import { KeyList } from './KeyList';
import { MySketches } from './MySketches';
import { Notice, Update } from './Notice';
import { SolvingLine } from './SolvingLine';
import { Start } from './Start';
import { SummaryPage } from './SummaryPage';
import { ShareDialogue } from './share/ShareDialogue';
import { nameTab } from './tabName';
import { applyTheme } from './theme';
import { useFileDrop } from './useFileDrop';
import './theme.css';
import './layout.css';
import './sketches.css';

/** Keys of all actions; a field keeps its own keys, a dialogue keeps them all. */
function useKeys(stores: Stores): void {
  useEffect(() => {
    const press = (event: KeyboardEvent): void => {
      if (event.defaultPrevented) return;
      if (document.querySelector('[aria-modal="true"]')) {
        // One thing at a time: the dialogue itself is left with the next Esc.
        if (event.key === 'Escape' && cancelNewest()) event.preventDefault();
        return;
      }
      const action = actionFor(actions, event, isTyping(event.target), stores);
      if (!action) return;
      event.preventDefault();
      action.run(stores);
    };
    window.addEventListener('keydown', press);
    return () => window.removeEventListener('keydown', press);
  }, [stores]);
}

function Over() {
  const { session } = useStores();
  const over = useSession((state) => state.over);
  const close = (): void => session.setState({ over: 'none' });
  if (over === 'keys') return <KeyList actions={actions} />;
  if (over === 'open') return <MySketches />;
  if (over === 'share') return <ShareDialogue />;
  if (over === 'documents') return <DocumentsPage />;
  if (over === 'pairs')
    return (
      <Dialogue title="Pair parameters" wide>
        <PairsPage />
      </Dialogue>
    );
  if (over === 'scale')
    return (
      <Dialogue title="Scale all feeds" aside>
        <ScaleFeeds close={close} />
      </Dialogue>
    );
  return over === 'summary' ? <SummaryPage /> : null;
}

function Workplace({ stores }: { readonly stores: Stores }) {
  useKeys(stores);
  const fileHangs = useFileDrop(stores);
  const theme = useSession((state) => state.theme);
  useEffect(() => applyTheme(theme), [theme]);
  const title = useSketch((state) => state.sketch.title.title);
  useEffect(() => nameTab(title), [title]);
  const isBlank = useSketch((state) => state.sketch.units.length === 0);
  const finding = useSession((state) => state.over === 'find');
  const spoken = useSession((state) => state.spoken);
  return (
    <div className="app">
      <Bar actions={actions} />
      <Shelf />
      <main className="sheet" aria-label="Sheet">
        <Sheet />
        {isBlank ? <Start /> : null}
        <Notice />
        {finding ? <FindField /> : null}
        <div className="at-foot">
          <UnderWayList />
          <SolvingLine />
          <Update />
        </div>
      </main>
      <DrawerHost />
      <Balance />
      <Over />
      {fileHangs ? <div className="drop-here">Drop the file to open it</div> : null}
      <div className="unseen" role="status" aria-live="polite">
        {spoken}
      </div>
    </div>
  );
}

export function App({ stores }: { readonly stores: Stores }) {
  const bank = useMemo(() => ({ index: bankIndex }), []);
  return (
    <StoresProvider value={stores}>
      <BankContext.Provider value={bank}>
        <Workplace stores={stores} />
      </BankContext.Provider>
    </StoresProvider>
  );
}
