/**
 * A property over all its rows, with the rules for temperatures outside them.
 *
 * A vapour pressure goes on straight in 1/T, with the slope it has at the end; every other property keeps its value
 * at the nearer end. How far outside a temperature lies is a question of its own (outside_K), so that whoever uses a
 * value can say so.
 */
import type { Corr } from '../../chemicals/types';
import { type Form, makeForm } from './forms';

/** A property over temperature. */
export interface Curve {
  /** Value [SI] at T [K] > 0. */
  at(T: number): number;
  /** d value / dT. */
  slope(T: number): number;
}

/** A property over temperature by its logarithm. */
export interface LogCurve {
  /** ln of the value in SI. */
  ln(T: number): number;
  /** d ln value / dT [1/K]. */
  dln(T: number): number;
}

interface Row {
  readonly form: Form;
  readonly low: number;
  readonly high: number;
}

function rowsOf(rows: readonly Corr[]): Row[] {
  return rows
    .map((corr) => {
      const form = makeForm(corr);
      return {
        form,
        low: Math.max(corr.Tmin ?? 0, form.from_K),
        high: Math.min(corr.Tmax ?? Number.POSITIVE_INFINITY, form.to_K),
      };
    })
    .sort((a, b) => a.low - b.low);
}

/** The row that speaks for T: the last one that starts at or below T, else the first. */
function rowFor(rows: readonly Row[], T: number): Row {
  let k = rows.length - 1;
  while (k > 0 && T < rows[k]!.low) k -= 1;
  return rows[k]!;
}

/** A property that keeps its end value outside. `rows` must not be empty. */
export function makeCurve(rows: readonly Corr[]): Curve {
  const all = rowsOf(rows);
  return {
    at: (T) => {
      const { form, low, high } = rowFor(all, T);
      const y = form.at(Math.min(Math.max(T, low), high));
      return form.log ? Math.exp(y) : y;
    },
    slope: (T) => {
      const { form, low, high } = rowFor(all, T);
      if (T < low || T > high) return 0;
      return form.log ? form.slope(T) * Math.exp(form.at(T)) : form.slope(T);
    },
  };
}

/** A vapour pressure; outside its range ln P is a straight line in 1/T. `rows` must not be empty. */
export function makeLogCurve(rows: readonly Corr[]): LogCurve {
  const all = rowsOf(rows).map((row) => {
    const { form, low, high } = row;
    const ln = form.log ? form.at : (T: number): number => Math.log(form.at(T));
    const dln = form.log ? form.slope : (T: number): number => form.slope(T) / form.at(T);
    const end = (T: number): { ln: number; B: number } =>
      Number.isFinite(T) && T > 0 ? { ln: ln(T), B: -dln(T) * T * T } : { ln: 0, B: 0 };
    const below = end(low);
    const above = end(high);
    return {
      ...row,
      ln: (T: number): number =>
        T < low
          ? below.ln + below.B * (1 / T - 1 / low)
          : T > high
            ? above.ln + above.B * (1 / T - 1 / high)
            : ln(T),
      dln: (T: number): number => (T < low ? -below.B / (T * T) : T > high ? -above.B / (T * T) : dln(T)),
    };
  });
  const only = all[0]!;
  if (all.length === 1) return { ln: only.ln, dln: only.dln };
  const pick = (T: number): (typeof all)[number] => rowFor(all, T) as (typeof all)[number];
  return { ln: (T) => pick(T).ln(T), dln: (T) => pick(T).dln(T) };
}

/** Stated range [K] over all rows; undefined ends mean "not stated". */
export function statedRange(rows: readonly Corr[]): { readonly Tmin?: number; readonly Tmax?: number } {
  const low = rows.some((r) => r.Tmin === undefined) ? undefined : Math.min(...rows.map((r) => r.Tmin!));
  const high = rows.some((r) => r.Tmax === undefined) ? undefined : Math.max(...rows.map((r) => r.Tmax!));
  return { ...(low === undefined ? {} : { Tmin: low }), ...(high === undefined ? {} : { Tmax: high }) };
}

/** How many kelvins T lies outside every stated row; 0 inside, and where no range is stated. */
export function outside_K(rows: readonly Corr[], T: number): number {
  let least = Number.POSITIVE_INFINITY;
  for (const r of rows) least = Math.min(least, Math.max((r.Tmin ?? 0) - T, T - (r.Tmax ?? T), 0));
  return rows.length === 0 ? 0 : least;
}
