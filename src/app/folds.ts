import { remember, remembered, type WindowClass, windowClass } from '../store/remembered';
import type { Session, SessionState } from '../store/session';

const FOLDS = { shelfFolded: 'shelf', balanceFolded: 'balance' } as const;
type Fold = keyof typeof FOLDS;
const KEYS: readonly Fold[] = ['shelfFolded', 'balanceFolded'];

const keyOf = (fold: Fold, at: WindowClass): string => `folded.${FOLDS[fold]}.${at}`;

/**
 * Keeps what is folded for each class of window width: what was chosen in a narrow window does not fold a wide one.
 * Returns a function that stops it.
 */
export function keepFolds(session: Session): () => void {
  let at = windowClass(window.innerWidth);
  let loading = false;
  const load = (): void => {
    const folds: Partial<Record<Fold, boolean>> = {};
    for (const fold of KEYS) folds[fold] = remembered(keyOf(fold, at)) === 'yes';
    loading = true;
    session.setState(folds as Pick<SessionState, Fold>);
    loading = false;
  };
  const resized = (): void => {
    const now = windowClass(window.innerWidth);
    if (now === at) return;
    at = now;
    load();
  };
  load();
  window.addEventListener('resize', resized);
  const unsubscribe = session.subscribe((state, before) => {
    if (loading) return;
    for (const fold of KEYS)
      if (state[fold] !== before[fold]) remember(keyOf(fold, at), state[fold] ? 'yes' : 'no');
  });
  return () => {
    window.removeEventListener('resize', resized);
    unsubscribe();
  };
}
