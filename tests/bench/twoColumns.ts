/** A two-column train of eight chemicals, the units' solvers alone: no closure, no limits, nothing described or posted. */
import type { StreamState } from '../../src/engine/equilibrium/types';
import type { ProblemUnit } from '../../src/engine/network/types';
import type { Model } from '../../src/engine/thermo/types';
import { SOLVERS } from '../../src/engine/units/solvers';
import type { Answer, Call, Work } from '../../src/engine/units/types';
import { molar, parts, SITE, unit } from '../network/fixtures';
import { bankModel } from '../robust/bankModels';
import { timeModels } from './models';

const IDS = [
  'propane',
  'n-butane',
  'n-pentane',
  'n-hexane',
  'benzene',
  'toluene',
  'ethylbenzene',
  'm-xylene',
];

const column = (
  stages: number,
  distillate: 'vapour' | 'liquid',
  ratio: number,
  share: number,
  P: number,
) => ({
  stages,
  top: { distillate },
  bottom: { reboiler: true },
  feeds: { feed1: { stage: Math.round(stages / 2) } },
  pressure: { condenser: P, top: P + 1e4, bottom: P + 3e4, reboiler: P + 3e4 },
  fixedBy: [
    { fix: 'refluxRatio', value: ratio },
    {
      fix: 'flow',
      product: `${distillate}Distillate`,
      value: { is: 'share', share, of: 'feed', basis: 'mole' },
    },
  ],
});

/** What is changed by 1 %, near the front and in the first column. */
interface Asked {
  readonly feedT_K: number;
  readonly coolerT_K: number;
  readonly ratio: number;
}
const AS_IT_IS: Asked = { feedT_K: 390, coolerT_K: 315, ratio: 2.4 };
const CHANGES: readonly (readonly [string, Asked])[] = [
  ['feed temperature', { ...AS_IT_IS, feedT_K: 391 }],
  ['cooler temperature', { ...AS_IT_IS, coolerT_K: 315.4 }],
  ['reflux ratio', { ...AS_IT_IS, ratio: 2.424 }],
];

/** In the order in which they are solved. */
const unitsOf = (a: Asked): readonly ProblemUnit[] => [
  unit('f feed > out=1', {
    state: { T: a.feedT_K, P: 8e5 },
    flow: molar(50),
    composition: parts(9, 5, 5, 6, 33, 25, 4, 13),
  }),
  unit('c cooler in=1 > out=2', { p: { drop: 3e4 }, T: a.coolerT_K }),
  unit('d drum in1=2 > vapour=3 liquid=4', { p: { drop: 0 } }),
  unit('o valve in=3 > out=5', { p: { P: 1.2e5 } }),
  unit('v valve in=4 > out=6', { p: { P: 3.5e5 } }),
  unit('h heater in=6 > out=7', { p: { drop: 3e4 }, T: 360 }),
  unit('a column feed1=7 > vapourDistillate=8 bottoms=9', column(18, 'vapour', a.ratio, 0.16, 2.7e5)),
  unit('k compressor in=8 > out=10', { p: { P: 6e5 }, efficiency: { isentropic: 0.75 } }),
  unit('b column feed1=9 > liquidDistillate=11 bottoms=12', column(30, 'liquid', 2.3, 0.42, 1.3e5)),
  unit('p pump in=12 > out=13', { p: { P: 6e5 }, efficiency: 0.7 }),
];

interface Engine {
  readonly model: Model;
  readonly work: Work;
  readonly warm: Map<string, unknown>;
}

function solveAll(units: readonly ProblemUnit[], { model, work, warm }: Engine): void {
  const states = new Map<string, StreamState>();
  for (const u of units) {
    const inlets = Object.fromEntries(Object.entries(u.in).map(([port, s]) => [port, states.get(s)!]));
    const start = warm.get(u.id);
    const call: Call<unknown> = {
      unit: u.id,
      in: inlets,
      outPorts: Object.keys(u.out),
      settings: u.settings,
      model,
      site: SITE,
      work,
      ...(start === undefined ? {} : { warm: start }),
    };
    const outcome = SOLVERS[u.kind]!.solve(call as Call<never>);
    if (outcome.state !== 'solved') throw new Error(`${u.id}: ${outcome.findings[0].code}`);
    const answer = outcome.value as Answer;
    warm.set(u.id, answer.warm);
    for (const [port, stream] of Object.entries(u.out)) states.set(stream, answer.out[port]!);
  }
}

const at = (times: readonly number[], share: number): number =>
  [...times].sort((a, b) => a - b)[Math.floor(share * (times.length - 1))]!;

/** Rounds before any is timed: the compiler at run time still betters the code for some thousand. */
const WARM_UP = 2000;

/** @param now  clock in milliseconds */
export async function timeTwoColumns(now: () => number, rounds = 60): Promise<readonly object[]> {
  const engine: Engine = { model: await bankModel(IDS), work: { flash: new Map() }, warm: new Map() };
  const asItIs = unitsOf(AS_IT_IS);
  const evaluation_us = (): number => timeModels(now, [8], 5).find((t) => t.level === 2)!.us;
  const rows: object[] = [];
  let unit_us = evaluation_us();
  const measured = (what: string, once: (k: number) => void): void => {
    for (let k = 0; k < WARM_UP; k++) once(k);
    const times = Array.from({ length: rounds }, (_, k) => {
      const begun = now();
      once(k);
      return now() - begun;
    });
    const after = evaluation_us();
    const unit = (unit_us + after) / 2;
    unit_us = after;
    const [best, median] = [at(times, 0), at(times, 0.5)];
    rows.push({
      train: what,
      'median ms': median,
      'median, evaluations': (median * 1e3) / unit,
      'best, evaluations': (best * 1e3) / unit,
    });
  };
  measured('from nothing', () => {
    engine.warm.clear();
    solveAll(asItIs, engine);
  });
  for (const [what, asked] of CHANGES) {
    const changed = unitsOf(asked);
    measured(`warm after 1 % of the ${what}`, (k) => solveAll(k % 2 === 0 ? changed : asItIs, engine));
  }
  return rows;
}
