import { flash, makeFlashWork } from '../equilibrium/flash';
import { LEAST_VAPOUR, NOTHING, type StageSystem } from './system';

/** Less than this share of a phase is no column to start from. */
const LEAST_PHASE = 1e-3;

/** What enters the places: by place and chemical [mol/s], in all [mol/s], and with it [W]. */
interface Fed {
  readonly f: Float64Array;
  readonly F: Float64Array;
  readonly HF: Float64Array;
}

/**
 * A column without ends whose answer is known: all feeds are flashed together, their liquid is fed on the first place and
 * their vapour under the last one. Both are in equilibrium, so that every place is like the others. From there the feeds can
 * be moved to what they are.
 *
 * Mutates: l, v, T of the system; what is returned, its feeds.
 *
 * @returns  sets the feeds a share of the way from the start's to the task's; undefined when the whole has no two phases
 */
export function startUniform(s: StageSystem): ((way: number) => void) | undefined {
  const { n, places, task, model } = s;
  const asked: Fed = { f: s.f.slice(), F: s.F.slice(), HF: s.HF.slice() };
  const z = new Float64Array(n);
  for (let at = 0; at < s.f.length; at++) z[at % n]! += s.f[at]! / s.feedTotal;
  const h_J_mol = asked.HF.reduce((a, b) => a + b, 0) / s.feedTotal;
  const P_Pa = task.P_Pa[Math.floor(places / 2)]!;
  const found = flash(model, z, { P_Pa, h_J_mol }, makeFlashWork(model));
  if (found.state !== 'solved') return undefined;
  const vapour = found.value.phases.find((p) => p.kind === 'vapour');
  const liquid = found.value.phases.find((p) => p.kind === 'liquid');
  if (!vapour || !liquid || Math.min(vapour.fraction, liquid.fraction) < LEAST_PHASE) return undefined;
  const start: Fed = {
    f: new Float64Array(places * n),
    F: new Float64Array(places),
    HF: new Float64Array(places),
  };
  for (const [phase, place] of [
    [liquid, 0],
    [vapour, places - 1],
  ] as const) {
    const flow = phase.fraction * s.feedTotal;
    for (let i = 0; i < n; i++) start.f[place * n + i]! += flow * phase.x[i]!;
    start.F[place]! += flow;
    start.HF[place]! += flow * phase.h_J_mol;
  }
  for (let j = 0; j < places; j++) {
    s.T[j] = found.value.T_K;
    for (let i = 0; i < n; i++) {
      s.l[j * n + i] = Math.max(liquid.fraction * liquid.x[i]!, NOTHING) * s.feedTotal;
      s.v[j * n + i] = Math.max(vapour.fraction * vapour.x[i]! * s.feedTotal, LEAST_VAPOUR);
    }
  }
  const between = (to: Float64Array, a: Float64Array, b: Float64Array, way: number): void => {
    for (let k = 0; k < to.length; k++) to[k] = way === 1 ? b[k]! : a[k]! + way * (b[k]! - a[k]!);
  };
  return (way) => {
    between(s.f, start.f, asked.f, way);
    between(s.F, start.F, asked.F, way);
    between(s.HF, start.HF, asked.HF, way);
  };
}
