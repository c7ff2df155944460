import type { StreamId } from '../../engine/ids';
import { parseQuantity } from '../../quantity';
import type { Quantity } from '../../sketch/types';
import type { ResultsState } from '../../store/resultsStore';
import { FLOW_DIMS, type FlowDim, flowNow, type Target } from './target';

/** What is asked for: a number to multiply by, or a stream and what it is to become. As typed. */
export type Wanted =
  | { readonly by: 'factor'; readonly text: Quantity | undefined }
  | { readonly by: 'stream'; readonly stream: StreamId | undefined; readonly text: Quantity | undefined };

export interface Scaling {
  /** Above 0. */
  readonly factor: number;
  readonly target?: Target;
}

export type WhyNot = 'nothing-asked' | 'stream-not-solved' | 'stream-empty';

/**
 * The factor that is asked for; for a stream, wanted over present flow, which hits what is wanted when everything follows the
 * feeds in proportion.
 */
export function scalingFor(wanted: Wanted, before: Pick<ResultsState, 'streams'>): Scaling | WhyNot {
  if (wanted.text === undefined) return 'nothing-asked';
  if (wanted.by === 'factor') {
    const read = parseQuantity(wanted.text, 'number');
    return read.ok && read.si > 0 ? { factor: read.si } : 'nothing-asked';
  }
  const read = parseQuantity(wanted.text, FLOW_DIMS);
  if (!read.ok || !(read.si > 0) || wanted.stream === undefined) return 'nothing-asked';
  const target: Target = { stream: wanted.stream, dim: read.dim as FlowDim, wanted: read.si };
  const now = flowNow(before, target);
  if (now === undefined) return 'stream-not-solved';
  return now > 0 ? { factor: read.si / now, target } : 'stream-empty';
}
