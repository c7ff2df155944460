import { memo } from 'react';
import { plainSymbol } from '../drawing/symbols/registry';
import { GRID } from '../drawing/tokens';
import { boxOnSheet, transformOf } from '../drawing/transform';
import type { Box, Point } from '../drawing/types';
import { Paths } from './Shapes';
import type { Dropping } from './sheetStore';
import { useSheet } from './sheetStore';

const NEAR = 96;
/** Every second point of the grid is shown. */
const STEP = 2 * GRID;

/** Grid points around a place, as dots of one path: a disc of them. */
function gridPoints([x, y]: Point): string {
  let d = '';
  const [cx, cy] = [Math.round(x / STEP) * STEP, Math.round(y / STEP) * STEP];
  for (let dx = -NEAR; dx <= NEAR; dx += STEP)
    for (let dy = -NEAR; dy <= NEAR; dy += STEP)
      if (Math.hypot(dx, dy) <= NEAR) d += `M${cx + dx} ${cy + dy}h0`;
  return d;
}

/** Dotted lines through the middles that a unit from the shelf shares with others. */
function sharedMiddles([x, y]: Point, others: readonly Point[]): string {
  const level = others.filter((p) => p[1] === y).map((p) => p[0]);
  const upright = others.filter((p) => p[0] === x).map((p) => p[1]);
  const across = level.length > 0 ? `M${Math.min(x, ...level)} ${y}H${Math.max(x, ...level)}` : '';
  const down = upright.length > 0 ? `M${x} ${Math.min(y, ...upright)}V${Math.max(y, ...upright)}` : '';
  return across + down;
}

/** What the hand sees while a unit is moved or comes from the shelf: grid, guides, the unit in accent, what will happen. */
export const DropLayer = memo(function DropLayer() {
  const dropping = useSheet((state) => state.dropping);
  const moved = useSheet((state) => state.moved);
  if (dropping) return <FromShelf dropping={dropping} />;
  const [first] = moved?.values() ?? [];
  return first ? <Moving at={first} /> : null;
});

function Moving({ at }: { readonly at: Point }) {
  const guide = useSheet((state) => state.guide);
  return (
    <svg className="ghost" aria-hidden="true">
      <path className="grid" d={gridPoints(at)} />
      <path className="guide" d={guide} />
    </svg>
  );
}

function FromShelf({ dropping }: { readonly dropping: Dropping }) {
  const units = useSheet((state) => state.scene.units);
  const { at, tip } = dropping;
  return (
    <>
      <svg className="ghost" aria-hidden="true">
        <path className="grid" d={gridPoints(at)} />
        <path
          className="guide"
          d={sharedMiddles(
            at,
            units.map((unit) => unit.at),
          )}
        />
        <Ghost dropping={dropping} />
      </svg>
      {tip.length > 0 ? (
        <div className="tip-place" style={{ transform: `translate(${at[0]}px, ${at[1]}px)` }}>
          <div className="tip" role="tooltip">
            <b>{tip[0]}</b>
            {tip[1]}
          </div>
        </div>
      ) : null}
    </>
  );
}

function Ghost({ dropping }: { readonly dropping: Dropping }) {
  const symbol = plainSymbol(dropping.kind);
  const ends = dropping.on === null ? [] : openEnds(dropping, symbol.box);
  return (
    <>
      {ends.map(([x, y]) => (
        <circle key={`${x} ${y}`} className="end" cx={x} cy={y} r="4" />
      ))}
      <g className="symbol" transform={transformOf(dropping)}>
        <Paths shapes={symbol.paths} />
      </g>
    </>
  );
}

/** Where the opened line will end and go on: beside the symbol, along the flow. */
function openEnds(dropping: Dropping, box: Box): readonly Point[] {
  const b = boxOnSheet(dropping, box);
  const [x, y] = dropping.at;
  return dropping.turn === 90 || dropping.turn === 270
    ? [
        [x, b.y - 20],
        [x, b.y + b.h + 20],
      ]
    : [
        [b.x - 20, y],
        [b.x + b.w + 20, y],
      ];
}
