import { memo } from 'react';
import { useShallow } from 'zustand/react/shallow';
import type { StreamId } from '../engine/ids';
import { useSession, useStores } from '../store/react';
import { chooseStream, isPointed } from './choose';
import { useSheet } from './sheetStore';
import { useField, useItem } from './watch';

/** Every stream's line, hanging ones too, in one layer below the units. */
export const Lines = memo(function Lines() {
  const ids = useSheet(useShallow((state) => state.scene.lines.map((line) => line.stream)));
  return (
    <svg className="lines" aria-hidden="true">
      {ids.map((id) => (
        <Line key={id} id={id} />
      ))}
    </svg>
  );
});

const Line = memo(function Line({ id }: { readonly id: StreamId }) {
  const stores = useStores();
  const line = useItem('lines', id);
  const selected = useSession((state) => state.streams.includes(id) || isPointed(state, id));
  const opening = useField('dropping', (dropping) => dropping?.on === id);
  if (!line) return null;
  return (
    <g
      className="line"
      data-line={line.number}
      data-selected={selected || undefined}
      data-opening={opening || undefined}
    >
      {/* biome-ignore lint/a11y/noStaticElementInteractions: the line's diamond is the way in for keys */}
      <path className="line-hit" d={line.d} onClick={(event) => chooseStream(stores, id, event)} />
      <path className="line-drawn" d={line.d} />
      {line.head ? <path className="line-head" d={line.head} /> : null}
    </g>
  );
});
