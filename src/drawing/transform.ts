import type { SketchUnit } from '../sketch/types';
import type { Box, Point, PortPlace, Side, UnitShape } from './types';

export type Turn = 0 | 90 | 180 | 270;

/** How a symbol stands on the sheet: mirrored left to right first, then turned clockwise, then moved. */
export interface Pose {
  readonly at: Point;
  readonly turn: Turn;
  readonly mirror: boolean;
}

export const poseOf = (unit: SketchUnit): Pose => ({
  at: unit.at,
  turn: unit.turn ?? 0,
  mirror: unit.mirror === true,
});

/** Unit vector of a side, y down. */
export const AWAY: Readonly<Record<Side, Point>> = {
  right: [1, 0],
  bottom: [0, 1],
  left: [-1, 0],
  top: [0, -1],
};
/** Direction of travel away from a side: right, down, left, up. */
export const HEADING: Readonly<Record<Side, 0 | 1 | 2 | 3>> = { right: 0, bottom: 1, left: 2, top: 3 };
const ROUND: readonly Side[] = ['right', 'bottom', 'left', 'top'];

export const opposite = (side: Side): Side => ROUND[(ROUND.indexOf(side) + 2) % 4]!;

/** A point of the symbol's own coordinates, on the sheet. */
export const toSheet = (pose: Pose, [px, py]: Point): Point => {
  const [ax, ay] = pose.at;
  const x = pose.mirror ? -px : px;
  switch (pose.turn) {
    case 0:
      return [ax + x, ay + py];
    case 90:
      return [ax - py, ay + x];
    case 180:
      return [ax - x, ay - py];
    case 270:
      return [ax + py, ay - x];
  }
};

/** A side of the symbol, as it stands on the sheet. */
export const sideOnSheet = (pose: Pose, side: Side): Side => {
  const mirrored = pose.mirror && (side === 'left' || side === 'right') ? opposite(side) : side;
  return ROUND[(ROUND.indexOf(mirrored) + pose.turn / 90) % 4]!;
};

export const boxOnSheet = (pose: Pose, box: Box): Box => {
  const [x1, y1] = toSheet(pose, [box.x, box.y]);
  const [x2, y2] = toSheet(pose, [box.x + box.w, box.y + box.h]);
  return { x: Math.min(x1, x2), y: Math.min(y1, y2), w: Math.abs(x2 - x1), h: Math.abs(y2 - y1) };
};

export const portOnSheet = (pose: Pose, port: PortPlace): PortPlace => ({
  ...port,
  at: toSheet(pose, port.at),
  side: sideOnSheet(pose, port.side),
});

/** Where a drawn unit's port is on the sheet; undefined when it has no such port. */
export const portOfShape = (shape: UnitShape, name: string): PortPlace | undefined => {
  const port = shape.symbol.ports(name);
  return port && portOnSheet(shape, port);
};

/** The same pose as an SVG transform for the symbol's own paths. */
export const transformOf = ({ at: [x, y], turn, mirror }: Pose): string =>
  `translate(${x} ${y})${turn ? ` rotate(${turn})` : ''}${mirror ? ' scale(-1 1)' : ''}`;
