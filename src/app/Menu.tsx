import { useEffect, useRef, useState } from 'react';
import { type Action, actingKeys, labelOf } from '../store/action';
import { useStores } from '../store/react';
import { WhyNot } from './WhyNot';

interface MenuButtonProps {
  readonly word: string;
  readonly actions: readonly Action[];
  /** Only what can be done now, or says why not: a long list would not fit a small screen. */
  readonly short?: true;
}

/** A word of the bar that unfolds a menu. The keyboard comes back to it, after Esc as well as after a choice. */
export function MenuButton({ word, actions, short }: MenuButtonProps) {
  const stores = useStores();
  const [open, setOpen] = useState(false);
  const button = useRef<HTMLButtonElement>(null);
  const listed = (action: Action): boolean =>
    (action.when?.(stores) ?? true) || action.whyNot?.(stores) !== undefined;
  const leave = (): void => {
    setOpen(false);
    button.current?.focus();
  };
  const choose = (action: Action): void => {
    leave();
    // What goes on by keys on the sheet (moving, bending) hears them only when nothing else has the focus.
    if (action.listens) button.current?.blur();
    action.run(stores);
  };
  return (
    <div className="menu-holder">
      <button
        type="button"
        className="button"
        ref={button}
        aria-haspopup="menu"
        aria-expanded={open}
        onClick={() => setOpen(!open)}
        onKeyDown={(event) => {
          if (event.key !== 'ArrowDown' || open) return;
          event.preventDefault();
          event.stopPropagation();
          setOpen(true);
        }}
      >
        {word}
      </button>
      {open ? (
        <Menu
          word={word}
          actions={short ? actions.filter(listed) : actions}
          leave={leave}
          away={() => setOpen(false)}
          choose={choose}
        />
      ) : null}
    </div>
  );
}

interface MenuProps {
  readonly word: string;
  readonly actions: readonly Action[];
  /** Closes it and gives the keyboard back. */
  readonly leave: () => void;
  /** Closes it; the keyboard goes on by itself. */
  readonly away: () => void;
  readonly choose: (action: Action) => void;
}

/** Where a key leads to in a menu, after the menu button pattern of the ARIA Authoring Practices Guide. */
function target(key: string, items: readonly HTMLElement[], at: number): HTMLElement | undefined {
  const turn = (k: number): HTMLElement | undefined => items[(k + items.length) % items.length];
  switch (key) {
    case 'ArrowDown':
      return turn(at + 1);
    case 'ArrowUp':
      return turn(at < 0 ? -1 : at - 1);
    case 'Home':
      return items[0];
    case 'End':
      return items.at(-1);
    default: {
      const from = items.slice(at + 1).concat(items.slice(0, at + 1));
      return from.find((item) => item.textContent?.toLowerCase().startsWith(key.toLowerCase()));
    }
  }
}

function Menu({ word, actions, leave, away, choose }: MenuProps) {
  const stores = useStores();
  const { singleKeys } = stores.session.getState();
  const menu = useRef<HTMLDivElement>(null);
  const items = (): readonly HTMLElement[] => [
    ...(menu.current?.querySelectorAll<HTMLElement>('[role=menuitem]:not(:disabled)') ?? []),
  ];
  // biome-ignore lint/correctness/useExhaustiveDependencies: once, when it opens
  useEffect(() => items()[0]?.focus(), []);
  const press = (event: React.KeyboardEvent): void => {
    if (event.key === 'Tab') {
      away();
      return;
    }
    const plain =
      event.key.length === 1 && event.key !== ' ' && !event.ctrlKey && !event.metaKey && !event.altKey;
    if (event.key === 'Escape') leave();
    else if (plain || /^(Arrow(Down|Up)|Home|End)$/.test(event.key)) {
      const all = items();
      target(event.key, all, all.indexOf(document.activeElement as HTMLElement))?.focus();
    } else return;
    // What is pressed in a menu is the menu's: no action behind it runs.
    event.preventDefault();
    event.stopPropagation();
  };
  return (
    <>
      <button type="button" className="menu-away" aria-label="Close the menu" tabIndex={-1} onClick={away} />
      <div className="menu" role="menu" aria-label={word} tabIndex={-1} ref={menu} onKeyDown={press}>
        {actions.map((action) => (
          <button
            key={action.id}
            type="button"
            role="menuitem"
            disabled={!(action.when?.(stores) ?? true)}
            onClick={() => choose(action)}
          >
            <span>
              {labelOf(action, stores)}
              <WhyNot action={action} />
            </span>
            <kbd>{actingKeys(action, singleKeys)[0] ?? ''}</kbd>
          </button>
        ))}
      </div>
    </>
  );
}
