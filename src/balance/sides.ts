import type { StreamId, UnitId } from '../engine/ids';
import type { Basis, UnitResult } from '../engine/network/types';
import type { KindCatalogue } from '../engine/units/types';
import type { Sketch, SketchStream } from '../sketch/types';
import { type ResultsState, shownStream } from '../store/resultsStore';
import { type BalanceBasis, carried, type SolvedStream } from './basis';

export interface Segment {
  readonly key: string;
  readonly what: 'stream' | 'heat' | 'shaft' | 'made' | 'drawn';
  readonly stream?: StreamId;
  readonly unit?: UnitId;
  /** Stream number, for its diamond. */
  readonly number?: string;
  readonly name: string;
  /** [SI], never negative: what is negative stands on the other side. */
  readonly value: number;
  /** Moved from the other side because it is negative there. */
  readonly turned: boolean;
  readonly outOfDate: boolean;
}

export interface Side {
  readonly segments: readonly Segment[];
  readonly total: number;
  /** Names of streams whose amount is not known. */
  readonly unknown: readonly string[];
}

export interface Sides {
  readonly in: Side;
  readonly out: Side;
  /** No feeds and no products at all. */
  readonly empty: boolean;
  readonly fromIdeal: boolean;
}

export interface SidesInput {
  readonly sketch: Pick<Sketch, 'units' | 'streams'>;
  readonly kinds: Readonly<Record<string, KindCatalogue>>;
  readonly results: Pick<ResultsState, 'streams' | 'units'>;
  readonly data: Basis | null;
  readonly basis: BalanceBasis;
  readonly describe: (stream: SketchStream, end: 'from' | 'to') => string;
}

type Draft = Omit<Segment, 'value' | 'turned'> & { readonly amount: number };

const solvedUnit = (unit: UnitResult | undefined): UnitResult | undefined =>
  unit?.state === 'solved' ? unit : undefined;

/** Everything that crosses the sketch's edge, on one basis: feeds and what is drawn, heat, shaft power, what reacts. */
export function sidesOf({ sketch, kinds, results, data, basis, describe }: SidesInput): Sides {
  const hasPorts = (id: UnitId | undefined, dir: 'in' | 'out'): boolean => {
    const unit = sketch.units.find((u) => u.id === id);
    const kind = unit && Object.hasOwn(kinds, unit.kind) ? kinds[unit.kind] : undefined;
    return kind === undefined || kind.ports.some((port) => port.dir === dir);
  };
  const entering = sketch.streams.filter((s) => !s.from || !hasPorts(s.from[0], 'in'));
  const leaving = sketch.streams.filter((s) => !s.to || !hasPorts(s.to[0], 'out'));
  const units = sketch.units.flatMap((unit) => {
    const entry = results.units.get(unit.id);
    const result = solvedUnit(entry?.latest) ?? solvedUnit(entry?.older);
    return result ? [{ unit, result, outOfDate: result !== entry?.latest }] : [];
  });
  const reacts = units.some(({ result }) => result.made_mol_s?.some((n) => n !== 0));
  const fromIdeal = basis.is === 'energy' && !reacts;

  const drafts = (
    streams: readonly SketchStream[],
    end: 'from' | 'to',
  ): { readonly known: Draft[]; readonly unknown: string[] } => {
    const known: Draft[] = [];
    const unknown: string[] = [];
    for (const stream of streams) {
      const shown = shownStream(results.streams.get(stream.id));
      const name = describe(stream, end);
      if (!shown) unknown.push(name || `stream ${stream.number}`);
      else
        known.push({
          key: stream.id,
          what: 'stream',
          stream: stream.id,
          number: stream.number,
          name,
          amount: carried(shown.result, basis, data, fromIdeal),
          outOfDate: shown.outOfDate,
        });
    }
    return { known, unknown };
  };
  const ins = drafts(entering, 'from');
  const outs = drafts(leaving, 'to');
  for (const { unit, result, outOfDate } of units) {
    const shared = { unit: unit.id, outOfDate };
    if (basis.is === 'energy') {
      ins.known.push(
        {
          ...shared,
          key: `${unit.id} heat`,
          what: 'heat',
          name: `heat, ${unit.tag}`,
          amount: result.heat_W ?? 0,
        },
        {
          ...shared,
          key: `${unit.id} shaft`,
          what: 'shaft',
          name: `shaft, ${unit.tag}`,
          amount: result.power_W ?? 0,
        },
      );
    }
    for (const [port, drawn] of Object.entries(result.drawn ?? {}))
      if (drawn.state === 'solved')
        ins.known.push({
          ...shared,
          key: `${unit.id} ${port}`,
          what: 'drawn',
          name: `${port}, ${unit.tag}`,
          amount: carried(drawn as SolvedStream, basis, data, fromIdeal),
        });
  }
  if (reacts && (basis.is === 'moles' || basis.is === 'chemical')) {
    for (const { unit, result, outOfDate } of units) {
      const made = result.made_mol_s;
      if (!made) continue;
      const amount = basis.is === 'chemical' ? (made[basis.index] ?? 0) : made.reduce((sum, n) => sum + n, 0);
      ins.known.push({
        key: `${unit.id} made`,
        what: 'made',
        unit: unit.id,
        name: amount < 0 ? `consumed, ${unit.tag}` : `made, ${unit.tag}`,
        amount,
        outOfDate,
      });
    }
  }
  const turned = (list: readonly Draft[], isHere: boolean): Segment[] =>
    list
      .filter(({ amount }) => amount !== 0 && amount > 0 === isHere)
      .map(({ amount, ...rest }) => ({
        ...rest,
        value: Math.abs(amount),
        // Heat removed and what reactions consume leave by nature; a negative enthalpy is only drawn on the other side.
        turned: !isHere && (rest.what === 'stream' || rest.what === 'drawn'),
      }));
  const side = (own: readonly Draft[], other: readonly Draft[], unknown: readonly string[]): Side => {
    const segments = [...turned(own, true), ...turned(other, false)].sort((a, b) => b.value - a.value);
    return { segments, total: segments.reduce((sum, s) => sum + s.value, 0), unknown };
  };
  return {
    in: side(ins.known, outs.known, ins.unknown),
    out: side(outs.known, ins.known, outs.unknown),
    empty: entering.length === 0 && leaving.length === 0,
    fromIdeal,
  };
}
