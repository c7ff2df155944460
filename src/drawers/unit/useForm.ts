import { createContext, useContext, useLayoutEffect, useMemo, useRef, useSyncExternalStore } from 'react';
import type { Form } from './form';
import { type FormSource, Reads } from './reads';

const Context = createContext<FormSource | null>(null);
/** Hands the form down; the source stays the same while the unit changes. */
export const FormProvider = Context.Provider;

function useSource(): FormSource {
  const source = useContext(Context);
  if (!source) throw new Error('useForm outside a unit drawer');
  return source;
}

/** The unit's form; the view is drawn again when something that it asked of the form has another answer. */
export function useForm(): Form {
  const source = useSource();
  /** What was asked when the view was drawn last, and what React was told to be the form then. */
  const drawn = useRef<{ readonly reads: Reads; readonly told: Form } | null>(null);
  const told = useSyncExternalStore(source.subscribe, () => {
    const now = source.get();
    return drawn.current?.reads.holdsFor(now) ? drawn.current.told : now;
  });
  const reads = new Reads(source, source.get());
  useLayoutEffect(() => {
    reads.close();
    drawn.current = { reads, told };
  });
  return reads.noting();
}

/**
 * The form changed for what stands inside; made anew only when the form is another one.
 *
 * @param change  always the same function, or a memoised one
 */
export function useChanged(change: (form: Form) => Form): FormSource {
  const source = useSource();
  return useMemo(() => {
    let made: readonly [of: Form, form: Form] | undefined;
    return {
      subscribe: source.subscribe,
      get: () => {
        const now = source.get();
        if (made?.[0] !== now) made = [now, change(now)];
        return made[1];
      },
    };
  }, [source, change]);
}
