import { loadIndex } from '../../data/bank';
import { elementCounts, sameElements } from '../../engine/chemicals/elements';
import { GASES, type GasKey } from '../../engine/chemicals/gases';
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

/** What the bank calls these gases. */
const BANK_ID: Readonly<Record<GasKey, string>> = {
  N2: 'nitrogen',
  O2: 'oxygen',
  Ar: 'argon',
  CO2: 'carbon-dioxide',
  H2O: 'water',
  SO2: 'sulfur-dioxide',
  HCl: 'hydrogen-chloride',
};
const KEYS: readonly GasKey[] = ['N2', 'O2', 'Ar', 'CO2', 'H2O', 'SO2', 'HCl'];
/** What becomes of an element that burns. */
const BECOMES: Readonly<Record<string, GasKey>> = { C: 'CO2', H: 'H2O', S: 'SO2', N: 'N2', Cl: 'HCl' };

/** The sketch's chemicals in its order, then those that a unit brings in. */
export interface FullList {
  readonly chemicals: readonly SketchChemical[];
  readonly added: readonly string[];
  /** Which of those added only combustion asks for; air asks for the others. */
  readonly forCombustion: ReadonlySet<string>;
  readonly air: AirPlaces;
}

/** Id of a chemical of the sketch, from the bank or brought by the user. */
export const chemicalId = (chemical: SketchChemical): string =>
  typeof chemical === 'string' ? chemical : chemical.id;

/** The full list: what air and combustion need is found by CAS number, else by formula, else taken from the bank. */
export function fullList(sketch: Pick<Sketch, 'chemicals' | 'units'>, registry: Registry): FullList {
  const presets = new Set(
    sketch.units.flatMap((unit) => {
      const fields = kindOf(registry, unit.kind)?.settings;
      return fields ? presetsIn({ is: 'record', fields }, unit.settings) : [];
    }),
  );
  const forAir = new Set<GasKey>([...presets].flatMap((preset) => AIR_OF[preset]));
  const burns = sketch.units.some((unit) => kindOf(registry, unit.kind)?.brings === 'combustion');
  const forFire = burns ? combustionNeeds(sketch.chemicals) : new Set<GasKey>();
  const places: Record<GasKey, number> = { N2: -1, O2: -1, Ar: -1, CO2: -1, H2O: -1, SO2: -1, HCl: -1 };
  const added: string[] = [];
  const forCombustion = new Set<string>();
  for (const key of KEYS) {
    const id = BANK_ID[key];
    places[key] = place(sketch.chemicals, key);
    const wanted = forAir.has(key) || forFire.has(key);
    // An own chemical under the bank's name that is something else keeps the name; then the gas cannot be had.
    if (places[key] >= 0 || !wanted || sketch.chemicals.some((c) => chemicalId(c) === id)) continue;
    places[key] = sketch.chemicals.length + added.length;
    added.push(id);
    if (!forAir.has(key)) forCombustion.add(id);
  }
  return { chemicals: sketch.chemicals, added, forCombustion, air: places };
}

const formulas = new Map(loadIndex().map(({ id, formula }) => [id, formula]));

/** Oxygen, and what becomes of the elements in the sketch's chemicals; what neither burns nor leaves anything brings nothing. */
function combustionNeeds(chemicals: readonly SketchChemical[]): ReadonlySet<GasKey> {
  const needs = new Set<GasKey>(['O2']);
  for (const c of chemicals) {
    const formula = typeof c === 'string' ? formulas.get(c) : c.own.formula;
    const atoms = formula === undefined ? undefined : elementCounts(formula);
    for (const element of Object.keys(atoms ?? {})) {
      const gas = BECOMES[element];
      if (gas) needs.add(gas);
    }
  }
  return needs;
}

function place(chemicals: readonly SketchChemical[], key: GasKey): number {
  const { cas, elements } = GASES[key];
  const byCas = chemicals.findIndex((c) => (typeof c === 'string' ? c === BANK_ID[key] : c.own.cas === cas));
  if (byCas >= 0) return byCas;
  return chemicals.findIndex((c) => {
    if (typeof c === 'string' || c.own.cas !== undefined || c.own.formula === undefined) return false;
    const atoms = elementCounts(c.own.formula);
    return atoms !== undefined && sameElements(atoms, elements);
  });
}

/** Whether a value names a ready-made air. */
export const isPreset = (value: Json | undefined): value is AirPreset =>
  typeof value === 'string' && Object.hasOwn(AIR_OF, value);

const presetOf = (composition: unknown): readonly AirPreset[] => {
  const preset = isObject(composition) ? own(composition, 'preset') : undefined;
  return isPreset(preset) ? [preset] : [];
};

/** Ready-made airs that these settings ask for, wherever a composition may stand. */
function presetsIn(spec: SettingSpec, value: Json | undefined): readonly AirPreset[] {
  if (value === undefined) return spec.is === 'composition' ? presetOf(spec.otherwise?.value) : [];
  if (spec.is === 'list')
    return Array.isArray(value) ? (value as readonly Json[]).flatMap((v) => presetsIn(spec.of, v)) : [];
  if (!isObject(value)) return [];
  if (spec.is === 'composition') return presetOf(value);
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
