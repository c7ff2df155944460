import { useSession, useSketch, useStores } from '../store/react';
import type { DrawerChoice } from '../store/session';
import { AssumptionsDrawer } from './AssumptionsDrawer';
import { ChemicalsDrawer } from './chemicals/ChemicalsDrawer';
import { LimitsDrawer } from './LimitsDrawer';
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
};

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
  const width = useDrawerWidth();
  const key = drawer ? `${drawer.is} ${'id' in drawer ? drawer.id : ''}` : '';
  if (!drawer || !isThere) return null;
  return (
    <aside className="drawer" aria-label={NAMES[drawer.is]} style={{ width: width.px }}>
      <Splitter width={width} />
      {/* biome-ignore lint/a11y/noStaticElementInteractions: Esc leaves the drawer from any of its fields */}
      <div
        className="drawer-inner"
        onKeyDown={(event) => {
          if (event.key === 'Escape' && !event.defaultPrevented) session.openDrawer(null);
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
    case 'chemicals':
      return <ChemicalsDrawer />;
    case 'sketch':
      return <SketchDrawer />;
  }
}
