import type {
  Basis,
  Closure,
  PhaseResult,
  StreamResult,
  UnitClosure,
  UnitResult,
} from '../engine/network/types';
import type { Finding } from '../engine/outcome';
import type { Sketch, SketchStream, SketchUnit } from '../sketch/types';
import type { ReportInput } from './input';
import { normalVapour_m3_s } from './volumeFlows';

type Plain =
  | string
  | number
  | boolean
  | null
  | undefined
  | readonly Plain[]
  | { readonly [key: string]: Plain };

/** Ids of the chemicals, in the order of every vector over them. */
type Ids = readonly string[];
const byId = (x: Float64Array, ids: Ids): Plain => Object.fromEntries(ids.map((id, i) => [id, x[i] ?? 0]));

const list = (vector: Float64Array | readonly number[]): number[] => Array.from(vector);

/** A value of a unit's results as JSON: vectors become lists, maps stay maps. */
function plain(value: unknown): Plain {
  if (value === null || typeof value === 'string' || typeof value === 'boolean') return value;
  if (typeof value === 'number') return Number.isFinite(value) ? value : null;
  if (value instanceof Float64Array) return list(value);
  if (Array.isArray(value)) return value.map(plain);
  if (typeof value === 'object')
    return Object.fromEntries(Object.entries(value).map(([k, v]) => [k, plain(v)]));
  return undefined;
}

/**
 * Results as JSON, SI, all digits, keyed by stream number and unit tag: format "splitwright.results", version 1.
 *
 * @param seconds  wall time of the solve, measured by the caller
 */
export function resultsJson(input: ReportInput, seconds: number): Plain {
  const { sketch, basis, closure } = input;
  const tags = new Map<string, string>(sketch.units.map((unit) => [unit.id, unit.tag]));
  const numbers = new Map<string, string>(sketch.streams.map((stream) => [stream.id, stream.number]));
  const ids = basis.chemicals.map((chemical) => chemical.id);
  const isSolved =
    sketch.units.length > 0 &&
    input.gaps.length === 0 &&
    sketch.units.every((u) => input.units.get(u.id)?.state === 'solved');
  return {
    format: 'splitwright.results',
    version: 1,
    solved: isSolved,
    seconds,
    streams: Object.fromEntries(
      sketch.streams.map((stream) => [
        stream.number,
        { ...ends(stream, tags), ...streamRecord(input.streams.get(stream.id), ids) },
      ]),
    ),
    units: Object.fromEntries(
      sketch.units.map((unit) => [
        unit.tag,
        unitRecord(unit, sketch, input.units.get(unit.id), ids, numbers),
      ]),
    ),
    closure: closure ? closureRecord(closure, basis, tags) : null,
    findings: [...input.gaps, ...input.findings].map((finding) => findingRecord(finding, tags, numbers)),
    assumptions: input.assumptions.map((a) => ({
      no: a.no,
      ...(a.unit ? { unit: tags.get(a.unit) ?? a.unit } : {}),
      path: a.path,
      value: a.value,
      unitText: a.unitText,
      reason: a.reason,
    })),
    basis: {
      model: plain(basis.model),
      chemicals: basis.chemicals.map((c) => ({
        id: c.id,
        name: c.name,
        ...(c.cas ? { cas: c.cas } : {}),
        MW_g_mol: c.MW_g_mol,
        ...(c.elements ? { elements: { ...c.elements } } : {}),
        ...(c.Hf_J_mol === undefined ? {} : { Hf_J_mol: c.Hf_J_mol }),
        ...(c.assumed ? { assumed: true } : {}),
      })),
    },
  };
}

function ends(
  stream: SketchStream,
  tags: ReadonlyMap<string, string>,
): { readonly from: Plain; readonly to: Plain } {
  const end = (of: SketchStream['from']): Plain => (of ? [tags.get(of[0]) ?? of[0], of[1]] : null);
  return { from: end(stream.from), to: end(stream.to) };
}

function streamRecord(result: StreamResult | undefined, ids: Ids): { readonly [key: string]: Plain } {
  if (result?.state !== 'solved') return { state: result?.state ?? 'waiting' };
  const vapour = normalVapour_m3_s(result);
  return {
    state: 'solved',
    T_K: result.T_K,
    P_Pa: result.P_Pa,
    n_mol_s: result.n_mol_s,
    m_kg_s: result.m_kg_s,
    H_W: result.H_W,
    ...(result.S_W_K === undefined ? {} : { S_W_K: result.S_W_K }),
    h_J_mol: result.h_J_mol,
    ...(result.s_J_molK === undefined ? {} : { s_J_molK: result.s_J_molK }),
    vapourFraction: result.vapourFraction,
    vapourMassFraction: result.vapourMassFraction,
    MW_g_mol: result.MW_g_mol,
    HfromIdeal_W: result.HfromIdeal_W,
    volume_m3_s: result.volume_m3_s,
    ...(vapour === undefined ? {} : { vapourIdealGas_m3_s: vapour }),
    ...(result.standardLiquid_m3_s === undefined ? {} : { standardLiquid_m3_s: result.standardLiquid_m3_s }),
    ...(result.noStandardLiquid ? { noStandardLiquid: result.noStandardLiquid.map((i) => ids[i]) } : {}),
    z: byId(result.z, ids),
    phases: result.phases.map((phase) => phaseRecord(phase, ids)),
    ...(result.hiddenLiquid ? { hiddenLiquid: byId(result.hiddenLiquid, ids) } : {}),
    ...(result.liquidsTogether ? { liquidsTogether: true } : {}),
  };
}

const phaseRecord = (p: PhaseResult, ids: Ids): Plain => ({
  kind: p.kind,
  fraction: p.fraction,
  ...(p.byConvention ? { byConvention: true } : {}),
  x: byId(p.x, ids),
  h_J_mol: p.h_J_mol,
  ...(p.s_J_molK === undefined ? {} : { s_J_molK: p.s_J_molK }),
  Z: p.Z,
  density_kg_m3: p.density_kg_m3,
  MW_g_mol: p.MW_g_mol,
  cp_J_molK: p.cp_J_molK,
  ...(p.cpOverCv === undefined ? {} : { cpOverCv: p.cpOverCv }),
  ...(p.viscosity_Pa_s === undefined
    ? {}
    : { viscosity_Pa_s: p.viscosity_Pa_s, viscosityRule: p.viscosityRule }),
});

function unitRecord(
  unit: SketchUnit,
  sketch: Sketch,
  result: UnitResult | undefined,
  ids: Ids,
  numbers: ReadonlyMap<string, string>,
): Plain {
  const at = (end: 'from' | 'to'): Plain =>
    Object.fromEntries(
      sketch.streams.flatMap((s) =>
        s[end]?.[0] === unit.id ? [[s[end][1], numbers.get(s.id) ?? s.number]] : [],
      ),
    );
  const common = { kind: unit.kind, state: result?.state ?? 'waiting', in: at('to'), out: at('from') };
  if (result?.state !== 'solved')
    return { ...common, reasons: (result?.reasons ?? []).map((reason) => reason.code) };
  const ports = new Map(
    sketch.streams.flatMap((s) =>
      [s.from, s.to].flatMap((joint): [string, string][] =>
        joint?.[0] === unit.id ? [[joint[1], numbers.get(s.id) ?? s.number]] : [],
      ),
    ),
  );
  const own = withStreams(plain(result.results ?? {}), ports) as { readonly [key: string]: Plain };
  return {
    ...common,
    heat_W: result.heat_W,
    power_W: result.power_W,
    iterations: result.iterations,
    residual: result.residual,
    ...(result.loop
      ? { loop: { ...result.loop, tear: result.loop.tear.map((id) => numbers.get(id) ?? id) } }
      : {}),
    ...(result.made_mol_s ? { made_mol_s: byId(result.made_mol_s, ids) } : {}),
    ...(result.drawn
      ? {
          drawn: Object.fromEntries(
            Object.entries(result.drawn).map(([port, s]) => [port, streamRecord(s, ids)]),
          ),
        }
      : {}),
    ...own,
  };
}

/** Entries of lists that name a port get the number of the stream there besides. */
function withStreams(value: Plain, ports: ReadonlyMap<string, string>): Plain {
  if (value === null || typeof value !== 'object') return value;
  if (Array.isArray(value))
    return (value as readonly Plain[]).map((item) => {
      const port = isEntry(item) ? item.port : undefined;
      const stream = typeof port === 'string' ? ports.get(port) : undefined;
      return stream === undefined ? item : { ...(item as { readonly [key: string]: Plain }), stream };
    });
  return Object.fromEntries(Object.entries(value).map(([k, v]) => [k, withStreams(v, ports)]));
}

const isEntry = (item: Plain): item is { readonly [key: string]: Plain } =>
  item !== null && typeof item === 'object' && !Array.isArray(item);

function closureRecord(closure: Closure, basis: Basis, tags: ReadonlyMap<string, string>): Plain {
  const one = (c: UnitClosure): { readonly [key: string]: Plain } => ({
    mass: { ...c.mass },
    energy: { ...c.energy },
    chemicals: Object.fromEntries(
      c.chemicals.map((entry, i) => [basis.chemicals[i]?.id ?? String(i), { ...entry }]),
    ),
    elements: Object.fromEntries(
      Object.entries(c.elements).map(([element, entry]) => [element, { ...entry }]),
    ),
  });
  return {
    ...one(closure),
    complete: closure.complete,
    byUnit: Object.fromEntries(Object.entries(closure.byUnit).map(([id, c]) => [tags.get(id) ?? id, one(c)])),
  };
}

function findingRecord(
  finding: Finding,
  tags: ReadonlyMap<string, string>,
  numbers: ReadonlyMap<string, string>,
): Plain {
  const { unit, stream, ...rest } = finding.at;
  return {
    code: finding.code,
    weight: finding.weight,
    at: {
      ...(unit ? { unit: tags.get(unit) ?? unit } : {}),
      ...(stream ? { stream: numbers.get(stream) ?? stream } : {}),
      ...rest,
    },
    evidence: finding.evidence.map((e) => ({
      ...e,
      value: Number.isFinite(e.value) ? e.value : null,
      ...(e.name === 'unit' && e.text ? { text: tags.get(e.text) ?? e.text } : {}),
    })),
  };
}
