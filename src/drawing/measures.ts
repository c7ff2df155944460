import {
  DIMENSIONS,
  type Dimension,
  type Measures,
  parseQuantity,
  type Site,
  STANDARD_SITE,
  unitRefusal,
} from '../quantity';
import type { Sketch } from '../sketch/types';

const GAUGE = { SI: 'kPa(g)', metric: 'bar(g)', US: 'psi(g)' } as const;
const ABSOLUTE = { SI: 'kPa(a)', metric: 'bar(a)', US: 'psi(a)' } as const;

/** Where the sketch stands; a site pressure that cannot be read counts as not given and shows as a gap elsewhere. */
export function siteOf(site: Sketch['site']): Site {
  if (site.pressure === undefined) return STANDARD_SITE;
  const read = parseQuantity(site.pressure, 'pressure');
  return read.ok ? { P_Pa: read.si } : STANDARD_SITE;
}

/** What numbers are shown in: the sketch's set, its own units where they fit, (g) counted from its site. */
export function measuresOf({ display, site }: Pick<Sketch, 'display' | 'site'>): Measures {
  const units: Partial<Record<Dimension, string>> = {};
  if (display.gauge) units.pressure = GAUGE[display.set];
  for (const dim of DIMENSIONS) {
    const chosen = display.units?.[dim];
    if (chosen !== undefined && !unitRefusal(chosen, dim)) units[dim] = chosen;
  }
  return { set: display.set, units, site: siteOf(site) };
}

/** "bar(g)", "barg" and "bar" are all bar. */
const plainPressure = (unit: string): string =>
  unit.replace(/\([ag]\)$/, '').replace(/^(bar|psi)[ag]$/, '$1');

/** The same measures with pressures absolute, or counted from the site; in the unit that was chosen for them, where one was. */
export function withReference(measures: Measures, reference: 'absolute' | 'gauge'): Measures {
  const own = measures.units?.pressure;
  const usual = (reference === 'gauge' ? GAUGE : ABSOLUTE)[measures.set];
  const plain = plainPressure(own ?? usual);
  // Not every unit takes a mark: one without counts as absolute.
  const wanted = reference === 'gauge' ? [`${plain}(g)`] : [`${plain}(a)`, plain];
  const pressure = wanted.find((unit) => !unitRefusal(unit, 'pressure')) ?? usual;
  return { ...measures, units: { ...measures.units, pressure } };
}
