import { useState } from 'react';
import type { UnitId } from '../../engine/ids';
import { useStores } from '../../store/react';
import type { SketchStore } from '../../store/sketchStore';
import type { Draft } from './draft';

/** Rows without a value, by sketch and unit: they wait here while the drawer is closed. Not part of the document. */
const kept = new WeakMap<SketchStore, Map<string, Draft>>();

interface KeptDraft {
  readonly draft: Draft | null;
  /** Chosen since the drawer opened: its field may take the focus. */
  readonly isNew: boolean;
  keep(draft: Draft | null): void;
}

/** The draft of one column, there again when its drawer opens again. */
export function useDraft(id: UnitId): KeptDraft {
  const { sketch } = useStores();
  const key = `${sketch.getState().sketch.id} ${id}`;
  const [state, setState] = useState(() => ({ draft: kept.get(sketch)?.get(key) ?? null, isNew: false }));
  const keep = (draft: Draft | null): void => {
    const drafts = kept.get(sketch) ?? new Map<string, Draft>();
    if (draft) drafts.set(key, draft);
    else drafts.delete(key);
    kept.set(sketch, drafts);
    setState({ draft, isNew: true });
  };
  return { ...state, keep };
}
