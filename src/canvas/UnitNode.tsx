import { memo, type ReactNode, useMemo } from 'react';
import type { NodeProps } from 'reactflow';
import { limitMark } from '../drawing/marks';
import { transformOf } from '../drawing/transform';
import type { UnitShape } from '../drawing/types';
import type { UnitId } from '../engine/ids';
import { useSession } from '../store/react';
import { isPointed } from './choose';
import { flagPort } from './extent';
import { nodeBox } from './nodes';
import { drawPaths, drawSteady, drawText } from './Shapes';
import { useSheetStore } from './sheetStore';
import { UnitPorts } from './UnitPorts';
import { useField, useItem } from './watch';

/** One unit on the sheet. It listens to its own shape, name and selection, to nothing else. */
export const UnitNode = memo(function UnitNode({ id }: NodeProps) {
  const unit = id as UnitId;
  const store = useSheetStore();
  const shape = useItem('units', unit);
  const name = useItem('unitNames', unit);
  const quietDuty = useField('quiet', ({ duties }) => duties);
  const selected = useSession((state) => state.units.includes(unit));
  const pointed = useSession((state) => isPointed(state, unit));
  const entry = useSession((state) => isEntry(state.units, state.streams, unit));
  const first = useField('scene', ({ units }) => units[0]?.unit === unit);
  const showDuty = !quietDuty || selected;
  const drawing = useMemo(() => (shape ? drawUnit(shape, showDuty) : null), [shape, showDuty]);
  if (!shape) return null;
  const box = nodeBox(shape);
  return (
    <div
      className="unit"
      data-unit={shape.tag}
      data-kind={shape.kind}
      data-state={shape.state}
      data-selected={selected || pointed || undefined}
      onPointerEnter={() => store.setState({ hovered: unit })}
      onPointerLeave={() => {
        if (store.getState().hovered === unit) store.setState({ hovered: null });
      }}
    >
      <svg className="unit-drawing" aria-hidden="true" style={{ left: -box.x, top: -box.y }}>
        {drawing}
      </svg>
      <button
        type="button"
        className="unit-body"
        tabIndex={entry || (entry === null && first) ? 0 : -1}
        aria-label={name}
        title={name}
        aria-pressed={selected}
        data-focus-unit={unit}
      />
      <UnitPorts unit={unit} x={box.x} y={box.y} />
    </div>
  );
});

/** Whether Tab enters the sheet at this unit: at the selected one; null while nothing is selected. */
const isEntry = (units: readonly string[], streams: readonly string[], unit: UnitId): boolean | null =>
  units.length + streams.length === 0 ? null : units[0] === unit;

/** Drawn as a part of the unit's view: one view a unit, however many strokes and texts it has. */
function drawUnit(shape: UnitShape, showDuty: boolean): ReactNode {
  const stale = shape.state === 'out-of-date';
  const { tagText: tag, limit } = shape;
  const flag = flagPort(shape);
  const symbol = (
    <>
      <g className="symbol" transform={transformOf(shape)}>
        {drawPaths(shape.symbol.paths)}
      </g>
      {shape.texts.map((text) => drawText(text))}
    </>
  );
  return (
    <>
      {shape.links.map(({ name, line, marks }) => (
        <g key={name}>{drawPaths([line, ...marks])}</g>
      ))}
      {flag ? drawSteady(flag, shape.flagUpTo, symbol) : symbol}
      {shape.links.map(({ name, text }) =>
        text && showDuty ? drawSteady(text.at, undefined, drawText(text, stale), name) : null,
      )}
      {drawSteady(
        shape.hold,
        shape.tagUpTo,
        <>
          {showDuty ? shape.remarks.map((remark) => drawText(remark, stale)) : null}
          {tag ? drawText({ ...tag, halo: true }) : null}
          {drawPaths(shape.stateMark)}
          {limit ? (
            <g transform={`translate(${limit.at[0]} ${limit.at[1]})`}>{drawPaths(limitMark(limit.weight))}</g>
          ) : null}
        </>,
      )}
    </>
  );
}
