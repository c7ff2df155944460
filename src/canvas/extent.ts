import { hull } from '../drawing/boxes';
import { toSheet } from '../drawing/transform';
import type { Box, Point, Scene, UnitShape } from '../drawing/types';
import { anchorOf } from './lines';
import { SMALL, scaledAbout, steadyScale } from './quiet';

/** A flag keeps its size on the screen with the name inside; its port stays where the line ends. Undefined for others. */
export function flagPort(shape: UnitShape): Point | undefined {
  if (!shape.symbol.nameInside) return undefined;
  const port = shape.symbol.ports('out') ?? shape.symbol.ports('in');
  return port && toSheet(shape, port.at);
}

/** Box of everything as it is seen at a zoom: what keeps its size on the screen takes more of the sheet when zoomed out. */
function extentAt(scene: Scene, zoom: number): Box {
  const k = steadyScale(zoom);
  const lines = new Map(scene.lines.map((line) => [line.stream, line.points]));
  const flags = scene.units.flatMap((unit) => {
    const port = flagPort(unit);
    return port ? [scaledAbout(unit.box, port, k)] : [];
  });
  const labels = scene.labels.flatMap((label) => {
    const points = lines.get(label.stream);
    return points && !label.folded ? [scaledAbout(label.box, anchorOf(points, label.box), k)] : [];
  });
  return hull([scene.box, ...flags, ...labels]) ?? scene.box;
}

/** The zoom, 1 at most, at which the whole scene fits a view, and the scene's middle then. */
export function fitting(
  scene: Scene,
  width: number,
  height: number,
  least: number,
): { readonly zoom: number; readonly middle: Point } {
  const fits = (box: Box): number => Math.max(least, Math.min(1, width / box.w, height / box.h));
  // Labels go below a certain zoom: rather a flag near the edge than a sheet without numbers.
  const lowest = Math.min(SMALL, fits(scene.box));
  let zoom = 1;
  let box = scene.box;
  // What keeps its size needs more room the smaller the rest gets: a few rounds settle it.
  for (let round = 0; round < 4; round += 1) {
    box = extentAt(scene, zoom);
    zoom = Math.max(lowest, fits(box));
  }
  return { zoom, middle: [box.x + box.w / 2, box.y + box.h / 2] };
}
