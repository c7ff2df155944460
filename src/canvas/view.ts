import type { ReactFlowInstance, useStoreApi } from 'reactflow';
import { textScaleAt } from '../drawing/textScale';
import type { Point } from '../drawing/types';
import { fitting } from './extent';
import type { SheetHandle } from './handle';
import type { SheetStore } from './sheetStore';

const MARGIN = 20;
const LEAST_ZOOM = 0.25;
/** What is shown stands at least this far from the edges of the view [px]. */
const WELL_IN = 88;

export interface SheetView extends SheetHandle {
  readonly toView: (at: Point) => { readonly x: number; readonly y: number };
  /** The view has another size: a drawing that was shown whole is shown whole again. */
  readonly resized: () => void;
  /** Somebody moved or zoomed the view by hand: it stays as it is from now on. */
  readonly handled: () => void;
}

interface Root {
  readonly current: HTMLElement | null;
}

/** What the sheet can be asked to show. `toView`: a sheet point, from the corner of the drawing area. */
export function createView(
  store: SheetStore,
  flow: ReactFlowInstance,
  flowStore: ReturnType<typeof useStoreApi>,
  root: Root,
): SheetView {
  // The element knows a new size before React Flow has measured it.
  const size = (): Point => {
    const { width, height } = flowStore.getState();
    const area = root.current?.querySelector('.sheet-flow');
    return [area?.clientWidth || width, area?.clientHeight || height];
  };
  let isFitted = false;
  const put = (middle: Point, zoom: number): void => {
    const [w, h] = size();
    void flow.setViewport({ x: w / 2 - middle[0] * zoom, y: h / 2 - middle[1] * zoom, zoom });
  };
  const middle = (): Point => {
    const [w, h] = size();
    const { x, y, zoom } = flow.getViewport();
    return [(w / 2 - x) / zoom, (h / 2 - y) / zoom];
  };
  const toView = ([px, py]: Point): { x: number; y: number } => {
    const { x, y, zoom } = flow.getViewport();
    return { x: px * zoom + x, y: py * zoom + y };
  };

  return {
    store,
    toView,
    middle,
    zoom: () => flow.getZoom(),
    zoomBy(factor) {
      isFitted = false;
      put(middle(), Math.min(3, Math.max(LEAST_ZOOM, flow.getZoom() * factor)));
    },
    zoomTo(zoom) {
      isFitted = false;
      put(middle(), zoom);
    },
    resized() {
      if (isFitted) this.fit();
    },
    handled() {
      isFitted = false;
    },
    fit() {
      const [w, h] = size();
      if (store.getState().scene.units.length === 0 || w === 0 || h === 0) return;
      const wanted = (): ReturnType<typeof fitting> =>
        fitting(store.getState().scene, w - 2 * MARGIN, h - 2 * MARGIN, LEAST_ZOOM);
      // What keeps its size needs more room the smaller the rest gets: a few rounds settle it.
      for (let round = 0; round < 4; round += 1) store.setState({ textScale: textScaleAt(wanted().zoom) });
      const { zoom, middle: at } = wanted();
      put(at, zoom);
      isFitted = true;
    },
    centre(at) {
      isFitted = false;
      put(at, flow.getZoom());
    },
    reveal(at) {
      const [w, h] = size();
      const { x, y } = toView(at);
      const over = (value: number, length: number): number => {
        const margin = Math.min(WELL_IN, length / 3);
        return value < margin ? value - margin : Math.max(0, value - (length - margin));
      };
      const [dx, dy] = [over(x, w), over(y, h)];
      if (dx === 0 && dy === 0) return;
      const viewport = flow.getViewport();
      void flow.setViewport({ ...viewport, x: viewport.x - dx, y: viewport.y - dy });
    },
    toSheet(clientX, clientY) {
      const area = root.current?.querySelector('.sheet-flow')?.getBoundingClientRect();
      if (!area || clientX < area.left || clientX > area.right || clientY < area.top || clientY > area.bottom)
        return null;
      const { x, y } = flow.screenToFlowPosition({ x: clientX, y: clientY }, { snapToGrid: false });
      return [x, y];
    },
    focus(what) {
      const name =
        'unit' in what ? `[data-focus-unit="${what.unit}"]` : `[data-focus-stream="${what.stream}"]`;
      root.current?.querySelector<HTMLElement>(name)?.focus({ preventScroll: true });
    },
  };
}
