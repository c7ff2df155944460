import { useEffect } from 'react';
import type { FoundThing } from './things';

interface Props {
  readonly id: string;
  readonly found: readonly FoundThing[];
  /** The one that Enter takes. */
  readonly at: number;
  readonly isBlank: boolean;
  readonly onChoose: (k: number) => void;
}

/** What was found: name and kind, the best first; the count is read out. */
export function FoundList({ id, found, at, isBlank, onChoose }: Props) {
  useEffect(() => {
    document.getElementById(`${id}-${at}`)?.scrollIntoView?.({ block: 'nearest' });
  }, [id, at]);
  return (
    <>
      <div role="listbox" id={`${id}-list`} aria-label="Found" hidden={found.length === 0}>
        {found.map(({ target, name, about }, k) => (
          <div
            key={Object.entries(target).join()}
            id={`${id}-${k}`}
            role="option"
            tabIndex={-1}
            aria-selected={k === at}
            onPointerDown={(event) => {
              // The field keeps the focus until one has gone.
              event.preventDefault();
              onChoose(k);
            }}
          >
            <span>{name}</span> <span className="muted">{about}</span>
          </div>
        ))}
      </div>
      <p className="muted" role="status">
        {isBlank
          ? 'Arrows choose, Enter goes there, Esc leaves.'
          : found.length === 0
            ? 'Nothing here goes by these words.'
            : `${found.length} found`}
      </p>
    </>
  );
}
