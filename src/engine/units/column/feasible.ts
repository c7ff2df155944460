import type { AmountOf, ColumnProduct, ColumnTask, Fixing } from '../../column/types';
import { type Evidence, type Finding, named, saw } from '../../outcome';

/** A refusal by balances alone: which fixing (by its place in the list), and the figures that show it. */
export interface Impossible {
  readonly code: Finding['code'];
  /** Place in `fixed`; absent for side draws. */
  readonly fixing?: number;
  /** Place in `draws`. */
  readonly draw?: number;
  readonly evidence: readonly Evidence[];
}

const fraction = (name: string, value: number): Evidence => ({ name, value, dim: 'fraction' });
const amount = (name: string, value: number, basis: AmountOf['basis']): Evidence => ({
  name,
  value,
  dim: basis === 'mole' ? 'molarFlow' : 'massFlow',
});

/** Feeds together, by chemical, and what weighs a mole. */
interface Fed {
  readonly f: Float64Array;
  readonly mass: Float64Array;
  total(basis: 'mole' | 'mass'): number;
  of(i: number, basis: 'mole' | 'mass'): number;
}

function fedOf({ feeds, model }: ColumnTask): Fed {
  const f = new Float64Array(model.n);
  for (const feed of feeds) for (let i = 0; i < f.length; i++) f[i]! += feed.n_mol_s[i]!;
  const mass = Float64Array.from(model.chemicals, (c) => c.MW_g_mol * 1e-3);
  const weight = (i: number, basis: 'mole' | 'mass'): number => (basis === 'mole' ? 1 : mass[i]!);
  return {
    f,
    mass,
    total: (basis) => f.reduce((sum, n, i) => sum + n * weight(i, basis), 0),
    of: (i, basis) => f[i]! * weight(i, basis),
  };
}

/** Values that cannot be whatever the feeds are. */
function valueMisses(fixed: readonly Fixing[]): Impossible[] {
  return fixed.flatMap((x, k): Impossible[] => {
    if (x.fix === 'purity' || x.fix === 'recovery')
      return x.value > 0 && x.value < 1
        ? []
        : [{ code: 'column/not-a-share', fixing: k, evidence: [fraction('value', x.value)] }];
    if (x.fix === 'flow' || x.fix === 'reflux')
      return x.flow.value > 0
        ? []
        : [
            {
              code: 'column/not-positive',
              fixing: k,
              evidence: [amount('value', x.flow.value, x.flow.basis)],
            },
          ];
    if (x.fix === 'refluxRatio' || x.fix === 'boilup')
      return x.value > 0
        ? []
        : [
            {
              code: 'column/not-positive',
              fixing: k,
              evidence: [saw('value', x.value, 'number')],
            },
          ];
    return [];
  });
}

/** Heat into a condenser, or out of a reboiler, where nothing is fed at that end and the pressure rises downwards. */
function dutyMisses({ fixed, feeds, P_Pa }: ColumnTask): Impossible[] {
  const foot = P_Pa.length - 1;
  return fixed.flatMap((x, k): Impossible[] => {
    if (x.fix !== 'duty') return [];
    const [place, inwards, below] = x.at === 'condenser' ? [0, false, 1] : [foot, true, foot];
    if (feeds.some((f) => f.place === place) || P_Pa[below - 1]! > P_Pa[below]!) return [];
    if (inwards ? x.value > 0 : x.value < 0) return [];
    return [
      {
        code: 'column/duty-wrong-way',
        fixing: k,
        evidence: [
          named('end', x.at),
          saw('asked', Math.abs(x.value), 'power'),
          named('sense', x.value < 0 ? 'removed' : 'added'),
        ],
      },
    ];
  });
}

/** What is left of a whole by rounding alone counts as nothing [-]. */
const ROUNDING = 1e-12;

/** A product's or draw's flow against all that is fed. */
function flowMisses(task: ColumnTask, fed: Fed): Impossible[] {
  const found: Impossible[] = [];
  const drawn = { mole: 0, mass: 0 };
  task.draws.forEach(({ flow }, k) => {
    drawn[flow.basis] += flow.value;
    if (!(flow.value > 0))
      found.push({
        code: 'column/not-positive',
        draw: k,
        evidence: [amount('value', flow.value, flow.basis)],
      });
    else if (drawn[flow.basis] >= fed.total(flow.basis) * (1 - ROUNDING))
      found.push({
        code: 'column/product-above-feed',
        draw: k,
        evidence: [
          amount('asked', drawn[flow.basis], flow.basis),
          amount('most', fed.total(flow.basis), flow.basis),
        ],
      });
  });
  task.fixed.forEach((x, k) => {
    if (x.fix !== 'flow') return;
    const most = fed.total(x.flow.basis) - drawn[x.flow.basis];
    if (x.flow.value < most * (1 - ROUNDING)) return;
    found.push({
      code: 'column/product-above-feed',
      fixing: k,
      evidence: [
        amount('asked', x.flow.value, x.flow.basis),
        amount('most', Math.max(most, 0), x.flow.basis),
      ],
    });
  });
  return found;
}

/** The flow of a product when it is fixed, in the basis asked. */
const flowOf = (
  fixed: readonly Fixing[],
  product: ColumnProduct,
  basis: 'mole' | 'mass',
): number | undefined => {
  for (const x of fixed)
    if (x.fix === 'flow' && x.product === product && x.flow.basis === basis) return x.flow.value;
  return undefined;
};

/** More of a chemical in a product than is fed, by flow and purity; or a recovery that alone exceeds the product. */
function contentMisses({ fixed }: ColumnTask, fed: Fed): Impossible[] {
  return fixed.flatMap((x, k): Impossible[] => {
    if (x.fix === 'purity') {
      const flow = flowOf(fixed, x.product, x.basis);
      const there = fed.of(x.chemical, x.basis);
      if (flow !== undefined && flow * x.value > there)
        return [
          {
            code: 'column/more-than-fed',
            fixing: k,
            evidence: [amount('asked', flow * x.value, x.basis), amount('most', there, x.basis)],
          },
        ];
      const recovery = fixed.find(
        (y) => y.fix === 'recovery' && y.product === x.product && y.chemical === x.chemical,
      );
      if (recovery?.fix === 'recovery') {
        const needed = (recovery.value * there) / x.value;
        if (needed > fed.total(x.basis))
          return [
            {
              code: 'column/product-above-feed',
              fixing: k,
              evidence: [amount('asked', needed, x.basis), amount('most', fed.total(x.basis), x.basis)],
            },
          ];
      }
    }
    if (x.fix === 'recovery') {
      const flow = flowOf(fixed, x.product, 'mole');
      const needed = x.value * fed.f[x.chemical]!;
      if (flow !== undefined && needed > flow)
        return [
          {
            code: 'column/product-above-feed',
            fixing: k,
            evidence: [amount('asked', needed, 'mole'), amount('most', flow, 'mole')],
          },
        ];
    }
    return [];
  });
}

/** One chemical's purity in both of two products: what is fed lies between them, or nothing balances. */
function purityMisses({ fixed, draws }: ColumnTask, fed: Fed): Impossible[] {
  if (draws.length > 0) return [];
  return fixed.flatMap((x, k): Impossible[] => {
    if (x.fix !== 'purity' || x.product !== 'top') return [];
    const other = fixed.find(
      (y) =>
        y.fix === 'purity' && y.product === 'bottoms' && y.chemical === x.chemical && y.basis === x.basis,
    );
    if (other?.fix !== 'purity') return [];
    const z = fed.of(x.chemical, x.basis) / fed.total(x.basis);
    if ((x.value - z) * (other.value - z) < 0) return [];
    return [
      {
        code: 'column/purities-apart',
        fixing: k,
        evidence: [fraction('top', x.value), fraction('bottoms', other.value), fraction('fed', z)],
      },
    ];
  });
}

/**
 * What one or two chemicals leave open no more: of one, every purity, and every temperature by the pressure; of two, the second
 * purity of a product by its first.
 */
function alreadyGiven({ model, fixed }: ColumnTask): Impossible[] {
  const seen = saw('chemicals', model.n, 'number');
  return fixed.flatMap((x, k): Impossible[] => {
    const follows =
      model.n === 1
        ? x.fix === 'purity' || x.fix === 'temperature'
        : model.n === 2 &&
          x.fix === 'purity' &&
          fixed.slice(0, k).some((y) => y.fix === 'purity' && y.product === x.product);
    return follows ? [{ code: 'column/follows-already', fixing: k, evidence: [seen] }] : [];
  });
}

/** What is impossible by balances alone, before anything is solved. */
export function impossibleBy(task: ColumnTask): Impossible[] {
  const wrong = [...valueMisses(task.fixed), ...dutyMisses(task), ...alreadyGiven(task)];
  if (wrong.length > 0) return wrong;
  const fed = fedOf(task);
  return [...flowMisses(task, fed), ...contentMisses(task, fed), ...purityMisses(task, fed)];
}

/** Vapour the feeds bring [mol/s], all of which has to be carried over the top or condensed by what comes down. */
export const fedVapour = ({ feeds }: ColumnTask): number =>
  feeds.reduce((sum, f) => sum + f.vapourFraction * f.n_mol_s.reduce((a, b) => a + b, 0), 0);
