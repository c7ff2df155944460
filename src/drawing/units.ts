import { type BoxIndex, hull } from './boxes';
import { stateMark } from './marks';
import { placeDuty, placeName, type TextPlace } from './sideTexts';
import type { StandingUnit } from './standing';
import { flagName } from './symbols/flag';
import { linkShapes } from './symbols/shapes';
import { placeTag, type TagPlace } from './tags';
import { TEXT } from './tokens';
import { toSheet } from './transform';
import type { Box, Point, SceneInput, TextShape, UnitShape } from './types';

/** Places of what stands beside a unit's symbol. */
export interface UnitTexts {
  readonly tag?: TagPlace;
  readonly name?: TextPlace;
  readonly duty?: TextPlace;
}

/**
 * Tags, names and duties, each placed where it covers nothing. Room for a limit mark and a duty is kept even when there is
 * none, so that nothing moves when one appears.
 *
 * @param rooms for each unit, width of its duty [px]
 * @param taken symbols, lines and diamonds; what is placed here is added
 * @returns places for each unit, and the boxes of tags, marks, names and duties
 */
export function placeTexts(
  units: readonly StandingUnit[],
  rooms: readonly number[],
  taken: BoxIndex,
): { readonly texts: readonly UnitTexts[]; readonly boxes: readonly Box[] } {
  const boxes: Box[] = [];
  const add = (box: Box): void => {
    boxes.push(box);
    taken.add(box);
  };
  const tags = units.map((u): TagPlace | undefined => {
    if (u.symbol.tagless) return undefined;
    const place = placeTag(u.unit.tag, u.box, taken);
    taken.add(place.box);
    boxes.push(hull([place.box, place.limitBox])!);
    taken.add(place.limitBox);
    return place;
  });
  const names = units.map((u): TextPlace | undefined => {
    if (u.symbol.nameAt === undefined || u.symbol.nameInside) return undefined;
    const place = placeName(flagName(u.unit), u.box, taken);
    add(place.box);
    return place;
  });
  const duties = units.map((u, k): TextPlace | undefined => {
    if (!u.link) return undefined;
    const place = placeDuty(rooms[k]!, u.link[1], direction(u.link), taken);
    add(place.box);
    return place;
  });
  const texts = units.map((_, k): UnitTexts => {
    const [tag, name, duty] = [tags[k], names[k], duties[k]];
    return { ...(tag ? { tag } : {}), ...(name ? { name } : {}), ...(duty ? { duty } : {}) };
  });
  return { texts, boxes };
}

const direction = ([a, b]: readonly [Point, Point]): Point => [
  Math.sign(b[0] - a[0]),
  Math.sign(b[1] - a[1]),
];

/** A unit as it is drawn: its symbol with what stands beside it, and what the input says of it. */
export function shapeOf(u: StandingUnit, input: SceneInput, { tag, name, duty }: UnitTexts): UnitShape {
  const { unit, symbol, pose, box } = u;
  const state = input.states.get(unit.id) ?? 'waiting';
  const weight = input.limits.get(unit.id);
  const text = input.duties.get(unit.id);
  const dutyText = duty && text !== undefined ? { ...duty.text, text } : undefined;
  const stale = state === 'out-of-date';
  return {
    unit: unit.id,
    tag: unit.tag,
    kind: unit.kind,
    ...pose,
    symbol,
    box,
    state,
    ...(tag ? { tagText: tagText(unit.tag, tag) } : {}),
    stateMark: tag ? stateMark(state, tag.left, tag.width, tag.baseline) : [],
    texts: name ? [name.text] : nameInside(u),
    ...(u.link && symbol.link
      ? {
          duty: {
            ...linkShapes({ ...symbol.link, from: u.link[0], to: u.link[1] }),
            ...(dutyText ? { text: stale ? { ...dutyText, italic: true } : dutyText } : {}),
          },
        }
      : {}),
    ...(tag && weight ? { limit: { weight, at: tag.limitAt } } : {}),
  };
}

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
