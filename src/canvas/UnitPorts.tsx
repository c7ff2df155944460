import { memo } from 'react';
import { useShallow } from 'zustand/react/shallow';
import type { UnitId } from '../engine/ids';
import { useSession, useSketch, useStores, useUnit } from '../store/react';
import { capital, portWord } from '../wording';
import { pullByPointer } from './pointer';
import { isFree, portsOf } from './ports';
import { useSheet, useSheetStore } from './sheetStore';
import { useField } from './watch';

interface Props {
  readonly unit: UnitId;
  /** The corner of the node's box: port places are counted from it. */
  readonly x: number;
  readonly y: number;
}

/** Marks of the ports a stream can be pulled from, while the unit is under the pointer or selected alone. */
export const UnitPorts = memo(function UnitPorts({ unit, x, y }: Props) {
  const hovered = useField('hovered', (over) => over === unit);
  const alone = useSession(
    (state) => state.units.length === 1 && state.streams.length === 0 && state.units[0] === unit,
  );
  if (!hovered && !alone) return null;
  return <Marks unit={unit} x={x} y={y} />;
});

function Marks({ unit: id, x, y }: Props) {
  const stores = useStores();
  const sheet = useSheetStore();
  const unit = useUnit(id);
  const busy = useSheet((state) => state.pulling !== null || state.dropping !== null || state.moved !== null);
  const shape = useSheet((state) => state.units.get(id));
  const streams = useSketch(
    useShallow((state) => state.sketch.streams.filter((s) => s.from?.[0] === id || s.to?.[0] === id)),
  );
  if (!unit || busy) return null;
  return portsOf({ streams }, unit, shape)
    .filter(isFree)
    .map((port) => (
      <button
        key={port.port}
        type="button"
        tabIndex={-1}
        className="port nodrag nopan"
        data-port={port.port}
        aria-label={`${capital(portWord(unit.kind, port.port))} of ${unit.tag}: pull a stream`}
        title={capital(portWord(unit.kind, port.port))}
        style={{ left: port.place.at[0] - x, top: port.place.at[1] - y }}
        onPointerDown={(event) => pullByPointer(stores, sheet, port, event)}
      >
        <svg aria-hidden="true">
          <path d="M-3 -3H3V3H-3Z" />
        </svg>
      </button>
    ));
}
