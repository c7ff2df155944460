import { hull } from '../drawing/boxes';
import { toSheet } from '../drawing/transform';
import type { Box, Point, Scene, UnitShape } from '../drawing/types';
import { SMALL } from './quiet';

/** A flag keeps its size on the screen with the name inside; its port stays where the line ends. Undefined for others. */
export function flagPort(shape: UnitShape): Point | undefined {
  if (!shape.symbol.nameInside) return undefined;
  const port = shape.symbol.ports('out') ?? shape.symbol.ports('in');
  return port && toSheet(shape, port.at);
}

/**
 * The zoom, 1 at most, at which the whole scene fits a view, and the scene's middle then. The scene was built for a text
 * scale: where the zoom asks for another one, it is built anew and asked again.
 */
export function fitting(
  scene: Scene,
  width: number,
  height: number,
  least: number,
): { readonly zoom: number; readonly middle: Point } {
  const fits = (box: Box): number => Math.max(least, Math.min(1, width / box.w, height / box.h));
  // Labels go below a certain zoom: rather a flag near the edge than a sheet without numbers.
  const bare = hull(scene.units.map((unit) => unit.box)) ?? scene.box;
  const lowest = Math.min(SMALL, fits(bare));
  const { box } = scene;
  return { zoom: Math.max(lowest, fits(box)), middle: [box.x + box.w / 2, box.y + box.h / 2] };
}
