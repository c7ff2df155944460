import type { StreamId, UnitId } from '../../src/engine/ids';
import type { Json, Sketch, SketchStream, SketchUnit } from '../../src/sketch/types';
import { seeded } from './random';
import { sheetOf } from './sheets';

interface Made {
  readonly kind: string;
  readonly ins: readonly string[];
  readonly outs: readonly string[];
  readonly settings?: { readonly [key: string]: Json };
}

type Dice = <T>(list: readonly T[]) => T;

const plain = (kind: string, ins: readonly string[], outs: readonly string[]): ((pick: Dice) => Made) => {
  const made = { kind, ins, outs };
  return () => made;
};

const heated = (pick: Dice): { readonly [key: string]: Json } =>
  pick([{}, { h: { duty: '20 kW' } }, { h: { duty: '-5 kW' } }]);

function column(pick: Dice): Made {
  const stages = pick([8, 16, 26, 40]);
  const distillate = pick(['liquid', 'vapour', 'both', 'none'] as const);
  const reboiler = distillate !== 'none' || pick([true, false]);
  const feeds = pick([['feed1'], ['feed1'], ['feed1', 'feed2']]);
  const side = pick([true, false, false]);
  const top = {
    liquid: ['liquidDistillate'],
    vapour: ['vapourDistillate'],
    both: ['vapourDistillate', 'liquidDistillate'],
    none: ['vapourDistillate'],
  }[distillate];
  return {
    kind: 'column',
    ins: feeds,
    outs: [...top, ...(side ? ['side1'] : []), 'bottoms'],
    settings: {
      stages,
      top: { distillate },
      bottom: { reboiler },
      feeds: Object.fromEntries(feeds.map((name, k) => [name, { stage: Math.ceil((stages * (k + 1)) / 3) }])),
      ...(side ? { sides: { side1: { stage: Math.ceil(stages * 0.7), phase: 'liquid' } } } : {}),
    },
  };
}

/** Every kind there is, with the ports that a unit of it uses. */
const KINDS: readonly ((pick: Dice) => Made)[] = [
  plain('valve', ['in'], ['out']),
  plain('pump', ['in'], ['out']),
  plain('compressor', ['in'], ['out']),
  plain('expander', ['in'], ['out']),
  plain('heater', ['in'], ['out']),
  plain('cooler', ['in'], ['out']),
  plain('join', ['in1', 'in2'], ['out']),
  plain('join', ['in1', 'in2', 'in3'], ['out']),
  plain('divide', ['in'], ['out1', 'out2']),
  plain('divide', ['in'], ['out1', 'out2', 'out3']),
  (pick) => ({
    kind: 'drum',
    ins: pick([['in1'], ['in1', 'in2']]),
    outs: ['vapour', 'liquid'],
    settings: heated(pick),
  }),
  (pick) => ({
    kind: 'reactor',
    ins: pick([['in1'], ['in1', 'in2']]),
    outs: ['out'],
    settings: heated(pick),
  }),
  (pick) => ({
    kind: 'chamber',
    ins: pick([['fuel1'], ['fuel1', 'air'], ['fuel1', 'fuel2', 'air']]),
    outs: ['out'],
    settings: pick([{}, { heat: { lossOfLHV: '2 %' } }]),
  }),
  column,
  column,
];

interface Outlet {
  readonly unit: number;
  readonly port: string;
}

/**
 * A plant of `count` units of all kinds: outlets lead on to inlets of units that come soon after, some back to one that came
 * before (a recycle); what is left comes from feeds and goes to products. Nothing is placed: everything stands in one point.
 */
export function randomPlant(seed: number, count = 5 + ((seed * 7) % 56)): Sketch {
  const next = seeded(1000 + seed);
  const pick: Dice = (list) => list[Math.floor(next() * list.length)]!;
  const middle = Math.max(1, Math.round(count * 0.65));
  const made = Array.from({ length: middle }, () => pick(KINDS)(pick));
  const inlets = made.map(({ ins }) => [...ins]);
  const streams: [Outlet | undefined, Outlet | undefined][] = [];
  made.forEach(({ outs }, unit) => {
    for (const port of outs) {
      const fits = (from: number, to: number): number[] =>
        inlets.flatMap((left, k) => (left.length > 0 && k >= from && k < to ? [k] : []));
      const ahead = fits(unit + 1, unit + 5);
      const back = fits(0, unit);
      const dice = next();
      const target =
        dice < 0.12 && back.length > 0
          ? pick(back)
          : dice < 0.8 && ahead.length > 0
            ? pick(ahead)
            : undefined;
      const to = target === undefined ? undefined : { unit: target, port: inlets[target]!.shift()! };
      streams.push([{ unit, port }, to]);
    }
  });
  inlets.forEach((left, unit) => {
    for (const port of left) streams.push([undefined, { unit, port }]);
  });
  return written(made, streams, pick);
}

const NAMES = ['Feed', 'Make-up gas', 'Stabilised liquid to storage', 'Off-gas', 'Air', 'Water'];

function written(
  made: readonly Made[],
  joined: readonly (readonly [Outlet | undefined, Outlet | undefined])[],
  pick: Dice,
): Sketch {
  const units: SketchUnit[] = made.map(({ kind, settings = {} }, k) => ({
    id: `u${k}` as UnitId,
    tag: `${kind.charAt(0).toUpperCase()}-${101 + k}`,
    kind,
    at: [0, 0],
    settings,
  }));
  const flag = (kind: 'feed' | 'product', port: string): readonly [UnitId, string] => {
    const id = `u${units.length}` as UnitId;
    units.push({
      id,
      tag: `${kind.toUpperCase()}-${units.length}`,
      kind,
      name: pick(NAMES),
      at: [0, 0],
      settings: {},
    });
    return [id, port];
  };
  const streams = joined.map(([from, to], k): SketchStream => {
    const source = from ? ([`u${from.unit}` as UnitId, from.port] as const) : flag('feed', 'out');
    const target = to ? ([`u${to.unit}` as UnitId, to.port] as const) : flag('product', 'in');
    return { id: `s${k}` as StreamId, number: `${k + 1}`, from: source, to: target };
  });
  return { ...sheetOf([], []), units, streams };
}
