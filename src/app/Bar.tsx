import { LimitMark, worstWeight } from '../parts/LimitMark';
import { type Action, actingKeys } from '../store/action';
import { useResults, useSession, useSketch, useStores } from '../store/react';
import { MenuButton } from './Menu';

const savedText = {
  saved: 'Saved on this computer',
  saving: 'Saving',
  failed: 'Not saved',
  'read-only': 'Read only: open in another tab',
  unknown: '',
} as const;

function Word({
  action,
  children,
}: {
  readonly action: Action | undefined;
  readonly children?: React.ReactNode;
}) {
  const stores = useStores();
  const singleKeys = useSession((state) => state.singleKeys);
  if (!action) return null;
  const [keys] = actingKeys(action, singleKeys);
  return (
    <button
      type="button"
      className="button"
      title={keys ? `${action.label} (${keys})` : action.label}
      onClick={() => action.run(stores)}
    >
      {children ?? action.label}
    </button>
  );
}

/** The bar: mark, name of the sketch, then words. What is switched on says what it is on. */
export function Bar({ actions }: { readonly actions: readonly Action[] }) {
  const stores = useStores();
  const by = (id: string): Action | undefined => actions.find((action) => action.id === id);
  const title = useSketch((state) => state.sketch.title.title ?? '');
  const number = useSketch((state) => state.sketch.title.number ?? '');
  const undoLabel = useSketch((state) => state.past.at(-1)?.label);
  const redoLabel = useSketch((state) => state.future[0]?.label);
  const writable = useSketch((state) => state.writable);
  const findings = useResults((state) => state.findings);
  const saved = useSession((state) => state.saved);
  const limitsOpen = useSession((state) => state.drawer?.is === 'limits');
  const worst = worstWeight(findings);
  const more = actions.filter(
    (action) => action.group === 'sketch' || action.group === 'view' || action.group === 'help',
  );

  return (
    <header className="bar">
      <h1 className="brand">
        <svg width="20" height="20" viewBox="0 0 20 20" aria-hidden="true">
          <path
            d="M10 1 19 10 10 19 1 10Z M1 10H19 M10 10 14.5 5.5"
            fill="none"
            stroke="currentColor"
            strokeWidth="1.6"
            strokeLinejoin="round"
          />
        </svg>
        <span>Splitwright</span>
      </h1>
      <button
        type="button"
        className="name"
        title="Title block, site and measures"
        onClick={() => stores.session.enterDrawer({ is: 'sketch' })}
      >
        {title || 'Untitled sketch'}
        {number ? <span className="muted"> {number}</span> : null}
      </button>
      <span className="saved" data-state={saved.state} title={saved.detail}>
        {savedText[saved.state]}
      </span>
      {saved.state === 'failed' ? (
        <button
          type="button"
          className="button line not-saved"
          title={saved.detail}
          onClick={() => by('save')?.run(stores)}
        >
          Save as a file
        </button>
      ) : null}
      <span className="gap" />
      <button
        type="button"
        className="button"
        disabled={!undoLabel || !writable}
        title="Undo (Ctrl+Z)"
        onClick={() => by('undo')?.run(stores)}
      >
        Undo {undoLabel ? <span className="muted wide-only">{undoLabel}</span> : null}
      </button>
      <button
        type="button"
        className="button"
        disabled={!redoLabel || !writable}
        title={redoLabel ? `Redo ${redoLabel} (Ctrl+Shift+Z)` : 'Redo (Ctrl+Shift+Z)'}
        onClick={() => by('redo')?.run(stores)}
      >
        Redo
      </button>
      <MenuButton
        short
        word="Edit"
        actions={actions.filter((action) => action.group === 'edit' && !DIRECT.has(action.id))}
      />
      <span className="divider" />
      <Word action={by('chemicals')}>Chemicals</Word>
      <Word action={by('assumptions')}>Assumptions</Word>
      <button
        type="button"
        className={limitsOpen ? 'button on' : 'button'}
        aria-pressed={limitsOpen}
        onClick={() => by('limits')?.run(stores)}
      >
        Limits {worst ? <LimitMark weight={worst} /> : null} <span className="count">{findings.length}</span>
      </button>
      <span className="divider" />
      <Word action={by('summary')}>Stream summary</Word>
      <MenuButton word="File and view" actions={more} />
      <button type="button" className="button fill" onClick={() => by('export-pdf')?.run(stores)}>
        Export PDF
      </button>
    </header>
  );
}

/** Undo and redo stand in the bar themselves. */
const DIRECT: ReadonlySet<string> = new Set(['undo', 'redo']);
