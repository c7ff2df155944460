import { useEffect, useId, useLayoutEffect, useMemo, useRef, useState } from 'react';
import { describeStream } from '../../store/commands';
import { useCompiled, useSketch, useStores } from '../../store/react';
import { kindWord } from '../../wording';
import { goTo } from './goTo';
import type { Names } from './things';
import './find.css';

type Finding = typeof import('./finding');

export const NAMES: Names = { kind: kindWord, stream: describeStream };

/** What finds and lists is fetched when it is first asked for; what is typed meanwhile is not lost. */
function useFinding(): Finding | null {
  const { session } = useStores();
  const [part, setPart] = useState<Finding | null>(null);
  useEffect(() => {
    let alive = true;
    import('./finding').then(
      (loaded) => alive && setPart(loaded),
      (error: unknown) => {
        if (!alive) return;
        session.setState({ over: 'none' });
        session.say('caution', 'The search could not be fetched.', [
          `Reload the page when the network is there again. (${error instanceof Error ? error.message : error})`,
        ]);
      },
    );
    return () => {
      alive = false;
    };
  }, [session]);
  return part;
}

/** Takes the focus, and gives it back to where it was. */
function useFocus() {
  const field = useRef<HTMLInputElement>(null);
  const cameFrom = useRef<Element | null>(null);
  const stands = useRef(false);
  // At once: what is typed next belongs here. Once more when a dialogue that led here has gone with the focus.
  useLayoutEffect(() => {
    cameFrom.current ??= document.activeElement;
    field.current?.focus();
  }, []);
  useEffect(() => {
    field.current?.focus();
    stands.current = true;
  }, []);
  const giveBack = (): void => {
    if (cameFrom.current instanceof HTMLElement && cameFrom.current.isConnected)
      cameFrom.current.focus({ preventScroll: true });
  };
  return { field, stands, giveBack };
}

/**
 * A small field over the sheet: a tag, a name, a stream or a chemical is typed, arrows walk through what is found, Enter
 * goes there, Esc leaves it.
 */
export function FindField() {
  const stores = useStores();
  const sketch = useSketch((state) => state.sketch);
  const chemicals = useCompiled((state) => state.basis?.chemicals);
  const part = useFinding();
  const { field, stands, giveBack } = useFocus();
  const [text, setText] = useState('');
  const [at, setAt] = useState(0);
  /** Enter came before there was anything to find with. */
  const [asked, setAsked] = useState(false);
  const id = useId();
  const things = useMemo(
    () => part?.thingsOf(sketch, chemicals ?? [], NAMES) ?? [],
    [part, sketch, chemicals],
  );
  const found = useMemo(
    () => (text.trim() === '' ? [] : (part?.findThings(things, text) ?? [])),
    [part, things, text],
  );

  const close = (): void => stores.session.setState({ over: 'none' });
  const go = (k: number): void => {
    const thing = found[k];
    if (!part) setAsked(true);
    if (!part || !thing) return;
    // First, so that a drawer knows where the keyboard came from.
    giveBack();
    goTo(stores, thing.target);
  };
  // biome-ignore lint/correctness/useExhaustiveDependencies: once, when what was waited for is there
  useEffect(() => {
    if (asked && part) go(0);
  }, [asked, part]);
  const leave = (event: React.FocusEvent<HTMLElement>): void => {
    // Another window is no reason to close it, nor is a dialogue that led here and takes the focus with it.
    const to = event.relatedTarget;
    const isAway = to ? !event.currentTarget.contains(to) : document.hasFocus();
    if (isAway && stands.current && stores.session.getState().over === 'find') close();
  };
  const keys = (event: React.KeyboardEvent<HTMLInputElement>): void => {
    const last = found.length - 1;
    if (event.key === 'ArrowDown') setAt(at >= last ? 0 : at + 1);
    else if (event.key === 'ArrowUp') setAt(at <= 0 ? Math.max(0, last) : at - 1);
    else if (event.key === 'Enter') go(at);
    else if (event.key === 'Escape') {
      close();
      giveBack();
    } else return;
    event.preventDefault();
    event.stopPropagation();
  };

  return (
    // biome-ignore lint/a11y/useSemanticElements: not every browser in use knows the element
    <div className="find" role="search" aria-label="Find on the sheet" onBlur={leave}>
      <input
        type="text"
        role="combobox"
        ref={field}
        className="plain-field"
        aria-label="Find: tag, name, stream or chemical"
        aria-autocomplete="list"
        aria-expanded={found.length > 0}
        aria-controls={`${id}-list`}
        aria-activedescendant={found.length > 0 ? `${id}-${at}` : undefined}
        autoComplete="off"
        spellCheck={false}
        placeholder="Find: tag, name, stream or chemical"
        value={text}
        onChange={(event) => {
          setText(event.target.value);
          setAt(0);
          setAsked(false);
        }}
        onKeyDown={keys}
      />
      {part ? (
        <part.FoundList id={id} found={found} at={at} isBlank={text.trim() === ''} onChoose={go} />
      ) : null}
    </div>
  );
}
