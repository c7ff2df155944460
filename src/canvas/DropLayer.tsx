import { memo } from 'react';
import { plainSymbol } from '../drawing/symbols/registry';
import { GRID } from '../drawing/tokens';
import { boxOnSheet, transformOf } from '../drawing/transform';
import type { Box, Point } from '../drawing/types';
import type { UnitId } from '../engine/ids';
import { Paths } from './Shapes';
import type { Dropping } from './sheetStore';
import { useSheet } from './sheetStore';

const NEAR = 96;
/** Every second point of the grid is shown. */
const STEP = 2 * GRID;

/** Grid points around a place, fading out is left to the eye: a disc of them. */
function gridPoints([x, y]: Point): Point[] {
  const out: Point[] = [];
  const [cx, cy] = [Math.round(x / STEP) * STEP, Math.round(y / STEP) * STEP];
  for (let dx = -NEAR; dx <= NEAR; dx += STEP)
    for (let dy = -NEAR; dy <= NEAR; dy += STEP) if (Math.hypot(dx, dy) <= NEAR) out.push([cx + dx, cy + dy]);
  return out;
}

/** Dotted lines through the middles that a moving unit shares with others. */
function guidesOf([x, y]: Point, others: readonly Point[]): string {
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
  const units = useSheet((state) => state.scene.units);
  const alone = moved?.size === 1 ? [...moved][0] : undefined;
  if (!dropping && !alone) return null;
  const at = dropping?.at ?? alone![1];
  const except: UnitId | undefined = alone?.[0];
  const others = units.filter((unit) => unit.unit !== except).map((unit) => unit.at);
  return (
    <>
      <svg className="ghost" aria-hidden="true">
        <g className="grid">
          {gridPoints(at).map(([x, y]) => (
            <circle key={`${x} ${y}`} cx={x} cy={y} r="0.8" />
          ))}
        </g>
        <path className="guide" d={guidesOf(at, others)} />
        {dropping ? <Ghost dropping={dropping} /> : null}
      </svg>
      {dropping && dropping.tip.length > 0 ? (
        <div className="tip-place" style={{ transform: `translate(${at[0]}px, ${at[1]}px)` }}>
          <div className="tip" role="tooltip">
            <b>{dropping.tip[0]}</b>
            {dropping.tip[1]}
          </div>
        </div>
      ) : null}
    </>
  );
});

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
