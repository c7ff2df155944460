import type { Read } from '../../engine/network/types';
import type { Finding } from '../../engine/outcome';
import { finding, word } from '../findings';
import { kindOf, type Registry } from '../registry';
import type { SketchUnit } from '../types';
import type { AirPlaces } from './air';
import { type AssumptionDraft, GAP, type Scope } from './scope';
import { readSettings } from './settings';

/** What all units of one compile share. */
export interface Surroundings {
  readonly registry: Registry;
  readonly indexOf: ReadonlyMap<string, number>;
  readonly MW_g_mol: readonly (number | undefined)[];
  readonly air: AirPlaces;
  readonly sitePressure_Pa: number | undefined;
  /** Changes whenever one of the above does. */
  readonly key: string;
}

/** One unit compiled: settings in SI with chemicals as places of the full list, or null with the gaps. */
export interface UnitRead {
  /** Compiled settings, or null when something is missing. */
  readonly settings: unknown;
  readonly gaps: readonly Finding[];
  readonly notes: readonly Finding[];
  readonly assumptions: readonly AssumptionDraft[];
  readonly reads: readonly Read[];
  readonly usesSitePressure: boolean;
}

/** Reads a unit's settings; the same record in the same surroundings gives the same object. */
export function makeUnitReader(): (unit: SketchUnit, ports: readonly string[], s: Surroundings) => UnitRead {
  const known = new WeakMap<SketchUnit['settings'], { readonly key: string; readonly read: UnitRead }>();
  return (unit, ports, surroundings) => {
    const key = JSON.stringify([unit.id, unit.kind, ports, surroundings.key]);
    const before = known.get(unit.settings);
    if (before?.key === key) return before.read;
    const read = readUnit(unit, ports, surroundings);
    known.set(unit.settings, { key, read });
    return read;
  };
}

function readUnit(unit: SketchUnit, ports: readonly string[], surroundings: Surroundings): UnitRead {
  const kind = kindOf(surroundings.registry, unit.kind);
  if (!kind) {
    const gap = finding('sketch/kind-not-available', 'caution', { unit: unit.id }, word('kind', unit.kind));
    return {
      settings: null,
      gaps: [gap],
      notes: [],
      assumptions: [],
      reads: [],
      usesSitePressure: false,
    };
  }
  const scope: Scope = {
    ...surroundings,
    unit: unit.id,
    kind,
    typed: unit.settings,
    ports,
    gaps: [],
    notes: [],
    assumptions: [],
    reads: [],
    usesSitePressure: false,
  };
  const settings = readSettings(unit.settings, scope);
  if (settings === GAP && scope.gaps.length === 0) throw new Error(`${unit.kind}: a gap without a reason`);
  const { gaps, notes, assumptions, reads, usesSitePressure } = scope;
  return { settings: settings === GAP ? null : settings, gaps, notes, assumptions, reads, usesSitePressure };
}
