import type { Port, StreamId, UnitId } from '../engine/ids';
import type { Weight } from '../engine/outcome';
import type { KindCatalogue } from '../engine/units/types';

/** Sheet coordinates in px at 100 %, y down. */
export type Point = readonly [number, number];
export interface Box {
  readonly x: number;
  readonly y: number;
  readonly w: number;
  readonly h: number;
}

export type Ink =
  | 'ink'
  | 'ink2'
  | 'ink3'
  | 'hair'
  | 'rule'
  | 'paper'
  | 'accent'
  | 'caution'
  | 'caution-wash'
  | 'beyond'
  | 'on-beyond';
/** One stroke or fill of a symbol, in the symbol's own coordinates (origin in its middle). */
export interface PathShape {
  readonly d: string;
  /** Line weights of the tokens: outline 1.5, detail 1, heat link 1.2. 0: no stroke. */
  readonly width: number;
  readonly stroke: Ink | 'none';
  readonly fill: Ink | 'none';
  readonly dash?: string;
}
export type Side = 'left' | 'right' | 'top' | 'bottom';
export interface PortPlace {
  readonly at: Point;
  /** The side a line leaves or enters. */
  readonly side: Side;
  /** The drawn line runs on inward by this much beyond the port, to the edge of a dot. */
  readonly reach?: number;
}
/** A heat link, which ends in a ring, or a shaft link, which ends in a double bar: from the symbol outward, in its own coordinates. */
export interface LinkData {
  /** What it is called in the texts of a scene: "heat" or "shaft"; a column has a "condenser" and a "reboiler". */
  readonly name: string;
  /** Absent: heat. */
  readonly carries?: 'shaft';
  readonly from: Point;
  readonly to: Point;
  /** Where the arrowhead points; none when the direction is a result. */
  readonly flow: 'in' | 'out' | 'none';
}
export interface SymbolData {
  /** Bounding box of the drawn outline, origin inside it. */
  readonly box: Box;
  readonly paths: readonly PathShape[];
  /** Where each port lies; numbered ports by stem: place of number k. */
  ports(name: Port): PortPlace | undefined;
  /** Draws the unit's name inside (feed, product). */
  readonly nameInside?: boolean;
  /** Middle of the name inside. */
  readonly nameAt?: Point;
  readonly links?: readonly LinkData[];
  /** Lines may choose among these places, whatever their port's name (join, divide). */
  readonly sides?: readonly PortPlace[];
  /** No tag is drawn (join, divide, feed, product). */
  readonly tagless?: boolean;
}

/** State as drawn under the tag; the fifth is the page's own. */
export type DrawnState = 'solved' | 'needs-value' | 'waiting' | 'no-solution' | 'out-of-date';

export interface TextShape {
  readonly at: Point;
  readonly text: string;
  readonly size: number;
  readonly weight: 400 | 600;
  readonly italic?: boolean;
  readonly anchor: 'start' | 'middle' | 'end';
  readonly ink: Ink;
  readonly halo?: boolean;
}

/**
 * A unit, placed. Everything is in sheet coordinates, save `symbol`, which is drawn through
 * `transformOf(shape)` (transform.ts).
 */
export interface UnitShape {
  readonly unit: UnitId;
  readonly tag: string;
  readonly kind: string;
  readonly at: Point;
  readonly turn: 0 | 90 | 180 | 270;
  readonly mirror: boolean;
  readonly symbol: SymbolData;
  /** The symbol's box after turning and mirroring. */
  readonly box: Box;
  readonly state: DrawnState;
  /** Tag text and the mark under it, if a tag is drawn. */
  readonly tagText?: TextShape;
  readonly stateMark: readonly PathShape[];
  /** Symbol shown upright even when turned (names of feeds and products). */
  readonly texts: readonly TextShape[];
  /** Heat and shaft links with their end marks and arrowheads (marks), each with its duty or power where it has room. */
  readonly links: readonly LinkShape[];
  /** Under the tag, where they have room: "32 stages". */
  readonly remarks: readonly TextShape[];
  /** Middle of the 16 px mark (marks.ts draws it). */
  readonly limit?: { readonly weight: Weight; readonly at: Point };
  /** Tag, state, limit mark and remarks keep their size on the screen: they grow about this point ... */
  readonly hold: Point;
  /** ... up to this text scale, for more has no room. */
  readonly tagUpTo: number;
  /** A flag with its name inside grows about its port up to this text scale. */
  readonly flagUpTo: number;
}

/** A link as it is drawn. Its text keeps its size on the screen about its own point. */
export interface LinkShape {
  readonly name: string;
  readonly line: PathShape;
  readonly marks: readonly PathShape[];
  readonly text?: TextShape;
}

export interface LineShape {
  readonly stream: StreamId;
  readonly number: string;
  /** Port, bends, port: orthogonal, no rounding. */
  readonly points: readonly Point[];
  /** Path with rounded bends and bridges; ends inside the arrowhead. */
  readonly d: string;
  /** Tip of the arrowhead and the side it points to. */
  readonly arrow?: { readonly at: Point; readonly side: Side };
  /** Filled arrowhead, 9 x 7. */
  readonly head?: string;
  readonly diamond?: Point;
  /** Hanging: no target. */
  readonly hanging: boolean;
}

export interface LabelRow {
  readonly number: string;
  readonly unit: string;
}
/**
 * A stream's label, as it is at 100 %. It keeps its size on the screen: at another text scale all of it, the leader line
 * included, is scaled about `hold`.
 */
export interface LabelShape {
  readonly stream: StreamId;
  readonly box: Box;
  /** A point of its line, or the middle of its diamond when there is a leader line. */
  readonly hold: Point;
  /** Thin line from the diamond to a label that has no room beside it. */
  readonly leader?: readonly [Point, Point];
  readonly rows: readonly LabelRow[];
  /** x where numbers end (right-aligned) and where units start. */
  readonly numberRight: number;
  readonly unitLeft: number;
  /** Baseline of the first row; the next ones follow by 13 px. */
  readonly baseline: number;
  /** No place where it could only be read as its own stream's: left off, opens on hover or focus. */
  readonly folded: boolean;
  /** Numbers of an out-of-date unit: drawn in ink3 and italic. */
  readonly stale: boolean;
}

/** A text note, or an area: a dashed border with its name inside, behind everything. */
export interface NoteShape {
  readonly id: string;
  readonly kind: 'text' | 'area';
  readonly box: Box;
  readonly border?: PathShape;
  readonly texts: readonly TextShape[];
  /** Its text keeps its size on the screen about this point, up to this text scale. */
  readonly hold: Point;
  readonly upTo: number;
}

/** What is left off for want of room. */
export type Omitted =
  | { readonly what: 'label'; readonly stream: StreamId }
  | { readonly what: 'tag' | 'remark'; readonly unit: UnitId }
  | { readonly what: 'duty'; readonly unit: UnitId; readonly link: string };

/** Everything on the sheet, placed. Canvas and PDF draw the same scene. */
export interface Scene {
  /** Around all of it, at the text scale. */
  readonly box: Box;
  /** Nothing overlaps at this text scale, nor at a smaller one about the same points. */
  readonly textScale: number;
  readonly units: readonly UnitShape[];
  readonly lines: readonly LineShape[];
  readonly labels: readonly LabelShape[];
  readonly notes: readonly NoteShape[];
  readonly omitted: readonly Omitted[];
}

/** Texts of a unit's links by their names. */
export type LinkTexts = Readonly<Record<string, string>>;

/** What the scene shows beside the sketch itself. */
export interface SceneInput {
  readonly states: ReadonlyMap<UnitId, DrawnState>;
  readonly limits: ReadonlyMap<UnitId, Weight>;
  /** Rows per stream, already formatted in the sketch's measures; absent: no label. */
  readonly labels: ReadonlyMap<StreamId, readonly LabelRow[]>;
  /** Formatted duty ("Q 1307 kW") or shaft power ("W 52.1 kW") per unit and name of the link; absent: a link without text. */
  readonly duties: ReadonlyMap<UnitId, LinkTexts>;
  /** Lines under a unit's tag ("32 stages"). */
  readonly remarks?: ReadonlyMap<UnitId, readonly string[]>;
  /**
   * How much larger than at 100 % texts, diamonds and marks are, because they keep their size on a screen that is zoomed out
   * (above 1), or smaller on one that is zoomed in; absent: 1. See textScaleAt.
   */
  readonly textScale?: number;
  /** Width of a stream's ribbon in follow [px]; labels clear half of it. */
  readonly ribbons?: ReadonlyMap<StreamId, number>;
  /** Kinds whose ports are known; absent: the catalogue. A kind without a symbol of its own becomes a box. */
  readonly kinds?: Readonly<Record<string, KindCatalogue>>;
}
