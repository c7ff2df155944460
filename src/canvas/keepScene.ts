import { buildScene, sameLayout } from '../drawing/scene';
import { textScaleAt } from '../drawing/textScale';
import type { Scene } from '../drawing/types';
import { linesUnderHand } from '../drawing/underHand';
import type { UnitId } from '../engine/ids';
import type { Finding } from '../engine/outcome';
import { measuresOf } from '../parts/measures';
import type { Sketch } from '../sketch/types';
import type { Stores } from '../store/react';
import type { ResultsState } from '../store/resultsStore';
import type { SayContext } from '../wording';
import { withBends } from './bends';
import { streamName, unitName } from './names';
import { quietAt } from './quiet';
import { createSceneInput } from './sceneInput';
import { AT_REST, letFollow, type SheetState, type SheetStore } from './sheetStore';
import { tagOf } from './words';

/** The list as a map by id; the known map itself when the list is the same. */
const indexed = <T, K>(
  list: readonly T[],
  before: readonly T[],
  known: ReadonlyMap<K, T>,
  keyOf: (item: T) => K,
): ReadonlyMap<K, T> => (list === before ? known : new Map(list.map((item) => [keyOf(item), item])));

/**
 * Keeps the sheet's scene in step with sketch and results: one pure function of both, with every shape handed on as the
 * same object wherever nothing changed, so that only the views of what changed are drawn again.
 */
export function keepScene(stores: Stores, sheet: SheetStore, zoomNow: () => number): () => void {
  const input = createSceneInput();
  let scene: Scene | undefined;
  let still: Pick<SheetState, 'lines' | 'labels'> = { lines: new Map(), labels: new Map() };

  const build = (): void => {
    const { sketch } = stores.sketch.getState();
    const { gaps } = stores.compiled.getState();
    const results = stores.results.getState();
    const before = sheet.getState();
    const next = buildScene(sketch, input(sketch, results, gaps, before.textScale), scene);
    const units = indexed(next.units, before.scene.units, before.units, (shape) => shape.unit);
    const lines = indexed(next.lines, before.scene.lines, still.lines, (shape) => shape.stream);
    const labels = indexed(next.labels, before.scene.labels, still.labels, (shape) => shape.stream);
    scene = next;
    still = { lines, labels };
    sheet.setState({
      scene: next,
      units,
      ...withHand(before),
      ...namesOf(sketch, results, gaps, units, labels),
      ...(sameRoom(next, before.scene) ? {} : { quiet: quietAt(next, zoomNow()) }),
    });
  };

  /** Lines and labels with what the hand is moving laid over them. */
  const withHand = ({ moved, bends }: Pick<SheetState, 'moved' | 'bends'>): typeof still => {
    if (!scene || (!moved && !bends)) return still;
    const { streams } = withBends(stores.sketch.getState().sketch, bends);
    const over = linesUnderHand(scene, streams, moved ?? new Map(), new Set(bends?.keys()));
    return {
      lines: new Map([...still.lines, ...over.lines]),
      labels: new Map([...still.labels, ...over.labels]),
    };
  };

  letFollow(sheet, withHand);
  build();
  let shown = stores.sketch.getState().sketch;
  const stop = [
    stores.sketch.subscribe(({ sketch }) => {
      if (sketch === shown) return;
      shown = sketch;
      prune(stores, sketch);
      settle(stores, sheet);
      build();
    }),
    stores.results.subscribe((now, before) => {
      if (now.streams !== before.streams || now.units !== before.units || now.findings !== before.findings)
        build();
    }),
    stores.compiled.subscribe((now, before) => {
      if (now.gaps !== before.gaps && placesOf(now.gaps) !== placesOf(before.gaps)) build();
    }),
    sheet.subscribe((now, before) => {
      const held = now.moved !== before.moved || now.bends !== before.bends;
      if (now.textScale !== before.textScale) build();
      else if (held && now.lines === before.lines) sheet.setState(withHand(now));
    }),
  ];
  return () => {
    for (const end of stop) end();
  };
}

/** Whether nothing took or left room, so that the same labels step back. */
const sameRoom = (a: Scene, b: Scene): boolean =>
  a === b ||
  (sameLayout(a, b) &&
    a.units.every((unit, k) => (unit.limit === undefined) === (b.units[k]?.limit === undefined)));

/** What is missing where, as one text: compiling makes its list anew with every edit. */
const placesOf = (gaps: readonly Finding[]): string =>
  gaps.map(({ code, at }) => [code, at.unit, at.path, at.port].join(' ')).join('\n');

/** Texts are placed anew when the zoom changes what room they need. */
export function quietAgain(sheet: SheetStore, zoom: number): void {
  sheet.setState({ textScale: textScaleAt(zoom) });
  sheet.setState({ quiet: quietAt(sheet.getState().scene, zoom) });
}

function namesOf(
  sketch: Sketch,
  results: ResultsState,
  gaps: readonly Finding[],
  units: SheetState['units'],
  labels: SheetState['labels'],
): Pick<SheetState, 'unitNames' | 'streamNames'> {
  const limits = new Map<UnitId, Finding[]>();
  for (const finding of results.findings) {
    const unit = finding.at.unit;
    if (unit) limits.set(unit, [...(limits.get(unit) ?? []), finding]);
  }
  const context: SayContext = {
    measures: measuresOf(sketch),
    tag: (id) => tagOf(sketch, id),
    kind: (id) => sketch.units.find((unit) => unit.id === id)?.kind,
    number: (id) => sketch.streams.find((stream) => stream.id === id)?.number,
  };
  return {
    unitNames: new Map(
      sketch.units.map((unit) => [
        unit.id,
        unitName(
          unit,
          units.get(unit.id),
          [
            ...gaps.filter((gap) => gap.at.unit === unit.id),
            ...(results.units.get(unit.id)?.latest.reasons ?? []),
          ],
          limits.get(unit.id) ?? [],
          context,
        ),
      ]),
    ),
    streamNames: new Map(
      sketch.streams.map((stream) => [
        stream.id,
        streamName(stream, labels.get(stream.id), (id) => tagOf(sketch, id)),
      ]),
    ),
  };
}

/** Another document ends what was under way on the one before. */
function settle({ session }: Stores, sheet: SheetStore): void {
  const { moved, bends, heldNotes, pulling, offer } = sheet.getState();
  if (moved || bends || heldNotes) sheet.setState(AT_REST);
  if (pulling || offer) {
    sheet.setState({ pulling: null, offer: null });
    session.setState({ connecting: null });
  }
}

/** What is gone from the sketch leaves the selection and the drawer. */
function prune({ session }: Stores, sketch: Sketch): void {
  const { units, streams, notes, drawer } = session.getState();
  const has = (list: readonly { readonly id: string }[], id: string): boolean =>
    list.some((record) => record.id === id);
  if (!units.every((id) => has(sketch.units, id)))
    session.setState({ units: units.filter((id) => has(sketch.units, id)) });
  if (!streams.every((id) => has(sketch.streams, id)))
    session.setState({ streams: streams.filter((id) => has(sketch.streams, id)) });
  if (!notes.every((id) => has(sketch.notes, id)))
    session.setState({ notes: notes.filter((id) => has(sketch.notes, id)) });
  if (drawer?.is === 'unit' && !has(sketch.units, drawer.id)) session.setState({ drawer: null });
  if (drawer?.is === 'stream' && !has(sketch.streams, drawer.id)) session.setState({ drawer: null });
}
