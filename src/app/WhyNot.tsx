import type { Action } from '../store/action';
import { useStores } from '../store/react';

/** Under the name of an action that cannot be run now: the reason, where it has one. */
export function WhyNot({ action }: { readonly action: Action }) {
  const stores = useStores();
  const why = (action.when?.(stores) ?? true) ? undefined : action.whyNot?.(stores);
  return why === undefined ? null : <small className="why-not">{why}</small>;
}
