import { boxAround, boxOfPiece, grown, overlaps } from '../../src/drawing/boxes';
import { measureText } from '../../src/drawing/metrics';
import { apart, distanceTo, distanceToLine, scaledAbout } from '../../src/drawing/near';
import { portOnSheet, toSheet } from '../../src/drawing/transform';
import type { Box, LabelShape, LineShape, Point, Scene, TextShape, UnitShape } from '../../src/drawing/types';
import type { Sketch } from '../../src/sketch/types';

/** What a scene breaks of the laws of the drawing, in words; empty when it keeps them all. */
export type Law = (scene: Scene, sketch: Sketch) => readonly string[];

const pieces = (points: readonly Point[]): readonly (readonly [Point, Point])[] =>
  points.slice(1).map((p, k): [Point, Point] => [points[k]!, p]);

function boxOfText({ at: [x, y], text, size, weight, anchor }: TextShape): Box {
  const w = measureText(text, size, weight);
  const left = anchor === 'start' ? x : anchor === 'end' ? x - w : x - w / 2;
  return { x: left, y: y - size * 0.75, w, h: size * 0.95 };
}

/** The drawn symbol as it is on the screen (a flag keeps its size as far as it has room), and its links. */
function solidOf(unit: UnitShape, textScale: number): readonly Box[] {
  const { symbol, box } = unit;
  const port = symbol.nameInside ? (symbol.ports('out') ?? symbol.ports('in')) : undefined;
  const k = Math.min(textScale, unit.flagUpTo);
  const own = port ? scaledAbout(box, portOnSheet(unit, port).at, k) : box;
  const links = (symbol.links ?? []).map(({ from, to }) =>
    boxOfPiece(toSheet(unit, from), toSheet(unit, to), 3),
  );
  return [own, ...links];
}

/** Tag with the room of its state, limit mark, remarks, duties and a name that stands outside. */
function textsOf(unit: UnitShape, textScale: number): readonly Box[] {
  const { tagText, limit, links, symbol, texts, remarks, hold, tagUpTo } = unit;
  const k = Math.min(textScale, tagUpTo);
  const held = [
    ...(tagText ? [{ ...boxOfText(tagText), h: 18 }] : []),
    ...(limit ? [boxAround(limit.at, 8)] : []),
    ...remarks.map(boxOfText),
  ].map((box) => scaledAbout(box, hold, k));
  const duties = links.flatMap(({ text }) =>
    text ? [scaledAbout(boxOfText(text), text.at, textScale)] : [],
  );
  return [...held, ...duties, ...(symbol.nameInside ? [] : texts.map(boxOfText))];
}

export const openLabels = (scene: Scene): readonly (LabelShape & { readonly seen: Box })[] =>
  scene.labels
    .filter((label) => !label.folded)
    .map((label) => ({ ...label, seen: scaledAbout(label.box, label.hold, scene.textScale) }));

/** Small boxes along a label's leader line, on the sheet. */
function leaderDots({ leader, hold }: LabelShape, k: number): readonly Box[] {
  if (!leader) return [];
  const [a, b] = leader.map(
    ([x, y]): Point => [hold[0] + (x - hold[0]) * k, hold[1] + (y - hold[1]) * k],
  ) as [Point, Point];
  return Array.from({ length: 41 }, (_, n) =>
    boxAround([a[0] + ((b[0] - a[0]) * n) / 40, a[1] + ((b[1] - a[1]) * n) / 40], 0.4),
  );
}

const diamondOf = (line: LineShape, k: number): Box | undefined =>
  line.diamond && boxAround(line.diamond, 12 * k);

const shareAnEnd = (a: LineShape, b: LineShape): boolean =>
  [a.points[0]!, a.points.at(-1)!].some(([x, y]) =>
    [b.points[0]!, b.points.at(-1)!].some((p) => p[0] === x && p[1] === y),
  );

export const linesMeetPorts: Law = (scene, sketch) => {
  const byId = new Map(scene.units.map((u) => [u.unit, u]));
  return scene.lines.flatMap((line) => {
    const stream = sketch.streams.find((s) => s.id === line.stream)!;
    const out: string[] = [];
    for (const [end, a, b] of [
      [stream.from, line.points[0]!, line.points[1]!],
      [stream.to, line.points.at(-1)!, line.points.at(-2)!],
    ] as const) {
      if (!end) continue;
      const unit = byId.get(end[0])!;
      const { at, side } = portOnSheet(unit, unit.symbol.ports(end[1])!);
      if (at[0] !== a[0] || at[1] !== a[1]) out.push(`line ${line.number} misses the port of ${unit.tag}`);
      const way = b[0] > a[0] ? 'right' : b[0] < a[0] ? 'left' : b[1] > a[1] ? 'bottom' : 'top';
      if (way !== side) out.push(`line ${line.number} leaves ${unit.tag} to the ${way}, not the ${side}`);
    }
    return out;
  });
};

export const onlyRightAngles: Law = ({ lines }) =>
  lines.flatMap(({ number, points }) =>
    pieces(points).flatMap(([[x1, y1], [x2, y2]]) =>
      (x1 === x2) === (y1 === y2) ? [`line ${number} is slanted or has a piece without length`] : [],
    ),
  );

export const noLineCrossesASymbol: Law = (scene, sketch) =>
  scene.lines.flatMap((line) => {
    const { from, to } = sketch.streams.find((s) => s.id === line.stream)!;
    const all = pieces(line.points);
    return all.flatMap(([a, b], k) =>
      scene.units.flatMap((unit) => {
        const ownEnd =
          (k === 0 && from?.[0] === unit.unit) || (k === all.length - 1 && to?.[0] === unit.unit);
        if (ownEnd) return [];
        return solidOf(unit, scene.textScale).some((box) => overlaps(boxOfPiece(a, b, 0.9), box))
          ? [`line ${line.number} over ${unit.tag}`]
          : [];
      }),
    );
  });

/** Lines that share a port of a join with more inlets than sides run together into it. */
export const noLinesRunAlong: Law = ({ lines }) =>
  lines.flatMap((a, n) =>
    lines
      .slice(n + 1)
      .filter((b) => !shareAnEnd(a, b))
      .flatMap((b) =>
        pieces(a.points).flatMap(([p, q]) =>
          pieces(b.points).flatMap(([r, s]) =>
            (p[0] === q[0]) === (r[0] === s[0]) && overlaps(boxOfPiece(p, q, 1.5), boxOfPiece(r, s, 1.5))
              ? [`line ${a.number} along line ${b.number}`]
              : [],
          ),
        ),
      ),
  );

/** Labels clear symbols, lines, diamonds and one another by so many px of the screen, and cover no text. */
const labelsClear =
  (clear: number): Law =>
  (scene) => {
    const k = scene.textScale;
    const open = openLabels(scene);
    return open.flatMap((label, n) => {
      const number = scene.lines.find((l) => l.stream === label.stream)!.number;
      const room = grown(label.seen, clear * k);
      const out: string[] = [];
      const check = (isHit: boolean, what: string): void => {
        if (isHit) out.push(`label ${number} on ${what}`);
      };
      for (const unit of scene.units) {
        for (const box of solidOf(unit, k)) check(overlaps(room, box), unit.tag);
        for (const box of textsOf(unit, k)) check(overlaps(label.seen, box), `a text of ${unit.tag}`);
      }
      for (const line of scene.lines) {
        for (const [a, b] of pieces(line.points))
          check(overlaps(room, boxOfPiece(a, b, 0.9)), `line ${line.number}`);
        const diamond = diamondOf(line, k);
        if (diamond) check(overlaps(room, diamond), `diamond ${line.number}`);
      }
      for (const other of open.slice(n + 1))
        check(overlaps(room, other.seen), `the label of ${other.stream}`);
      for (const other of open) {
        for (const dot of leaderDots(other, k))
          check(other !== label && overlaps(label.seen, dot), 'a leader line');
      }
      return out;
    });
  };

/**
 * A label can be read as its own stream's only: it is nearer to its own line or diamond than to any other line, and nearer to
 * its own diamond than to any other diamond; or a leader line joins it to its own diamond.
 */
const labelsAreNearer =
  (margin: number): Law =>
  (scene) =>
    openLabels(scene).flatMap((label) => {
      const own = scene.lines.find((line) => line.stream === label.stream)!;
      const k = scene.textScale;
      const toMiddle = own.diamond ? distanceTo(label.seen, own.diamond) : Infinity;
      const inner = 12 * k * Math.SQRT1_2;
      const toOwn = Math.min(distanceToLine(label.seen, own.points), toMiddle - inner);
      return scene.lines.flatMap((other) => {
        if (other === own) return [];
        const toLine = distanceToLine(label.seen, other.points);
        const toOther = other.diamond ? distanceTo(label.seen, other.diamond) : Infinity;
        if (label.leader)
          return Math.min(toLine, toOther - 12 * k) < (9 + margin) * k
            ? [`led label ${own.number} at ${other.number}`]
            : [];
        const out: string[] = [];
        if (toLine < toOwn + margin * k) out.push(`label ${own.number} is near line ${other.number}`);
        if (own.diamond ? toOther < toMiddle + margin * k : toOther < (21 + margin) * k)
          out.push(`label ${own.number} is near diamond ${other.number}`);
        return out;
      });
    });

export const labelsCoverNothing = labelsClear(5.9);
export const labelsAreNearestToTheirOwn = labelsAreNearer(4);

/** A leader line begins at its own diamond, ends at its label and meets nothing between. */
export const leadersMeetNothing: Law = (scene) =>
  openLabels(scene).flatMap((label) => {
    if (!label.leader) return [];
    const k = scene.textScale;
    const own = scene.lines.find((line) => line.stream === label.stream)!;
    if (!own.diamond) return [`label ${own.number} has a leader line but no diamond`];
    const out: string[] = [];
    const dots = leaderDots(label, k);
    const [first, last] = [dots[0]!, dots.at(-1)!];
    const from: Point = [first.x + 0.4, first.y + 0.4];
    const reach = Math.abs(from[0] - own.diamond[0]) + Math.abs(from[1] - own.diamond[1]);
    if (Math.abs(reach - 12 * k) > 0.5)
      out.push(`the leader line of ${own.number} does not begin at its diamond`);
    if (apart(label.seen, last) > 3 * k)
      out.push(`the leader line of ${own.number} does not reach its label`);
    for (const dot of dots) {
      for (const unit of scene.units) {
        for (const box of [...solidOf(unit, k), ...textsOf(unit, k)])
          if (overlaps(dot, box)) out.push(`the leader line of ${own.number} over ${unit.tag}`);
      }
      for (const line of scene.lines) {
        const atStart = line === own && dot === first;
        for (const [a, b] of pieces(line.points))
          if (!atStart && overlaps(dot, boxOfPiece(a, b, 0.9)))
            out.push(`the leader line of ${own.number} over line ${line.number}`);
        const diamond = line === own ? undefined : diamondOf(line, k);
        if (diamond && overlaps(dot, diamond))
          out.push(`the leader line of ${own.number} over ${line.number}`);
      }
    }
    return out;
  });

/** Diamonds stand on their lines, apart from each other, from symbols, texts and other lines. */
export const diamondsStandFree: Law = (scene) => {
  const k = scene.textScale;
  return scene.lines.flatMap((line, n) => {
    const box = diamondOf(line, k);
    if (!box) return [];
    const out: string[] = [];
    const onLine = pieces(line.points).some(([a, b]) =>
      overlaps(boxOfPiece(a, b, 1), boxAround(line.diamond!, 0.5)),
    );
    if (!onLine) out.push(`diamond ${line.number} is off its line`);
    for (const unit of scene.units) {
      for (const solid of solidOf(unit, k))
        if (overlaps(box, solid)) out.push(`diamond ${line.number} on ${unit.tag}`);
      for (const text of textsOf(unit, k))
        if (overlaps(box, text)) out.push(`diamond ${line.number} on a text of ${unit.tag}`);
    }
    for (const other of scene.lines.slice(n + 1)) {
      const stone = diamondOf(other, k);
      if (stone && overlaps(box, stone)) out.push(`diamond ${line.number} on diamond ${other.number}`);
    }
    for (const other of scene.lines) {
      if (other === line) continue;
      for (const [a, b] of pieces(other.points))
        if (overlaps(box, boxOfPiece(a, b, 0.9))) out.push(`diamond ${line.number} on line ${other.number}`);
    }
    return out;
  });
};

/** Tags, marks, remarks, names and duties cover no symbol, no line and none of one another. */
export const textsCoverNothing: Law = (scene) => {
  const k = scene.textScale;
  const texts = scene.units.flatMap((unit) => textsOf(unit, k).map((box) => ({ unit, box })));
  return texts.flatMap(({ unit, box }, n) => {
    const out: string[] = [];
    for (const other of scene.units) {
      if (solidOf(other, k).some((solid) => overlaps(box, solid)))
        out.push(`text of ${unit.tag} on ${other.tag}`);
    }
    for (const line of scene.lines) {
      for (const [a, b] of pieces(line.points))
        if (overlaps(box, boxOfPiece(a, b, 0.9))) out.push(`text of ${unit.tag} on line ${line.number}`);
    }
    for (const other of texts.slice(n + 1)) {
      if (overlaps(box, other.box)) out.push(`text of ${unit.tag} on the text of ${other.unit.tag}`);
    }
    return out;
  });
};

/** No two symbols lie on one another, flags as large as they are on the screen. */
export const symbolsStandApart: Law = (scene) =>
  scene.units.flatMap((unit, n) =>
    scene.units
      .slice(n + 1)
      .flatMap((other) =>
        overlaps(solidOf(unit, scene.textScale)[0]!, solidOf(other, scene.textScale)[0]!)
          ? [`${unit.tag} on ${other.tag}`]
          : [],
      ),
  );

/** Labels, tags and duties keep off the texts of notes and the borders of areas, diamonds off the texts. */
export const notesStandFree: Law = (scene) => {
  const k = scene.textScale;
  return scene.notes.flatMap((note) => {
    const rooms = note.texts.map((text) => scaledAbout(boxOfText(text), note.hold, Math.min(k, note.upTo)));
    const { x, y, w, h } = note.box;
    const border = note.border
      ? [
          boxOfPiece([x, y], [x + w, y], 0.5),
          boxOfPiece([x, y + h], [x + w, y + h], 0.5),
          boxOfPiece([x, y], [x, y + h], 0.5),
          boxOfPiece([x + w, y], [x + w, y + h], 0.5),
        ]
      : [];
    const isHit = (box: Box): boolean => [...rooms, ...border].some((room) => overlaps(room, box));
    const isOnText = (box: Box): boolean => rooms.some((room) => overlaps(room, box));
    return [
      ...openLabels(scene).flatMap((label) =>
        isHit(label.seen) ? [`label ${label.stream} on note ${note.id}`] : [],
      ),
      ...scene.units.flatMap((unit) =>
        textsOf(unit, k).some(isHit) ? [`a text of ${unit.tag} on note ${note.id}`] : [],
      ),
      ...scene.lines.flatMap((line) => {
        const diamond = diamondOf(line, k);
        return diamond && isOnText(diamond) ? [`diamond ${line.number} on note ${note.id}`] : [];
      }),
    ];
  });
};

/** What is left off is said: every label that is not shown stands in the list of what has no room, and nothing else. */
export const omittedIsSaid: Law = (scene) => {
  const order = (id: string): number => scene.units.findIndex((u) => u.unit === id);
  const folded = scene.labels.filter((label) => label.folded).map((label) => label.stream);
  const said = scene.omitted.flatMap((one) => (one.what === 'label' ? [one.stream] : []));
  const tagless = scene.units
    .filter((u) => (u.symbol.nameAt ? u.texts.length === 0 : !u.tagText && !u.symbol.tagless))
    .map((u) => u.unit);
  const saidTags = scene.omitted.flatMap((one) => (one.what === 'tag' ? [one.unit] : []));
  return [
    ...(folded.join() === said.join() ? [] : [`folded ${folded.join()}, said ${said.join()}`]),
    ...(tagless.join() === [...saidTags].sort((a, b) => order(a) - order(b)).join()
      ? []
      : [`no tag at ${tagless.join()}, said ${saidTags.join()}`]),
  ];
};

/** What holds for every sheet, however its units were placed, as long as no two of them lie on one another. */
export const LAWS: Readonly<Record<string, Law>> = {
  'lines meet their ports exactly and straight outward': linesMeetPorts,
  'lines have only right angles': onlyRightAngles,
  'no line crosses a symbol': noLineCrossesASymbol,
  'no two lines run along one another': noLinesRunAlong,
  'no label covers a symbol, line, diamond, text or another label': labelsCoverNothing,
  'every label is nearest to its own stream, or joined to it by a leader line': labelsAreNearestToTheirOwn,
  'leader lines meet nothing': leadersMeetNothing,
  'diamonds stand on their lines, apart from all else': diamondsStandFree,
  'tags, marks, remarks and duties cover nothing': textsCoverNothing,
  'labels, tags and diamonds keep off notes': notesStandFree,
  'what has no room is said': omittedIsSaid,
};

/**
 * Between two steps of the text scale texts are drawn a little smaller than they were placed for, about the same points. Then
 * the distances are a little smaller too, but nothing overlaps, and every label is nearest to its own stream still.
 */
export const LAWS_BETWEEN_STEPS: Readonly<Record<string, Law>> = {
  ...LAWS,
  'no label covers a symbol, line, diamond, text or another label': labelsClear(4),
  'every label is nearest to its own stream, or joined to it by a leader line': labelsAreNearer(1),
};
