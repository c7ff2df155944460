import { useEffect, useLayoutEffect, useRef } from 'react';
import { useSession, useSketch, useStores } from '../store/react';
import type { DrawerChoice } from '../store/session';
import { AssumptionsDrawer } from './AssumptionsDrawer';
import { BasisDrawer } from './basis/BasisDrawer';
import { ChemicalsDrawer } from './chemicals/ChemicalsDrawer';
import { LimitsDrawer } from './LimitsDrawer';
import { OWN_PARTS } from './own';
import { Splitter, useDrawerWidth } from './Splitter';
import { SketchDrawer } from './sketch/SketchDrawer';
import { StreamDrawer } from './stream/StreamDrawer';
import { UnitDrawer } from './unit/UnitDrawer';
import '../parts/parts.css';
import './drawers.css';

const NAMES: Readonly<Record<DrawerChoice['is'], string>> = {
  unit: 'Unit drawer',
  stream: 'Stream drawer',
  limits: 'Limits drawer',
  assumptions: 'Assumption register',
  chemicals: 'Chemicals drawer',
  sketch: 'Sketch drawer',
  basis: 'Design basis drawer',
};

/** Where the keyboard begins: what the drawer names for it, else what needs a value, else its first control. */
const BEGIN = [
  '[data-begin]:not(:disabled)',
  '[data-state="needed"] :is(input, select):not(:disabled)',
  '.drawer-body :is(input, select, textarea, button):not(:disabled)',
  'button',
];

/** The drawer's element, and a way out of it that gives the focus back to where it was before. */
function useEntering() {
  const { session } = useStores();
  const root = useRef<HTMLElement>(null);
  const cameFrom = useRef<HTMLElement | null>(null);
  const entered = useSession((state) => state.drawerEntered);
  const seen = useRef(entered);
  useEffect(() => {
    if (seen.current === entered) return;
    seen.current = entered;
    for (const selector of BEGIN) {
      const target = root.current?.querySelector<HTMLElement>(selector);
      if (!target) continue;
      target.focus();
      return;
    }
  }, [entered]);
  const onFocus = (event: React.FocusEvent): void => {
    const from = event.relatedTarget;
    if (from instanceof HTMLElement && !event.currentTarget.contains(from)) cameFrom.current = from;
  };
  const leave = (): void => {
    session.openDrawer(null);
    if (cameFrom.current?.isConnected) cameFrom.current.focus({ preventScroll: true });
  };
  return { root, onFocus, leave };
}

/** The place at the side: one drawer at a time, folded away when there is none. */
export function DrawerHost() {
  const { session } = useStores();
  const drawer = useSession((state) => state.drawer);
  // A unit or stream that has gone (deleted, undone, another sketch) takes its drawer with it.
  const isThere = useSketch((state) => {
    if (drawer?.is === 'unit') return state.sketch.units.some((unit) => unit.id === drawer.id);
    if (drawer?.is === 'stream') return state.sketch.streams.some((stream) => stream.id === drawer.id);
    return drawer !== null;
  });
  const kind = useSketch((state) =>
    drawer?.is === 'unit' ? state.sketch.units.find((unit) => unit.id === drawer.id)?.kind : undefined,
  );
  const own = kind !== undefined && Object.hasOwn(OWN_PARTS, kind) ? OWN_PARTS[kind] : undefined;
  const width = useDrawerWidth(own?.width);
  const { root, onFocus, leave } = useEntering();
  const key = drawer ? `${drawer.is} ${'id' in drawer ? drawer.id : ''}` : '';
  const drawerPx = drawer && isThere ? width.px : 0;
  useLayoutEffect(() => session.setState({ drawerPx }), [session, drawerPx]);
  if (!drawer || !isThere) return null;
  return (
    <aside
      className="drawer"
      aria-label={NAMES[drawer.is]}
      style={{ width: width.px }}
      ref={root}
      onFocus={onFocus}
    >
      <Splitter width={width} />
      {/* biome-ignore lint/a11y/noStaticElementInteractions: Esc leaves the drawer from any of its fields */}
      <div
        className="drawer-inner"
        onKeyDown={(event) => {
          if (event.key !== 'Escape' || event.defaultPrevented) return;
          event.preventDefault();
          leave();
        }}
      >
        <Content key={key} drawer={drawer} />
      </div>
    </aside>
  );
}

function Content({ drawer }: { readonly drawer: DrawerChoice }) {
  switch (drawer.is) {
    case 'unit':
      return <UnitDrawer id={drawer.id} />;
    case 'stream':
      return <StreamDrawer id={drawer.id} />;
    case 'limits':
      return <LimitsDrawer />;
    case 'assumptions':
      return <AssumptionsDrawer />;
    case 'basis':
      return <BasisDrawer />;
    case 'chemicals':
      return <ChemicalsDrawer />;
    case 'sketch':
      return <SketchDrawer />;
  }
}
