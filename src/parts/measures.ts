import { useMemo } from 'react';
import { measuresOf, siteOf } from '../drawing/measures';
import type { Measures, Site } from '../quantity';
import { useSketch } from '../store/react';

export { measuresOf, siteOf, withReference } from '../drawing/measures';

export function useMeasures(): Measures {
  const display = useSketch((state) => state.sketch.display);
  const site = useSketch((state) => state.sketch.site);
  return useMemo(() => measuresOf({ display, site }), [display, site]);
}

export function useSite(): Site {
  const site = useSketch((state) => state.sketch.site);
  return useMemo(() => siteOf(site), [site]);
}
