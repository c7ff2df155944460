import { BoxIndex, boxAround, type Entry, grown, overlaps } from './boxes';
import { DIAMOND, type DiamondPlace } from './diamonds';
import { type Anchor, alongLine, atAnchor, CLEAR, type LabelWish } from './labelPlaces';
import { isLeaderFree, type LedPlace, leaderBoxes, ledPlaces } from './leaders';
import { distanceTo, distanceToLine, scaledAbout } from './near';
import { SCALE_STEP } from './textScale';
import type { Box, Point } from './types';

/**
 * A label is nearer to its own stream than to any other by at least this, measured to the lines and, once more, to the
 * middles of the diamonds [px].
 */
export const NEARER = 5;
/** A label on a leader line, or one whose stream has no diamond, keeps this far from the diamonds of others [px]. */
export const ALOOF = 14;
/** Radius of the circle inside a diamond [px]. */
const INNER = DIAMOND / Math.SQRT2;
/** How many other places of a stream's diamond are tried for the sake of its label. */
const OTHER_DIAMONDS = 24;
/** How many free places are counted before a label counts as easy to place. */
const EASY = 6;

/** A stream that wants a label. */
export interface LabelTask {
  readonly wish: LabelWish;
  /** Comes first: a feed's or product's stream. */
  readonly first: boolean;
  /** Where else its diamond may stand, the best first. */
  readonly elsewhere: () => Iterable<DiamondPlace>;
}

export interface PlacedLabel {
  readonly box: Box;
  readonly anchor: Anchor;
  readonly leader?: readonly [Point, Point];
}

interface Standing extends PlacedLabel {
  /** Small boxes along its leader line. */
  readonly dots: readonly Box[];
  /** What it put into the index of labels. */
  readonly entries: readonly Entry[];
}

/** What labels must heed, and what they take. */
export class LabelGround {
  /** Everything that no label may cover. */
  readonly taken = new BoxIndex();
  /** Lines, by the index of their stream. */
  private readonly lines = new BoxIndex();
  /** Middles of diamonds, by the index of their stream. */
  private readonly middles = new BoxIndex();
  private readonly diamonds = new Map<number, readonly Entry[]>();

  addLine(pieces: readonly Box[], stream: number): void {
    for (const box of pieces) {
      this.taken.add(box, stream);
      this.lines.add(box, stream);
    }
  }

  setDiamond(stream: number, at: Point | undefined, scale: number): void {
    const old = this.diamonds.get(stream);
    if (old) {
      this.taken.remove(old[0]!);
      this.middles.remove(old[1]!);
      this.diamonds.delete(stream);
    }
    if (!at) return;
    const owner = `diamond ${stream}`;
    this.diamonds.set(stream, [
      this.taken.add(boxAround(at, DIAMOND * scale), owner),
      this.middles.add(boxAround(at, 0.01), stream),
    ]);
  }

  /** Whether a box covers nothing and can only be read as its own stream's; `bound` by a leader line it need not be near. */
  allows(box: Box, stream: number, { points, scale }: LabelWish, anchor: Anchor, isLed: boolean): boolean {
    if (this.taken.hits(box, CLEAR * scale)) return false;
    if (isLed) {
      return (
        !this.lines.hits(box, ALOOF * scale, stream) &&
        !this.middles.hits(box, (DIAMOND + ALOOF) * scale, stream)
      );
    }
    const toMiddle = anchor.diamond ? distanceTo(box, anchor.at) : Infinity;
    const own = Math.min(distanceToLine(box, points), toMiddle - INNER * scale);
    if (this.lines.hits(box, own + NEARER * scale, stream)) return false;
    const away = anchor.diamond ? toMiddle + NEARER * scale : (DIAMOND + ALOOF) * scale;
    return !this.middles.hits(box, away, stream);
  }
}

/** Where a label on a leader line stands when texts are drawn one step smaller: nearer to its diamond. */
const nearer = (box: Box, diamond: Point, scale: number): Box =>
  scaledAbout(box, diamond, (scale - SCALE_STEP) / scale);

const guardOf = (box: Box, { scale }: LabelWish, anchor: Anchor, isLed: boolean): Box => {
  const toMiddle = anchor.diamond && !isLed ? distanceTo(box, anchor.at) + NEARER * scale : 0;
  return grown(box, Math.max(toMiddle, (DIAMOND + ALOOF) * scale));
};

/**
 * Places labels one after another: those of feeds and products first, then those with the fewest free places. Each stands
 * at its diamond if it can; else its diamond moves along the line, else it stands along the line, else at the end of a
 * leader line, else another label leaves its place for it. A label that finds nothing is left off.
 *
 * @returns undefined for each label without room
 */
export function placeLabels(
  tasks: readonly (LabelTask | undefined)[],
  ground: LabelGround,
): readonly (PlacedLabel | undefined)[] {
  return new Placing(tasks, ground).run();
}

class Placing {
  private readonly placed: (Standing | undefined)[];
  /** Labels and their leader lines, by the index of their stream. */
  private readonly index = new BoxIndex();
  /** Where diamonds must not come, by the index of the label that says so. */
  private readonly guards = new BoxIndex();
  private readonly anchors: Anchor[];
  private readonly tasks: readonly (LabelTask | undefined)[];
  private readonly ground: LabelGround;

  constructor(tasks: readonly (LabelTask | undefined)[], ground: LabelGround) {
    this.tasks = tasks;
    this.ground = ground;
    this.placed = tasks.map(() => undefined);
    this.anchors = tasks.map((task) => task?.wish.anchor ?? { at: [0, 0], piece: 0, diamond: false });
  }

  run(): readonly (PlacedLabel | undefined)[] {
    const order = this.tasks.flatMap((task, k) => (task ? [k] : []));
    const ease = this.tasks.map((task, k) => (task ? this.easeOf(task, k) : 0));
    const rank = (k: number): number => (this.tasks[k]!.first ? 0 : 1);
    order.sort((a, b) => rank(a) - rank(b) || ease[a]! - ease[b]! || a - b);
    for (const k of order) this.place(k);
    for (const k of order) if (!this.placed[k]) this.place(k);
    return this.placed;
  }

  private easeOf({ wish }: LabelTask, k: number): number {
    let count = 0;
    for (const box of atAnchor(wish)) {
      if (this.ground.allows(box, k, wish, wish.anchor, false) && ++count === EASY) break;
    }
    return count;
  }

  private place(k: number): void {
    const task = this.tasks[k]!;
    const { wish } = task;
    const here = this.firstAt(atAnchor(wish), k, wish.anchor);
    if (here) {
      this.put(k, here);
      return;
    }
    if (this.moveDiamond(k, task)) return;
    const along = this.firstAt(alongLine(wish), k, wish.anchor);
    const led = along ? undefined : this.firstLed(k, wish);
    if (along) this.put(k, along);
    else if (led) this.put(k, led.box, led.leader);
    else this.swap(k, wish);
  }

  private put(k: number, box: Box, leader?: readonly [Point, Point], anchor = this.anchors[k]!): void {
    const { wish } = this.tasks[k]!;
    this.takeOff(k);
    this.anchors[k] = anchor;
    const guard = guardOf(box, wish, anchor, leader !== undefined);
    const dots = leader ? [...leaderBoxes(leader), nearer(box, anchor.at, wish.scale)] : [];
    const entries = [box, ...dots].map((one) => this.index.add(one, k));
    entries.push(this.guards.add(guard, k));
    this.placed[k] = { box, anchor, dots, entries, ...(leader ? { leader } : {}) };
  }

  private takeOff(k: number): void {
    const standing = this.placed[k];
    if (!standing) return;
    standing.entries.forEach((entry, n) => {
      if (n < standing.entries.length - 1) this.index.remove(entry);
      else this.guards.remove(entry);
    });
    this.placed[k] = undefined;
  }

  /** Labels that a box would come too close to, and leader lines that it would cover. */
  private inTheWay(box: Box, except: number, clear: number): readonly number[] {
    if (!this.index.hits(box, clear, except)) return [];
    const room = grown(box, clear);
    const out: number[] = [];
    this.placed.forEach((other, j) => {
      if (j === except || !other) return;
      if (overlaps(room, other.box) || other.dots.some((dot) => overlaps(box, dot))) out.push(j);
    });
    return out;
  }

  private fits(box: Box, k: number, clear: number): boolean {
    return this.inTheWay(box, k, clear).length === 0;
  }

  private firstAt(boxes: Iterable<Box>, k: number, anchor: Anchor): Box | undefined {
    const { wish } = this.tasks[k]!;
    for (const box of boxes) {
      if (this.ground.allows(box, k, wish, anchor, false) && this.fits(box, k, CLEAR * wish.scale))
        return box;
    }
    return undefined;
  }

  private firstLed(k: number, wish: LabelWish): LedPlace | undefined {
    for (const place of ledPlaces(wish)) {
      if (!this.ground.allows(place.box, k, wish, wish.anchor, true)) continue;
      if (!this.fits(place.box, k, CLEAR * wish.scale)) continue;
      const low = nearer(place.box, wish.anchor.at, wish.scale);
      if (this.ground.taken.hits(low, CLEAR) || !this.fits(low, k, CLEAR)) continue;
      if (!isLeaderFree(place.leader, wish.anchor.at, this.ground.taken, k, wish.scale)) continue;
      if (leaderBoxes(place.leader).every((dot) => this.fits(dot, k, 0))) return place;
    }
    return undefined;
  }

  /** The diamond goes along its line to where its label has room; other labels are still nearest to their own. */
  private moveDiamond(k: number, { wish, elsewhere }: LabelTask): boolean {
    if (!wish.anchor.diamond) return false;
    const { scale } = wish;
    this.ground.setDiamond(k, undefined, scale);
    let tried = 0;
    for (const place of elsewhere()) {
      if (++tried > OTHER_DIAMONDS) break;
      if (this.guards.hits(boxAround(place.at, 0.01), 0, k)) continue;
      const stone = boxAround(place.at, DIAMOND * scale);
      if (this.ground.taken.hits(stone, 2, k) || !this.fits(stone, k, CLEAR * scale)) continue;
      const anchor = { ...place, diamond: true };
      this.ground.setDiamond(k, place.at, scale);
      const box = this.firstAt(atAnchor({ ...wish, anchor }), k, anchor);
      if (box) {
        this.put(k, box, undefined, anchor);
        return true;
      }
      this.ground.setDiamond(k, undefined, scale);
    }
    this.ground.setDiamond(k, wish.anchor.at, scale);
    return false;
  }

  /** Takes a place that one other label can leave for another one. */
  private swap(k: number, wish: LabelWish): boolean {
    for (const box of atAnchor(wish)) {
      if (!this.ground.allows(box, k, wish, wish.anchor, false)) continue;
      const [j, ...more] = this.inTheWay(box, k, CLEAR * wish.scale);
      if (j === undefined || more.length > 0) continue;
      const before = this.placed[j]!;
      this.takeOff(j);
      this.put(k, box);
      const other = this.tasks[j]!.wish;
      const anchor = this.anchors[j]!;
      const moved = { ...other, anchor };
      const next = this.firstAt(atAnchor(moved), j, anchor) ?? this.firstAt(alongLine(moved), j, anchor);
      const led = next ? undefined : this.firstLed(j, moved);
      if (next) this.put(j, next);
      else if (led) this.put(j, led.box, led.leader);
      if (next || led) return true;
      this.takeOff(k);
      this.put(j, before.box, before.leader, before.anchor);
    }
    return false;
  }
}
