import { expansionOf } from './naming';
import { vapourFractionOf } from './rachford-rice';
import {
  CALM,
  differences,
  evaluateBoth,
  newtonSplit,
  placeFlows,
  renewK,
  type SplitEnd,
  substitute,
} from './split';
import type { FlashWork } from './work';

/** Substitution, Newton, and when that stalls longer accelerated substitution and Newton again. */
export function settle(w: FlashWork, z: Float64Array, T: number, P: number): SplitEnd {
  let end = substituteFromFlows(w, z, T, P, 3);
  if (end === 'trivial') return end;
  for (let round = 0; round < 6; round++) {
    end = newtonSplit(w, T, P, 12);
    if (end === 'equal' || end === 'trivial') return end;
    renewK(w);
    end = accelerated(w, z, T, P, 10 << round);
    if (end === 'trivial') return end;
  }
  return 'going';
}

/** Substitution from w.K that, when it would leave the two-phase region, stays with the flows it has. */
function substituteFromFlows(w: FlashWork, z: Float64Array, T: number, P: number, steps: number): SplitEnd {
  const end = substitute(w, z, T, P, steps, CALM);
  return end === 'outside' ? 'going' : end;
}

/**
 * Substitution with a step along the slowest direction every fifth pass.
 * Source: dominant eigenvalue method, Orbach & Crowe, Can. J. Chem. Eng. 49 (1971) 509.
 */
function accelerated(w: FlashWork, z: Float64Array, T: number, P: number, steps: number): SplitEnd {
  const { n, K, lnK, lnKOld, g } = w;
  let beta = -1;
  let previous = 0;
  for (let pass = 1; pass <= steps; pass++) {
    beta = vapourFractionOf(z, K, beta);
    if (beta <= 0 || beta >= 1) return 'going';
    placeFlows(w, z, beta);
    evaluateBoth(w, T, P, 0);
    w.iterations += 2;
    lnKOld.set(lnK);
    const change = renewK(w);
    if (differences(w) < 1e-6) return 'going';
    let size = 0;
    for (let i = 0; i < n; i++) size += g[i]! * g[i]!;
    size = Math.sqrt(size);
    const ratio = previous > 0 ? size / previous : 0;
    previous = size;
    if (pass % 5 === 0 && ratio > 0.2 && ratio < 0.999 && change < 0.5) {
      const more = Math.min(ratio / (1 - ratio), 20);
      for (let i = 0; i < n; i++) {
        lnK[i] = lnK[i]! + more * (lnK[i]! - lnKOld[i]!);
        K[i] = Math.exp(lnK[i]!);
      }
      previous = 0;
    }
  }
  return 'going';
}

/**
 * w.vap becomes the phase that is expanded further (naming.ts). Where the model itself tells vapour from liquid (two roots, or
 * two sides), its word stands.
 */
export function orderByVolume(w: FlashWork): void {
  const { vap, liq } = w;
  if (!vap.props.single && !liq.props.single && vap.props.side !== liq.props.side) return;
  if (expansionOf(w.model, vap.x, vap.props) >= expansionOf(w.model, liq.x, liq.props)) return;
  w.vap = liq;
  w.liq = vap;
}
