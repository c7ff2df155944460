import { Fragment, memo, useMemo } from 'react';
import type { NodeProps } from 'reactflow';
import { limitMark } from '../drawing/marks';
import { transformOf } from '../drawing/transform';
import type { UnitShape } from '../drawing/types';
import type { UnitId } from '../engine/ids';
import { useSession } from '../store/react';
import { isPointed } from './choose';
import { flagPort } from './extent';
import { nodeBox } from './nodes';
import { Paths, Steady, Text } from './Shapes';
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
        <Drawing shape={shape} showDuty={!quietDuty || selected} />
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
      <UnitPorts unit={unit} origin={box} />
    </div>
  );
});

/** Whether Tab enters the sheet at this unit: at the selected one; null while nothing is selected. */
const isEntry = (units: readonly string[], streams: readonly string[], unit: UnitId): boolean | null =>
  units.length + streams.length === 0 ? null : units[0] === unit;

const Drawing = memo(function Drawing({
  shape,
  showDuty,
}: {
  readonly shape: UnitShape;
  readonly showDuty: boolean;
}) {
  const stale = shape.state === 'out-of-date';
  const tag = shape.tagText;
  const limit = useMemo(() => (shape.limit ? limitMark(shape.limit.weight) : []), [shape.limit]);
  const flag = flagPort(shape);
  const symbol = (
    <>
      <g className="symbol" transform={transformOf(shape)}>
        <Paths shapes={shape.symbol.paths} />
      </g>
      {shape.texts.map((text) => (
        <Text key={text.text} shape={text} />
      ))}
    </>
  );
  return (
    <>
      {shape.links.map(({ name, line, marks }) => (
        <Fragment key={name}>
          <Paths shapes={[line]} />
          <Paths shapes={marks} />
        </Fragment>
      ))}
      {flag ? (
        <Steady about={flag} upTo={shape.flagUpTo}>
          {symbol}
        </Steady>
      ) : (
        symbol
      )}
      {shape.links.map(({ name, text }) =>
        text && showDuty ? (
          <Steady key={name} about={text.at}>
            <Text shape={text} stale={stale} />
          </Steady>
        ) : null,
      )}
      <Steady about={shape.hold} upTo={shape.tagUpTo}>
        {showDuty
          ? shape.remarks.map((remark) => <Text key={remark.at[1]} shape={remark} stale={stale} />)
          : null}
        {tag ? <Text shape={{ ...tag, halo: true }} /> : null}
        <Paths shapes={shape.stateMark} />
        {shape.limit ? (
          <g transform={`translate(${shape.limit.at[0]} ${shape.limit.at[1]})`}>
            <Paths shapes={limit} />
          </g>
        ) : null}
      </Steady>
    </>
  );
});
