import type { StreamId } from '../engine/ids';
import type { Basis, Problem, ProblemUnit } from '../engine/network/types';
import type { Finding } from '../engine/outcome';
import { RULES } from '../engine/units/rules';
import { chemicalId, type FullList, fullList } from './compiling/air';
import { type BankData, type BasisRead, readBasis } from './compiling/basis';
import { keepEqual, keepList, keepRecord } from './compiling/keep';
import { NO_PORTS, type PortsRead, portGaps, portsOfAll } from './compiling/ports';
import { isGiven } from './compiling/quantity';
import type { AssumptionDraft } from './compiling/scope';
import { readSite, type SiteRead, siteAssumption } from './compiling/site';
import { readThresholds, type Threshold } from './compiling/thresholds';
import { makeUnitReader, type Surroundings, type UnitRead } from './compiling/unit';
import { finding, word } from './findings';
import { KNOWN_KINDS, kindOf, type Registry } from './registry';
import type { Assumption, Sketch, SketchUnit } from './types';

export type { BankData } from './compiling/basis';
export type { Threshold } from './compiling/thresholds';

/** What a sketch becomes for the engine, and what it lacks. */
export interface Compiled {
  /** Undefined while a chemical or the model cannot be used; then `problem.basis` is empty and nothing is to be solved. */
  readonly basis: Basis | undefined;
  /** The same object as before when nothing that a solve looks at has changed; `edit` is then the older number. */
  readonly problem: Problem;
  /** What is missing or does not fit: at a unit, its settings are null; elsewhere see the path. */
  readonly gaps: readonly Finding[];
  /** What was noticed and hinders nothing. */
  readonly notes: readonly Finding[];
  /** A1, A2, ...: model, chemicals, site, then units in the sketch's order. */
  readonly assumptions: readonly Assumption[];
}

export interface CompileOptions {
  readonly registry?: Registry;
  /** Thresholds that a sketch may override, with what they measure. */
  readonly thresholds?: readonly Threshold[];
}

/** Bank ids whose data a compile will look up: the sketch's own list, and what ready-made air brings in. */
export function neededChemicals(sketch: Sketch, registry: Registry = KNOWN_KINDS): readonly string[] {
  const list = fullList(sketch, registry);
  return [...list.chemicals.filter((c) => typeof c === 'string'), ...list.added];
}

/** A compile step with a memory: records that did not change keep the identity of what was made of them. */
export type Compile = (sketch: Sketch, bank: BankData, edit: number) => Compiled;

/**
 * Makes the step from the document to what the engine gets. One per open sketch; a single use needs no memory: see compile.
 *
 * It never throws on what a user can type: what is missing or does not fit is a gap with its place, and the unit's settings
 * are null, while everything else is compiled all the same.
 */
export function makeCompile({ registry = KNOWN_KINDS, thresholds = RULES }: CompileOptions = {}): Compile {
  const readUnit = makeUnitReader();
  let last: Compiled | undefined;
  let lastBasis:
    | { readonly parts: readonly unknown[]; readonly list: FullList; readonly read: BasisRead }
    | undefined;

  return (sketch, bank, edit) => {
    const list = fullList(sketch, registry);
    const parts = [sketch.chemicals, sketch.model, bank, list.added.join()];
    const fresh = !lastBasis || parts.some((part, k) => part !== lastBasis?.parts[k]);
    const basisRead = fresh || !lastBasis ? readBasis(sketch, list, bank) : lastBasis.read;
    const before = last?.basis;
    const basis = before && before.id === basisRead.basis?.id ? before : basisRead.basis;
    lastBasis = { parts, list, read: basisRead };

    const site = readSite(sketch.site);
    const surroundings = surround(list, basisRead, site, registry);
    const limits = readThresholds(sketch.limits, thresholds, surroundings.sitePressure_Pa);
    const ports = portsOfAll(sketch.streams);
    const sourceless = new Set(sketch.streams.flatMap((s) => (s.from ? [] : [s.id])));
    const known = new Set<string>(sketch.streams.map((s) => s.id));

    const read = sketch.units.map((unit) =>
      readOne(unit, ports.get(unit.id) ?? NO_PORTS, readUnit, surroundings, sourceless, known),
    );
    const gaps = [...basisRead.gaps, ...site.gaps, ...limits.gaps, ...read.flatMap((r) => r.gaps)];
    const notes = [...basisRead.notes, ...read.flatMap((r) => r.read.notes), ...looseEnds(sketch)];
    const usesPressure = limits.usesSitePressure || read.some((r) => r.read.usesSitePressure);
    const drafts = [
      ...basisRead.assumptions,
      ...siteAssumptions(
        sketch.site,
        usesPressure,
        read.some((r) => r.usesWater),
      ),
      ...read.flatMap((r) => r.read.assumptions),
    ];
    const isUsable = (r: OneRead): boolean => r.gaps.length === 0 && basis !== undefined;
    const formerUnits = new Map(last?.problem.units.map((u) => [u.id, u]));
    const units = read.map((r) =>
      problemUnit(formerUnits.get(r.unit.id), r.unit, isUsable(r) ? r.read : undefined, r.ports),
    );
    const reads = read.flatMap((r) => (isUsable(r) ? r.read.reads : []));

    const former = last?.problem;
    const next: Problem = {
      edit,
      basis: basis?.id ?? '',
      site: keepRecord(former?.site, site.site),
      units: keepList(former?.units, units),
      reads: keepEqual(former?.reads, reads),
      aims: former?.aims ?? [],
      limits: keepRecord(former?.limits, limits.limits),
    };
    const unchanged =
      former !== undefined &&
      (['basis', 'site', 'units', 'reads', 'limits'] as const).every((key) => former[key] === next[key]);
    last = {
      basis,
      problem: unchanged ? former : next,
      gaps: keepEqual(last?.gaps, gaps),
      notes: keepEqual(last?.notes, notes),
      assumptions: keepEqual(
        last?.assumptions,
        drafts.map((draft, k) => ({ no: `A${k + 1}`, ...draft })),
      ),
    };
    return last;
  };
}

/** One unit, read: its settings, and what is said of it beside them. */
interface OneRead {
  readonly unit: SketchUnit;
  readonly ports: PortsRead;
  readonly read: UnitRead;
  readonly gaps: readonly Finding[];
  /** Its limits may look at the cooling water. */
  readonly usesWater: boolean;
}

function readOne(
  unit: SketchUnit,
  ports: PortsRead,
  readUnit: ReturnType<typeof makeUnitReader>,
  surroundings: Surroundings,
  sourceless: ReadonlySet<StreamId>,
  known: ReadonlySet<string>,
): OneRead {
  const read = readUnit(unit, ports.used, surroundings);
  const kind = kindOf(surroundings.registry, unit.kind);
  const strangers = read.reads
    .filter((r) => !known.has(r.stream))
    .map((r) =>
      finding('sketch/unknown-stream', 'caution', { unit: unit.id, path: r.path }, word('stream', r.stream)),
    );
  return {
    unit,
    ports,
    read,
    gaps: [...read.gaps, ...(kind ? portGaps(unit, kind, ports, sourceless) : []), ...strangers],
    usesWater: kind !== undefined && removesHeat(unit, kind.findings, 'h' in kind.settings),
  };
}

const looseEnds = ({ streams }: Sketch): Finding[] =>
  streams.flatMap(({ id, from, to }) =>
    from && !to ? [finding('sketch/loose-end', 'note', { stream: id })] : [],
  );

/** What of the site is used and was not given. */
const siteAssumptions = (
  { pressure, coolingWater }: Sketch['site'],
  usesPressure: boolean,
  usesWater: boolean,
): AssumptionDraft[] => [
  ...(usesPressure && !isGiven(pressure) ? [siteAssumption('pressure')] : []),
  ...(usesWater && !isGiven(coolingWater) ? [siteAssumption('coolingWater')] : []),
];

/** Compiles once, without a memory. */
export const compile = (sketch: Sketch, bank: BankData, edit = 1, options: CompileOptions = {}): Compiled =>
  makeCompile(options)(sketch, bank, edit);

function surround(list: FullList, basis: BasisRead, site: SiteRead, registry: Registry): Surroundings {
  const ids = [...list.chemicals.map(chemicalId), ...list.added];
  const sitePressure_Pa = site.broken.has('pressure') ? undefined : site.site.pressure_Pa;
  const MW_g_mol = basis.data.map((c) => c?.MW_g_mol);
  return {
    registry,
    indexOf: new Map(ids.map((id, k) => [id, k])),
    MW_g_mol,
    air: list.air,
    sitePressure_Pa,
    key: JSON.stringify([ids, MW_g_mol, list.air, sitePressure_Pa ?? null]),
  };
}

/** Whether a kind's limits may look at the cooling water: it can remove heat, and has not been left adiabatic. */
const removesHeat = (unit: SketchUnit, codes: readonly string[], hasHeatGroup: boolean): boolean =>
  codes.some((code) => code.endsWith('/below-cooling-water')) && (!hasHeatGroup || isGiven(unit.settings.h));

function problemUnit(
  former: ProblemUnit | undefined,
  unit: SketchUnit,
  read: UnitRead | undefined,
  ports: PortsRead,
): ProblemUnit {
  const next: ProblemUnit = {
    id: unit.id,
    kind: unit.kind,
    settings: read ? read.settings : null,
    ...(unit.material === undefined || unit.material.trim() === '' ? {} : { materialNoted: true }),
    in: keepRecord(former?.in, ports.in),
    out: keepRecord(former?.out, ports.out),
  };
  return keepRecord(former, next);
}
