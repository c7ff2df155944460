import { type ElementCounts, elementCounts } from '../../engine/chemicals/elements';
import type { SettingSpec } from '../../engine/units/types';
import { isObject, own } from '../json';
import { kindOf, type Registry } from '../registry';
import type { Json, Sketch, SketchChemical } from '../types';

export type AirPreset = 'dry air' | '79/21' | 'humid air';
export type AirKey = 'N2' | 'O2' | 'Ar' | 'CO2' | 'H2O';
/** Index in the full list; -1 where a preset does not need it and nobody listed it. */
export type AirPlaces = Readonly<Record<AirKey, number>>;

/** What each ready-made air is made of. */
export const AIR_OF: Readonly<Record<AirPreset, readonly AirKey[]>> = {
  'dry air': ['N2', 'O2', 'Ar', 'CO2'],
  '79/21': ['N2', 'O2'],
  'humid air': ['N2', 'O2', 'Ar', 'CO2', 'H2O'],
};

const AIR: Readonly<
  Record<AirKey, { readonly id: string; readonly cas: string; readonly elements: ElementCounts }>
> = {
  N2: { id: 'nitrogen', cas: '7727-37-9', elements: { N: 2 } },
  O2: { id: 'oxygen', cas: '7782-44-7', elements: { O: 2 } },
  Ar: { id: 'argon', cas: '7440-37-1', elements: { Ar: 1 } },
  CO2: { id: 'carbon-dioxide', cas: '124-38-9', elements: { C: 1, O: 2 } },
  H2O: { id: 'water', cas: '7732-18-5', elements: { H: 2, O: 1 } },
};
const KEYS: readonly AirKey[] = ['N2', 'O2', 'Ar', 'CO2', 'H2O'];

/** The sketch's chemicals in its order, then those that a unit brings in. */
export interface FullList {
  readonly chemicals: readonly SketchChemical[];
  readonly added: readonly string[];
  readonly air: AirPlaces;
}

export const chemicalId = (chemical: SketchChemical): string =>
  typeof chemical === 'string' ? chemical : chemical.id;

/** The full list: what ready-made air needs is found by CAS number, else by formula, else taken from the bank. */
export function fullList(sketch: Pick<Sketch, 'chemicals' | 'units'>, registry: Registry): FullList {
  const needed = new Set(
    sketch.units.flatMap((unit) => {
      const fields = kindOf(registry, unit.kind)?.settings;
      return fields ? presetsIn({ is: 'record', fields }, unit.settings) : [];
    }),
  );
  const air: Record<AirKey, number> = { N2: -1, O2: -1, Ar: -1, CO2: -1, H2O: -1 };
  const added: string[] = [];
  const wanted = new Set([...needed].flatMap((preset) => AIR_OF[preset]));
  for (const key of KEYS) {
    const { id } = AIR[key];
    air[key] = place(sketch.chemicals, key);
    // An own chemical under the bank's name that is something else keeps the name; then the air cannot be had.
    if (air[key] >= 0 || !wanted.has(key) || sketch.chemicals.some((c) => chemicalId(c) === id)) continue;
    air[key] = sketch.chemicals.length + added.length;
    added.push(id);
  }
  return { chemicals: sketch.chemicals, added, air };
}

function place(chemicals: readonly SketchChemical[], key: AirKey): number {
  const { id, cas, elements } = AIR[key];
  const byCas = chemicals.findIndex((c) => (typeof c === 'string' ? c === id : c.own.cas === cas));
  if (byCas >= 0) return byCas;
  return chemicals.findIndex(
    (c) =>
      typeof c !== 'string' &&
      c.own.cas === undefined &&
      c.own.formula !== undefined &&
      sameElements(elementCounts(c.own.formula), elements),
  );
}

function sameElements(a: ElementCounts | undefined, b: ElementCounts): boolean {
  if (a === undefined) return false;
  const keys = Object.keys(a);
  return keys.length === Object.keys(b).length && keys.every((k) => a[k] === b[k]);
}

export const isPreset = (value: Json | undefined): value is AirPreset =>
  typeof value === 'string' && Object.hasOwn(AIR_OF, value);

/** Ready-made airs that these settings ask for, wherever a composition may stand. */
function presetsIn(spec: SettingSpec, value: Json | undefined): readonly AirPreset[] {
  if (value === undefined) return [];
  if (spec.is === 'list')
    return Array.isArray(value) ? (value as readonly Json[]).flatMap((v) => presetsIn(spec.of, v)) : [];
  if (!isObject(value)) return [];
  if (spec.is === 'composition') {
    const preset = own(value, 'preset');
    return isPreset(preset) ? [preset] : [];
  }
  if (spec.is === 'map') return Object.values(value).flatMap((v) => presetsIn(spec.of, v));
  if (spec.is === 'record' || spec.is === 'some') {
    const fields = spec.is === 'record' ? spec.fields : spec.of;
    return Object.entries(fields).flatMap(([key, field]) => presetsIn(field, own(value, key)));
  }
  if (spec.is === 'cases') {
    const name = own(value, spec.by);
    const chosen = typeof name === 'string' && Object.hasOwn(spec.cases, name) ? spec.cases[name] : undefined;
    return chosen ? presetsIn(chosen, value) : [];
  }
  return [];
}
