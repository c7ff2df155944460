import type { Finding } from '../../engine/outcome';
import type { SiteSI } from '../../engine/units/types';
import { parseQuantity, STANDARD_ATMOSPHERE_Pa } from '../../quantity';
import { finding, word } from '../findings';
import type { Quantity, Sketch } from '../types';
import { isGiven, refusalEvidence } from './quantity';
import type { AssumptionDraft } from './scope';

/** What counts where the sketch says nothing about its site; listed as an assumption once something uses it. */
export const SITE_DEFAULTS = {
  pressure: { SI: STANDARD_ATMOSPHERE_Pa, text: '101325 Pa', why: 'Gauge pressures count from it.' },
  ambient: { SI: 293.15, text: '20 degC', why: 'The site has no ambient temperature.' },
  coolingWater: { SI: 301.15, text: '28 degC', why: 'Limits of cooling count from its inlet.' },
} as const;

export type SiteKey = keyof typeof SITE_DEFAULTS;

export interface SiteRead {
  readonly site: SiteSI;
  /** Keys that cannot be read: what needs them has no value. */
  readonly broken: ReadonlySet<SiteKey>;
  readonly gaps: readonly Finding[];
}

const KEYS: readonly SiteKey[] = ['pressure', 'ambient', 'coolingWater'];

/**
 * The site's values in SI; what cannot be read, a gauge site pressure or a value that is not above zero leaves a gap and the
 * standard value.
 */
export function readSite(site: Sketch['site']): SiteRead {
  const gaps: Finding[] = [];
  const broken = new Set<SiteKey>();
  const read = (key: SiteKey): number => {
    const given: Quantity | undefined = site[key];
    const standard = SITE_DEFAULTS[key].SI;
    if (!isGiven(given)) return standard;
    const at = { path: `site.${key}` };
    const parsed = parseQuantity(given, key === 'pressure' ? 'pressure' : 'temperature');
    if (parsed.ok && !parsed.gauge && parsed.si > 0) return parsed.si;
    broken.add(key);
    if (parsed.ok)
      gaps.push(
        finding(
          parsed.gauge ? 'sketch/gauge-at-site' : 'sketch/below-minimum',
          'caution',
          at,
          word('typed', String(given)),
        ),
      );
    else
      gaps.push(finding('sketch/not-a-quantity', 'caution', at, ...refusalEvidence(String(given), parsed)));
    return standard;
  };
  const [pressure_Pa, ambient_K, coolingWater_K] = KEYS.map(read) as [number, number, number];
  return { site: { pressure_Pa, ambient_K, coolingWater_K }, broken, gaps };
}

/** The entry of the register for a value that is used and was not given. */
export const siteAssumption = (key: SiteKey): AssumptionDraft => ({
  path: `site.${key}`,
  value: SITE_DEFAULTS[key].SI,
  unitText: SITE_DEFAULTS[key].text,
  reason: SITE_DEFAULTS[key].why,
});
