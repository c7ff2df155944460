import { simpleK } from './simpleK';
import { componentFlows } from './start';
import type { StageSystem } from './system';

/**
 * Start values for a column without ends: damped sum rates. Flows of each chemical from K and L, V of the last pass; new
 * totals from their sums, temperatures between the feeds' at first and then left to Newton.
 * Source: after Sujata, Hydrocarbon Process. 40 (1961) 137, and Burningham & Otto, ibid. 46 (1967) 163.
 */
export function startBySums(s: StageSystem, passes: number, withModel: number): void {
  const { n, places, T, L, V, task } = s;
  const least = 0.01 * s.feedTotal;
  let weightTop = 0;
  let Ttop = 0;
  let weightBottom = 0;
  let Tbottom = 0;
  for (const feed of task.feeds) {
    const F = feed.n_mol_s.reduce((a, b) => a + b, 0);
    const down = places === 1 ? 0.5 : feed.place / (places - 1);
    weightTop += F * (1 - down);
    Ttop += F * (1 - down) * feed.T_K;
    weightBottom += F * down;
    Tbottom += F * down * feed.T_K;
  }
  const mean = (Ttop + Tbottom) / (weightTop + weightBottom);
  Ttop = weightTop > 0 ? Ttop / weightTop : mean;
  Tbottom = weightBottom > 0 ? Tbottom / weightBottom : mean;
  let liquid = 0;
  for (let j = 0; j < places; j++) {
    T[j] = places === 1 ? mean : Ttop + ((Tbottom - Ttop) * j) / (places - 1);
    for (const feed of task.feeds)
      if (feed.place === j) liquid += feed.n_mol_s.reduce((a, b) => a + b, 0) * (1 - feed.vapourFraction);
    L[j] = Math.max(liquid, least);
  }
  let gas = 0;
  for (let j = places - 1; j >= 0; j--) {
    for (const feed of task.feeds)
      if (feed.place === j) gas += feed.n_mol_s.reduce((a, b) => a + b, 0) * feed.vapourFraction;
    V[j] = Math.max(gas, least);
  }
  const first = s.movers.length - task.draws.length;
  task.draws.forEach((d, k) => {
    const passing = d.phase === 'liquid' ? L[d.place]! : V[d.place]!;
    s.p[first + k] = Math.min(d.flow.basis === 'mole' ? d.flow.value / passing : 0.2, 3);
  });
  s.readMovers();
  const K = new Float64Array(places * n);
  const simple = simpleK(s, Math.min(Ttop, Tbottom) * 0.97, Math.max(Ttop, Tbottom) * 1.03);
  const diag = new Float64Array(places);
  for (let pass = 0; pass < passes; pass++) {
    for (let j = 0; j < places; j++) {
      const lnP = Math.log(simple.P_Pa / task.P_Pa[j]!);
      if (pass >= passes - withModel && pass > 0) modelK(s, j, K);
      else for (let i = 0; i < n; i++) K[j * n + i] = Math.exp(simple.a[i]! - simple.b[i]! / T[j]! + lnP);
    }
    const [beforeL, beforeV] = [L.slice(), V.slice()];
    componentFlows(s, K, diag);
    s.sums();
    for (let j = 0; j < places; j++) {
      // Half of the change, in logarithms, and never dry.
      L[j] = Math.max(Math.sqrt(L[j]! * beforeL[j]!), 0.2 * beforeL[j]!, 0.1 * least);
      V[j] = Math.max(Math.sqrt(V[j]! * beforeV[j]!), 0.2 * beforeV[j]!, 0.1 * least);
    }
  }
}

function modelK(s: StageSystem, j: number, K: Float64Array): void {
  const { n, l, v, T, model, task, scratch: x } = s;
  const at = j * n;
  const fractions = (flows: Float64Array): void => {
    let sum = 0;
    for (let i = 0; i < n; i++) sum += flows[at + i]!;
    for (let i = 0; i < n; i++) x[i] = flows[at + i]! / sum;
  };
  fractions(l);
  model.evaluate('liquid', T[j]!, task.P_Pa[j]!, x, 0, s.liq[j]!);
  fractions(v);
  model.evaluate('vapour', T[j]!, task.P_Pa[j]!, x, 0, s.vap[j]!);
  for (let i = 0; i < n; i++) K[at + i] = Math.exp(s.liq[j]!.lnPhi[i]! - s.vap[j]!.lnPhi[i]!);
}
