import { BoxIndex, boxAround } from './boxes';
import { stateMark } from './marks';
import { nearestOfBox, scaledAbout } from './near';
import { placeDuty, placeName, type TextPlace } from './sideTexts';
import type { StandingUnit } from './standing';
import { flagName } from './symbols/flag';
import { linkShapes } from './symbols/shapes';
import { placeTag, type TagPlace } from './tags';
import { TEXT } from './tokens';
import { toSheet } from './transform';
import type { Box, LinkShape, Omitted, Point, SceneInput, TextShape, UnitShape } from './types';

/** Places of what stands beside a unit's symbol. */
export interface UnitTexts {
  readonly tag?: TagPlace;
  readonly name?: TextPlace;
  /** By link; undefined without room. */
  readonly duties: readonly (TextPlace | undefined)[];
  readonly flagUpTo: number;
}

/** A flag with its name inside keeps its size on the screen about its port: the only one it has. */
function flagHold({ symbol, pose }: StandingUnit): Point | undefined {
  if (!symbol.nameInside) return undefined;
  const port = symbol.ports('out') ?? symbol.ports('in');
  return port && toSheet(pose, port.at);
}

/** A flag grows only as far as it meets nothing: tried from the full scale down [-]. */
const SHARES = [1, 0.75, 0.5, 0.25] as const;
const FLAG_CLEAR = 3;

/**
 * How far each flag may grow on a smaller sheet.
 *
 * @param taken symbols (their units as owners) and lines; grown flags are added
 */
export function growFlags(
  units: readonly StandingUnit[],
  taken: BoxIndex,
  scale: number,
): readonly { readonly upTo: number; readonly box: Box }[] {
  return units.map((u) => {
    const hold = flagHold(u);
    if (!hold || scale === 1) return { upTo: 1, box: u.box };
    for (const share of SHARES) {
      const upTo = 1 + share * (scale - 1);
      const box = scaledAbout(u.box, hold, upTo);
      if (taken.hits(box, FLAG_CLEAR, u.unit.id)) continue;
      taken.add(box, u.unit.id);
      return { upTo, box };
    }
    return { upTo: 1, box: u.box };
  });
}

interface Wanted {
  /** Widths of the duties of each unit's links at 100 % [px]. */
  readonly rooms: readonly (readonly number[])[];
  readonly remarks: readonly (readonly [rows: number, width: number])[];
  readonly scale: number;
  readonly flags: readonly { readonly upTo: number; readonly box: Box }[];
}

/**
 * Tags, names and duties, each placed where it covers nothing. Room for a limit mark and a duty is kept even when there is
 * none, so that nothing moves when one appears.
 *
 * @param taken symbols, lines and diamonds; what is placed here is added
 * @returns places for each unit, the boxes of tags, marks, names and duties, and what has no room
 */
export function placeTexts(
  units: readonly StandingUnit[],
  { rooms, remarks, scale, flags }: Wanted,
  taken: BoxIndex,
): {
  readonly texts: readonly UnitTexts[];
  readonly boxes: readonly Box[];
  readonly omitted: readonly Omitted[];
} {
  const boxes: Box[] = [];
  const omitted: Omitted[] = [];
  const add = (...more: readonly Box[]): void => {
    for (const box of more) {
      boxes.push(box);
      taken.add(box);
    }
  };
  const symbols = new BoxIndex();
  const rings = new BoxIndex();
  units.forEach((u, k) => {
    symbols.add(flags[k]!.box, u.unit.id);
    u.links.forEach(([, ring], n) => {
      rings.add(boxAround(ring, 0.01), `${u.unit.id} ${n}`);
    });
  });
  // Names of upright flags first, then duties, then tags: what has the fewest places to choose from.
  const names = units.map((u): TextPlace | undefined => {
    if (u.symbol.nameAt === undefined || u.symbol.nameInside) return undefined;
    const place = placeName(flagName(u.unit), u.box, taken);
    if (place) add(place.box);
    else omitted.push({ what: 'tag', unit: u.unit.id });
    return place;
  });
  const duties = units.map((u, k) =>
    u.links.map(([from, ring], n): TextPlace | undefined => {
      const along: Point = [Math.sign(ring[0] - from[0]), Math.sign(ring[1] - from[1])];
      const place = placeDuty(rooms[k]![n]!, ring, along, taken, rings, `${u.unit.id} ${n}`, scale);
      if (place) add(place.box);
      return place;
    }),
  );
  const tags = units.map((u, k): TagPlace | undefined => {
    if (u.symbol.tagless) return undefined;
    const [rows, remark] = remarks[k]!;
    const place = placeTag({ tag: u.unit.tag, remark, rows }, u.box, taken, symbols, u.unit.id, scale);
    if (place) add(...place.boxes);
    return place;
  });
  units.forEach((u, k) => {
    if (!tags[k] && !u.symbol.tagless) omitted.push({ what: 'tag', unit: u.unit.id });
    if (remarks[k]![0] > 0 && !tags[k]?.remarks) omitted.push({ what: 'remark', unit: u.unit.id });
  });
  const texts = units.map((_, k): UnitTexts => {
    const [tag, name] = [tags[k], names[k]];
    return {
      ...(tag ? { tag } : {}),
      ...(name ? { name } : {}),
      duties: duties[k]!,
      flagUpTo: flags[k]!.upTo,
    };
  });
  return { texts, boxes, omitted };
}

/** A unit as it is drawn: its symbol with what stands beside it, and what the input says of it. */
export function shapeOf(u: StandingUnit, input: SceneInput, texts: UnitTexts): UnitShape {
  const { unit, symbol, pose, box } = u;
  const { tag, name, flagUpTo } = texts;
  const state = input.states.get(unit.id) ?? 'waiting';
  const weight = input.limits.get(unit.id);
  const shape = {
    unit: unit.id,
    tag: unit.tag,
    kind: unit.kind,
    ...pose,
    symbol,
    box,
    state,
    texts: name ? [name.text] : nameInside(u),
    links: linksOf(u, input, texts, state === 'out-of-date'),
    flagUpTo,
  };
  if (!tag) {
    return { ...shape, stateMark: [], remarks: [], hold: nearestOfBox(box, pose.at), tagUpTo: 1 };
  }
  return {
    ...shape,
    tagText: tagText(unit.tag, tag),
    stateMark: stateMark(state, tag.left, tag.width, tag.baseline),
    remarks: remarksOf(tag, input.remarks?.get(unit.id) ?? [], state === 'out-of-date'),
    ...(weight ? { limit: { weight, at: tag.limitAt } } : {}),
    hold: tag.hold,
    tagUpTo: tag.upTo,
  };
}

function linksOf(
  { unit, symbol, links }: StandingUnit,
  input: SceneInput,
  { duties }: UnitTexts,
  isStale: boolean,
): readonly LinkShape[] {
  return (symbol.links ?? []).map((link, n): LinkShape => {
    const [from, to] = links[n]!;
    const text = input.duties.get(unit.id)?.[link.name];
    const place = duties[n];
    const shape =
      place && text !== undefined ? { ...place.text, text, ...(isStale ? { italic: true } : {}) } : undefined;
    return { name: link.name, ...linkShapes({ ...link, from, to }), ...(shape ? { text: shape } : {}) };
  });
}

const remarksOf = ({ remarks }: TagPlace, rows: readonly string[], isStale: boolean): readonly TextShape[] =>
  remarks
    ? rows.map((text, k) => ({
        at: [remarks.at[0], remarks.at[1] + k * TEXT.labelLine],
        text,
        size: TEXT.label,
        weight: 400,
        ...(isStale ? { italic: true } : {}),
        anchor: remarks.anchor,
        ink: 'ink3',
      }))
    : [];

const tagText = (text: string, place: TagPlace): TextShape => ({
  at: [place.left, place.baseline],
  text,
  size: TEXT.tag,
  weight: 600,
  anchor: 'start',
  ink: 'ink',
});

function nameInside({ unit, symbol, pose }: StandingUnit): readonly TextShape[] {
  if (!symbol.nameInside || !symbol.nameAt) return [];
  const [x, y] = toSheet(pose, symbol.nameAt);
  return [
    {
      at: [x, y + 4],
      text: flagName(unit),
      size: TEXT.flag,
      weight: 400,
      anchor: 'middle',
      ink: 'ink',
    },
  ];
}
