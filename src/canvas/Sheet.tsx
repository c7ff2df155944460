import { useCallback, useEffect, useLayoutEffect, useMemo, useRef, useState } from 'react';
import { createPortal } from 'react-dom';
import {
  type Node,
  type NodeChange,
  ReactFlow,
  ReactFlowProvider,
  SelectionMode,
  useOnViewportChange,
  useReactFlow,
  useStore,
  useStoreApi,
} from 'reactflow';
import 'reactflow/dist/style.css';
import type { UnitId } from '../engine/ids';
import { type Stores, useSession, useSketch, useStores } from '../store/react';
import './sheet.css';
import './drawing.css';
import './hand.css';
import './notes.css';
import { keepCentred, keepZones } from './asked';
import { BendLayer } from './BendLayer';
import { adds, chooseUnit } from './choose';
import { keepClipboard } from './clipboardEvents';
import { DropLayer } from './DropLayer';
import { createDrag } from './drag';
import { Frame } from './Frame';
import { putHandle } from './handle';
import { keepScene, quietAgain } from './keepScene';
import { endKeys } from './keys';
import { Lines } from './Lines';
import { Notes } from './Notes';
import { nodeCache } from './nodes';
import { OfferMenu } from './OfferMenu';
import { PullLayer } from './PullLayer';
import { steadyScale } from './quiet';
import { StreamMarks } from './StreamMarks';
import { createSheetStore, SheetProvider, type SheetStore, useSheet, useSheetStore } from './sheetStore';
import { TitleStrip } from './TitleStrip';
import { UnitNode } from './UnitNode';
import { createView, type SheetView } from './view';

const NODE_TYPES = { unit: UnitNode };
const NO_EDGES: never[] = [];
/** Middle and right button pan; the left one bands. */
const PAN_BUTTONS = [1, 2];
const SMALLEST = 0.25;
const LARGEST = 3;

/** The drawing area: React Flow carries place, zoom, drag and band; everything drawn comes from the scene. */
export function Sheet() {
  const [sheet] = useState(createSheetStore);
  return (
    <SheetProvider value={sheet}>
      <ReactFlowProvider>
        <View />
      </ReactFlowProvider>
    </SheetProvider>
  );
}

function View() {
  const stores = useStores();
  const sheet = useSheetStore();
  const flow = useReactFlow();
  const flowStore = useStoreApi();
  const root = useRef<HTMLElement | null>(null);
  const view = useMemo(() => createView(sheet, flow, flowStore, root), [sheet, flow, flowStore]);

  useLayoutEffect(() => keepScene(stores, sheet, () => flow.getZoom()), [stores, sheet, flow]);
  useEffect(() => putHandle(stores, view), [stores, view]);
  useEffect(() => keepCentred(stores, view), [stores, view]);
  useEffect(() => keepZones(stores, sheet), [stores, sheet]);
  useEffect(() => markHand(sheet, root), [sheet]);
  useEffect(() => keepClipboard(stores), [stores]);

  // Text and marks stand still on the screen while the sheet is zoomed: two custom properties, no rendering.
  const shownZoom = useRef(0);
  const scaleMarks = useCallback(
    ({ zoom }: { readonly zoom: number }) => {
      if (zoom === shownZoom.current) return;
      shownZoom.current = zoom;
      root.current?.style.setProperty('--inv', String(steadyScale(zoom)));
      root.current?.style.setProperty('--back', String(1 / zoom));
      quietAgain(sheet, zoom);
    },
    [sheet],
  );
  useOnViewportChange({ onChange: scaleMarks });

  const id = useSketch((state) => state.sketch.id);
  // biome-ignore lint/correctness/useExhaustiveDependencies: another sketch on the sheet is brought into view whole
  useEffect(() => {
    view.fit();
  }, [id, view]);

  const [size, setSize] = useState({ width: 0, height: 0 });
  useEffect(() => {
    const element = root.current?.querySelector('.sheet-flow');
    if (!element || typeof ResizeObserver === 'undefined') return;
    const observer = new ResizeObserver(() => {
      setSize({ width: element.clientWidth, height: element.clientHeight });
      view.resized();
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, [view]);

  return (
    <section className="sheet-view" aria-label="Drawing" ref={root}>
      <div className="sheet-flow">
        <Flow view={view} />
        <OfferMenu toScreen={view.toView} />
      </div>
      <div className="sheet-edge" />
      <Frame width={size.width} height={size.height} />
      <TitleStrip />
    </section>
  );
}

/** Units are under the hand: hand.css puts a pane before the sheet. */
const markHand = (sheet: SheetStore, root: { readonly current: HTMLElement | null }): (() => void) =>
  sheet.subscribe((now, before) => {
    if ((now.moved === null) !== (before.moved === null))
      root.current?.toggleAttribute('data-moving', now.moved !== null);
  });

/** What the hand does on the sheet. Made once: React Flow draws every node anew when it is handed other functions. */
function createHandlers(stores: Stores, sheet: SheetStore, view: SheetView) {
  const drag = createDrag(stores, sheet);
  let banding = false;
  return {
    onNodesChange(changes: NodeChange[]): void {
      drag.take(changes);
      if (!banding) return;
      const chosen = new Set(stores.session.getState().units);
      for (const item of changes) {
        if (item.type !== 'select') continue;
        if (item.selected) chosen.add(item.id as UnitId);
        else chosen.delete(item.id as UnitId);
      }
      stores.session.setState({ units: [...chosen] });
    },
    onNodeClick(event: React.MouseEvent, node: Node): void {
      endKeys(stores, sheet);
      chooseUnit(stores, node.id as UnitId, event);
    },
    onNodeDragStart: drag.start,
    onNodeDragStop: drag.stop,
    onSelectionStart(event: React.MouseEvent): void {
      banding = true;
      if (!adds(event)) stores.session.setState({ units: [], streams: [], notes: [] });
    },
    onSelectionEnd(): void {
      banding = false;
      const { units, streams } = stores.session.getState();
      if (units.length > 0) stores.session.select(units, streams);
    },
    onMoveStart(event: unknown): void {
      if (event) view.handled();
    },
    onPaneClick(): void {
      endKeys(stores, sheet);
      stores.session.select([], []);
    },
  };
}

/** React Flow with the scene's units as its nodes. */
function Flow({ view }: { readonly view: SheetView }) {
  const stores = useStores();
  const sheet = useSheetStore();
  const selected = useSession((state) => state.units);
  const writable = useSketch((state) => state.writable);
  const handlers = useMemo(() => createHandlers(stores, sheet, view), [stores, sheet, view]);
  const [cached] = useState(nodeCache);
  // A new answer that moves no unit leaves React Flow alone.
  const nodes = useSheet((state) => cached(state.scene.units, selected, state.moved));

  return (
    <ReactFlow
      {...handlers}
      nodes={nodes}
      edges={NO_EDGES}
      nodeTypes={NODE_TYPES}
      nodesDraggable={writable}
      nodesConnectable={false}
      nodesFocusable={false}
      edgesFocusable={false}
      disableKeyboardA11y
      deleteKeyCode={null}
      selectionKeyCode={null}
      multiSelectionKeyCode={null}
      selectionOnDrag
      selectNodesOnDrag={false}
      selectionMode={SelectionMode.Partial}
      panOnDrag={PAN_BUTTONS}
      zoomOnDoubleClick={false}
      nodeDragThreshold={3}
      minZoom={SMALLEST}
      maxZoom={LARGEST}
      attributionPosition="top-right"
    >
      {LAYERS}
    </ReactFlow>
  );
}

/**
 * Into the sheet's own coordinates, as React Flow's portal leads, which looks through the whole page for its place with every
 * change.
 */
function OnSheet({ children }: { readonly children: React.ReactNode }) {
  const area = useStore((state) => state.domNode);
  const place = useMemo(() => area?.querySelector('.react-flow__viewport-portal'), [area]);
  return place ? createPortal(children, place) : null;
}

/** The same element every time: a node under the hand is no reason to draw the layers anew. */
const LAYERS = (
  <OnSheet>
    <Notes kind="area" />
    <Lines />
    <BendLayer />
    <StreamMarks />
    <Notes kind="text" />
    <PullLayer />
    <DropLayer />
  </OnSheet>
);
