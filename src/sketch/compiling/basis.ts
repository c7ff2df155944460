import type { ChemicalData } from '../../engine/chemicals/types';
import type { Basis } from '../../engine/network/types';
import type { Finding } from '../../engine/outcome';
import { type PairTables, resolvePairs } from '../../engine/thermo/pairs/resolve';
import { missingForModel } from '../../engine/thermo/pure/missing';
import { isVolumeAssumed } from '../../engine/thermo/pure/volumeConstant';
import { finding, word } from '../findings';
import type { Sketch } from '../types';
import { chemicalId, type FullList } from './air';
import { readModel } from './model';
import { ownChemicalData, ownConstantFaults, ownFaults } from './ownChemical';
import type { AssumptionDraft } from './scope';

/** What of the bank a sketch needs, already loaded. */
export interface BankData {
  readonly chemicals: ReadonlyMap<string, ChemicalData>;
  readonly pairs: PairTables;
}

export interface BasisRead {
  /** Undefined when a chemical or the model cannot be used. */
  readonly basis: Basis | undefined;
  /** Over the full list; undefined where the bank has no such chemical. */
  readonly data: readonly (ChemicalData | undefined)[];
  readonly gaps: readonly Finding[];
  readonly notes: readonly Finding[];
  readonly assumptions: readonly AssumptionDraft[];
}

/** Chemicals and model with every constant and pair inside, or the reasons why they cannot be had. */
export function readBasis(sketch: Sketch, list: FullList, bank: BankData): BasisRead {
  const ids = [...list.chemicals.map(chemicalId), ...list.added];
  const gaps: Finding[] = [];
  const notes: Finding[] = [];
  const assumptions: AssumptionDraft[] = [];
  const data = [...list.chemicals, ...list.added].map((chemical, k): ChemicalData | undefined => {
    if (typeof chemical !== 'string') return ownChemicalData(chemical.id, chemical.own);
    const known = bank.chemicals.get(chemical);
    if (!known)
      gaps.push(
        finding(
          'sketch/chemical-not-in-bank',
          'caution',
          { path: `chemicals.${k}`, chemical },
          word('chemical', chemical),
        ),
      );
    return known && k >= list.chemicals.length ? assumedOf(known) : known;
  });
  if (ids.length === 0) gaps.push(finding('sketch/no-chemicals', 'caution', { path: 'chemicals' }));

  const model = readModel(sketch.model, new Set(ids));
  gaps.push(...model.gaps);
  notes.push(...model.notes);
  assumptions.push(...model.assumptions);
  for (const [k, chemical] of data.entries()) {
    if (!chemical) continue;
    const at = { path: `chemicals.${k}`, chemical: chemical.id };
    for (const name of model.spec ? missingForModel(model.spec, chemical) : [])
      gaps.push(
        finding('sketch/chemical-lacks', 'caution', at, word('chemical', chemical.id), word('lacks', name)),
      );
    const given = list.chemicals[k];
    if (typeof given === 'object') gaps.push(...ownConstantFaults(given.own, at));
    gaps.push(...ownFaults(chemical, at));
    if (chemical.S0_J_molK === undefined)
      notes.push(finding('sketch/no-standard-entropy', 'note', at, word('chemical', chemical.id)));
    if (chemical.own && chemical.formula !== undefined && !chemical.elements)
      notes.push(finding('sketch/formula-not-read', 'caution', at, word('typed', chemical.formula)));
    assumptions.push(...assumptionsOf(chemical, k, list.forCombustion.has(chemical.id)));
  }
  const complete = data.filter((c) => c !== undefined);
  const basis =
    model.spec && gaps.length === 0
      ? {
          ...model.spec,
          pairs: model.spec.kind === 'raoult' ? [] : resolvePairs(complete, model, bank.pairs),
        }
      : undefined;
  return {
    basis: basis && {
      id: fingerprint(JSON.stringify([list.chemicals, list.added, sketch.model])),
      chemicals: complete,
      model: basis,
    },
    data,
    gaps,
    notes,
    assumptions,
  };
}

const assumed = new WeakMap<ChemicalData, ChemicalData>();
function assumedOf(chemical: ChemicalData): ChemicalData {
  const known = assumed.get(chemical) ?? { ...chemical, assumed: true };
  assumed.set(chemical, known);
  return known;
}

/** What is assumed of a chemical because nothing better is known. */
function assumptionsOf(
  chemical: ChemicalData,
  k: number,
  forCombustion: boolean,
): readonly AssumptionDraft[] {
  const found: AssumptionDraft[] = [];
  const path = `chemicals.${k}`;
  if (chemical.assumed)
    found.push({
      path,
      value: chemical.id,
      unitText: chemical.id,
      reason: `${forCombustion ? 'Combustion' : 'Air'} needs ${chemical.name.toLowerCase()}, which is not among the sketch's chemicals.`,
    });
  if (chemical.Hf_J_mol === undefined)
    found.push({
      path: `${path}.Hf`,
      value: 0,
      unitText: '0 J/mol',
      reason: `${chemical.name} has no enthalpy of formation: its enthalpy starts at 0.`,
    });
  if (isVolumeAssumed(chemical))
    found.push({
      path: `${path}.rhoL`,
      value: 800,
      unitText: '800 kg/m3',
      reason: `Nothing tells the liquid density of ${chemical.name}.`,
    });
  return found;
}

/** 64 bits of a text as an id, in two halves that mix differently. Equal texts give equal ids in every run. */
export function fingerprint(text: string): string {
  const half = (seed: number, factor: number): string => {
    let h = seed;
    for (let i = 0; i < text.length; i += 1) {
      h = Math.imul(h ^ text.charCodeAt(i), factor);
      h ^= h >>> 15;
    }
    return (h >>> 0).toString(16).padStart(8, '0');
  };
  return half(0x2545f491, 0x9e3779b1) + half(0x6c8e9cf5, 0x85ebca77);
}
