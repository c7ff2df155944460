import type { PhaseResult } from '../engine/network/types';
import type { Dimension } from '../quantity/dimension';
import type { SolvedStream } from './input';
import { isGas, STANDARD_LIQUID, vapour_mol_s } from './volumeFlows';

/** One row of the stream table: what it measures and where the value comes from. */
export interface RowRule {
  readonly key: string;
  readonly label: string;
  readonly dim: Dimension;
  /** Unit text when it is not the measures' own choice. */
  readonly unit?: string;
  /** Gauge row of a pressure. */
  readonly gauge?: true;
  readonly unitLabel?: string;
  /** An amount told as volume of ideal gas: the measures say at which state, which is part of the label. */
  readonly asGas?: true;
  readonly figures: number;
  readonly least: number;
  readonly most: number;
  readonly bold?: true;
  readonly value: (stream: SolvedStream) => number | undefined;
}

type Block = 'vapour' | 'liquid' | 'liquid2';

/** A dense phase's name is printed in the row 'phase'. */
const belongs = (p: PhaseResult, block: Block): boolean => (block === 'vapour' ? isGas(p) : p.kind === block);

/** Whether a stream has something to print in a block. */
export const hasBlock = (stream: SolvedStream, block: Block): boolean =>
  stream.phases.some((p) => p.fraction > 0 && belongs(p, block));

const of =
  (block: Block, pick: (p: PhaseResult, stream: SolvedStream) => number | undefined) =>
  (stream: SolvedStream): number | undefined => {
    const found = stream.phases.find((p) => p.fraction > 0 && belongs(p, block));
    return found ? pick(found, stream) : undefined;
  };

const massFlow = (p: PhaseResult, s: SolvedStream): number => (p.fraction * s.n_mol_s * p.MW_g_mol) / 1000;

/** The words for a stream's phases, as printed. */
export function phaseWord(stream: SolvedStream): string {
  const present = stream.phases.filter((p) => p.fraction > 0).map((p) => p.kind);
  if (present.length === 0) return 'no flow';
  if (present.length > 2) return 'three-phase';
  if (present.length > 1)
    return present[0] === 'vapour' || present[0] === 'dense' ? 'two-phase' : 'two liquids';
  return present[0] === 'liquid2' ? 'liquid' : (present[0] ?? 'no flow');
}

export const CONDITION_ROWS: readonly RowRule[] = [
  { key: 'T', label: 'Temperature', dim: 'temperature', figures: 4, least: 1, most: 2, value: (s) => s.T_K },
  { key: 'P', label: 'Pressure', dim: 'pressure', figures: 5, least: 3, most: 4, value: (s) => s.P_Pa },
  {
    key: 'Pg',
    label: 'Pressure',
    dim: 'pressure',
    gauge: true,
    figures: 5,
    least: 3,
    most: 4,
    value: (s) => s.P_Pa,
  },
  {
    key: 'vapourFraction',
    label: 'Vapour fraction, molar',
    dim: 'fraction',
    unitLabel: 'mol/mol',
    figures: 4,
    least: 4,
    most: 4,
    value: (s) => s.vapourFraction,
  },
  {
    key: 'vapourMassFraction',
    label: 'Vapour fraction, mass',
    dim: 'fraction',
    unitLabel: 'kg/kg',
    figures: 4,
    least: 4,
    most: 4,
    value: (s) => s.vapourMassFraction,
  },
];

export const FLOW_ROWS: readonly RowRule[] = [
  {
    key: 'n',
    label: 'Molar flow',
    dim: 'molarFlow',
    figures: 6,
    least: 2,
    most: 6,
    bold: true,
    value: (s) => s.n_mol_s,
  },
  {
    key: 'm',
    label: 'Mass flow',
    dim: 'massFlow',
    figures: 7,
    least: 2,
    most: 6,
    bold: true,
    value: (s) => s.m_kg_s,
  },
  {
    key: 'normal',
    label: 'Vapour as ideal gas',
    dim: 'molarFlow',
    asGas: true,
    figures: 5,
    least: 1,
    most: 5,
    value: vapour_mol_s,
  },
  {
    key: 'standardLiquid',
    label: STANDARD_LIQUID,
    dim: 'volumeFlow',
    figures: 5,
    least: 3,
    most: 6,
    value: (s) => s.standardLiquid_m3_s,
  },
];

export const ENERGY_ROWS: readonly RowRule[] = [
  {
    key: 'MW',
    label: 'Molar mass',
    dim: 'molarMass',
    figures: 4,
    least: 2,
    most: 3,
    value: (s) => s.MW_g_mol / 1000,
  },
  {
    key: 'H',
    label: 'Enthalpy flow, elements',
    dim: 'power',
    figures: 6,
    least: 1,
    most: 4,
    value: (s) => s.H_W,
  },
  {
    key: 'Hig',
    label: 'Enthalpy flow, ideal gas 25 °C',
    dim: 'power',
    figures: 6,
    least: 1,
    most: 4,
    value: (s) => s.HfromIdeal_W,
  },
];

/** Of vapours alone: a liquid's by a cubic equation is too far off to be shown (tests/published/capacity-ratio.test.ts). */
const CAPACITY_RATIO: RowRule = {
  key: 'vapour.cpcv',
  label: 'Cp/Cv',
  dim: 'number',
  figures: 4,
  least: 3,
  most: 3,
  value: of('vapour', (p) => p.cpOverCv),
};

const block = (key: Block): readonly RowRule[] => {
  return [
    {
      key: `${key}.n`,
      label: 'Molar flow',
      dim: 'molarFlow',
      figures: 6,
      least: 2,
      most: 6,
      value: of(key, (p, s) => p.fraction * s.n_mol_s),
    },
    {
      key: `${key}.m`,
      label: 'Mass flow',
      dim: 'massFlow',
      figures: 7,
      least: 2,
      most: 6,
      value: of(key, massFlow),
    },
    {
      key: `${key}.volume`,
      label: 'Actual flow',
      dim: 'volumeFlow',
      figures: 5,
      least: 2,
      most: 6,
      value: of(key, (p, s) => massFlow(p, s) / p.density_kg_m3),
    },
    {
      key: `${key}.density`,
      label: 'Density',
      dim: 'density',
      figures: 4,
      least: 2,
      most: 4,
      value: of(key, (p) => p.density_kg_m3),
    },
    {
      key: `${key}.MW`,
      label: 'Molar mass',
      dim: 'molarMass',
      figures: 4,
      least: 2,
      most: 3,
      value: of(key, (p) => p.MW_g_mol / 1000),
    },
    {
      key: `${key}.Z`,
      label: 'Z',
      dim: 'number',
      figures: 4,
      least: 4,
      most: 4,
      value: of(key, (p) => p.Z),
    },
    {
      key: `${key}.cp`,
      label: 'Heat capacity',
      dim: 'heatCapacity',
      figures: 4,
      least: 3,
      most: 4,
      value: of(key, (p) => (p.cp_J_molK * 1000) / p.MW_g_mol),
    },
    ...(key === 'vapour' ? [CAPACITY_RATIO] : []),
    {
      key: `${key}.viscosity`,
      label: 'Viscosity',
      dim: 'viscosity',
      figures: 3,
      least: 4,
      most: 4,
      value: of(key, (p) => p.viscosity_Pa_s),
    },
  ];
};
export const VAPOUR_ROWS = block('vapour');
export const LIQUID_ROWS = block('liquid');
export const LIQUID2_ROWS = block('liquid2');
