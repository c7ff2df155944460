import type { UnitId } from '../engine/ids';
import type { KindCatalogue } from '../engine/units/types';
import type { Sketch } from '../sketch/types';
import { portOf, type StandingUnit, standingUnits } from './standing';
import type { Box, Point, Side } from './types';

/** The part of a layout engine's graph that is used; positions are of upper left corners [px]. */
export interface LayoutGraph {
  id: string;
  layoutOptions?: Record<string, string>;
  children?: LayoutNode[];
  edges?: { id: string; sources: string[]; targets: string[] }[];
}
export interface LayoutNode {
  id: string;
  x?: number;
  y?: number;
  width: number;
  height: number;
  ports?: LayoutPort[];
  layoutOptions?: Record<string, string>;
}
interface LayoutPort {
  id: string;
  x: number;
  y: number;
  width: number;
  height: number;
  layoutOptions: Record<string, string>;
}
/** A graph that was laid out: only the places of its nodes are read. */
export interface LaidOut {
  children?: { id: string; x?: number; y?: number }[];
}

/** Room above a symbol for its tag, below it for its link and duty, beside it [px]. */
const ROOM = { above: 40, below: 24, beside: 8 } as const;
/** Between layers: a diamond with its label, and lines that turn. */
const BETWEEN = '112';

const OPTIONS: Record<string, string> = {
  'elk.algorithm': 'layered',
  'elk.direction': 'RIGHT',
  'elk.edgeRouting': 'ORTHOGONAL',
  'elk.randomSeed': '1',
  'elk.padding': '[top=0,left=0,bottom=0,right=0]',
  // With the default the recycle is cut in a bad place and the feed lands in mid-sheet.
  'elk.layered.cycleBreaking.strategy': 'DEPTH_FIRST',
  'elk.layered.feedbackEdges': 'true',
  'elk.layered.considerModelOrder.strategy': 'NODES_AND_EDGES',
  'elk.layered.nodePlacement.strategy': 'NETWORK_SIMPLEX',
  'elk.layered.nodePlacement.favorStraightEdges': 'true',
  'elk.layered.spacing.nodeNodeBetweenLayers': BETWEEN,
  'elk.layered.spacing.edgeNodeBetweenLayers': '40',
  'elk.layered.spacing.edgeEdgeBetweenLayers': '16',
  'elk.spacing.nodeNode': '48',
  'elk.spacing.edgeNode': '40',
  'elk.spacing.edgeEdge': '24',
  'elk.spacing.componentComponent': '96',
  'elk.aspectRatio': '1.6',
};

const ELK_SIDE: Readonly<Record<Side, string>> = {
  left: 'WEST',
  right: 'EAST',
  top: 'NORTH',
  bottom: 'SOUTH',
};

/** Symbol, links and the room of what is written beside them, on the sheet. */
export function roomOf({ box, linkBoxes, symbol }: StandingUnit): Box {
  if (symbol.sides) return { x: box.x - 8, y: box.y - 8, w: box.w + 16, h: box.h + 16 };
  const right = Math.max(box.x + box.w, ...linkBoxes.map((b) => b.x + b.w)) + ROOM.beside;
  const left = Math.min(box.x, ...linkBoxes.map((b) => b.x)) - ROOM.beside;
  const top = Math.min(box.y, ...linkBoxes.map((b) => b.y)) - (symbol.tagless ? 16 : ROOM.above);
  const bottom =
    Math.max(box.y + box.h, ...linkBoxes.map((b) => b.y + b.h)) + (symbol.tagless ? 16 : ROOM.below);
  return { x: left, y: top, w: right - left, h: bottom - top };
}

/** Ports of a unit that streams use, on the border of its room, where their lines leave it. */
function portsOf(unit: StandingUnit, names: ReadonlySet<string>): LayoutPort[] {
  const room = roomOf(unit);
  return [...names].flatMap((name) => {
    const place = portOf(unit, name);
    if (!place) return [];
    const [x, y] = [place.at[0] - room.x, place.at[1] - room.y];
    const at: Readonly<Record<Side, Point>> = {
      left: [0, y],
      right: [room.w, y],
      top: [x, 0],
      bottom: [x, room.h],
    };
    return [
      {
        id: `${unit.unit.id} ${name}`,
        x: at[place.side][0],
        y: at[place.side][1],
        width: 0,
        height: 0,
        layoutOptions: { 'elk.port.side': ELK_SIDE[place.side] },
      },
    ];
  });
}

/** A sketch as a graph to be laid out, and its units as they stand now. */
export function graphOf(
  sketch: Sketch,
  kinds: Readonly<Record<string, KindCatalogue>>,
): { readonly graph: LayoutGraph; readonly standing: readonly StandingUnit[] } {
  const standing = standingUnits(sketch, kinds);
  const byId = new Map(standing.map((u) => [u.unit.id, u]));
  const used = new Map<UnitId, Set<string>>(standing.map((u) => [u.unit.id, new Set()]));
  for (const { from, to } of sketch.streams) {
    if (from) used.get(from[0])?.add(from[1]);
    if (to) used.get(to[0])?.add(to[1]);
  }
  /** A dot's lines choose their sides once it stands: it has no ports of its own here. */
  const hasPort = (unit: StandingUnit, name: string): boolean =>
    !unit.symbol.sides && portOf(unit, name) !== undefined;
  const endOf = ([id, port]: readonly [UnitId, string]): string | undefined => {
    const unit = byId.get(id);
    return unit && (hasPort(unit, port) ? `${id} ${port}` : id);
  };
  const edges = sketch.streams.flatMap(({ id, from, to }) => {
    const [source, target] = [from && endOf(from), to && endOf(to)];
    return source && target ? [{ id: `stream ${id}`, sources: [source], targets: [target] }] : [];
  });
  const children = standing.map((u): LayoutNode => {
    const { w, h } = roomOf(u);
    const node = { id: u.unit.id, width: w, height: h };
    if (u.symbol.sides) return node;
    return {
      ...node,
      ports: portsOf(u, used.get(u.unit.id)!),
      layoutOptions: { 'elk.portConstraints': 'FIXED_POS' },
    };
  });
  return { graph: { id: 'sheet', layoutOptions: OPTIONS, children, edges }, standing };
}

/** Origins of the units in a graph that was laid out, not yet on the grid. */
export function placesIn(graph: LaidOut, standing: readonly StandingUnit[]): ReadonlyMap<UnitId, Point> {
  const nodes = new Map((graph.children ?? []).map((node) => [node.id, node]));
  return new Map(
    standing.map((u): [UnitId, Point] => {
      const { x = 0, y = 0 } = nodes.get(u.unit.id) ?? {};
      const room = roomOf(u);
      const [ax, ay] = u.pose.at;
      return [u.unit.id, [x + ax - room.x, y + ay - room.y]];
    }),
  );
}
