import type { ChemicalData } from '../../chemicals/types';
import { type Finding, named, noSolution, type Outcome, saw, solved } from '../../outcome';
import { whyNotReacting } from '../reaction/check';
import type { Call } from '../types';

export interface Reaction {
  /** Made per turn of the reaction, negative for consumed. */
  readonly stoichiometry: readonly { readonly chemical: number; readonly value: number }[];
  /** Place of the chemical whose conversion is given. */
  readonly of: number;
  /** Of what is there of it when this reaction's turn comes [-]. */
  readonly conversion: number;
}

/** An element balances when it is off by no more than this share of its atoms on one side [-]. */
const BALANCES = 1e-11;
/** What rounding may leave of a reactant that is used up, as a share of what was there [-]. */
const USED_UP = 1e-12;

const place = (call: Pick<Call<unknown>, 'unit'>, k: number, key: string): Finding['at'] => ({
  unit: call.unit,
  path: `reactions.${k}.${key}`,
});

/** The first element that a reaction makes or loses, with how many atoms a turn. */
function unbalanced(
  { stoichiometry }: Reaction,
  chemicals: readonly ChemicalData[],
): [string, number] | undefined {
  const made = new Map<string, number>();
  const seen = new Map<string, number>();
  for (const { chemical, value } of stoichiometry)
    for (const [element, count] of Object.entries(chemicals[chemical]!.elements ?? {})) {
      made.set(element, (made.get(element) ?? 0) + value * count);
      seen.set(element, (seen.get(element) ?? 0) + Math.abs(value * count));
    }
  return [...made].find(([element, sum]) => Math.abs(sum) > BALANCES * seen.get(element)!);
}

/** Why reaction k can never run, whatever comes in. */
function fault(
  call: Pick<Call<unknown>, 'unit' | 'model'>,
  reaction: Reaction,
  k: number,
): Finding | undefined {
  const { chemicals } = call.model;
  const number = saw('reaction', k + 1, 'number');
  for (const { chemical, value } of reaction.stoichiometry) {
    const why = value === 0 ? undefined : whyNotReacting(call, chemicals[chemical]!);
    if (why) return why;
  }
  const off = unbalanced(reaction, chemicals);
  if (off)
    return {
      code: 'reactor/unbalanced',
      weight: 'beyond-limit',
      at: place(call, k, 'stoichiometry'),
      evidence: [
        number,
        named('element', off[0]),
        named('sense', off[1] > 0 ? 'made' : 'lost'),
        saw('atoms', Math.abs(off[1]), 'number'),
      ],
    };
  const key = reaction.stoichiometry.find((s) => s.chemical === reaction.of)?.value ?? 0;
  if (key < 0) return undefined;
  return {
    code: 'reactor/key-not-consumed',
    weight: 'beyond-limit',
    at: place(call, k, 'of'),
    evidence: [number, named('chemical', chemicals[reaction.of]!.id)],
  };
}

export interface Reacted {
  readonly n_mol_s: Float64Array;
  /** Turns of each reaction [mol/s]. */
  readonly extents_mol_s: readonly number[];
}

/**
 * Amounts after the reactions, one after another: each converts a share of what is left of its chemical.
 *
 * @param entering_mol_s  full list [mol/s]
 * @returns  amounts [mol/s] and extents [mol/s]; or every fault of the reactions themselves (reaction/no-formula,
 *           reaction/no-formation-enthalpy, reaction/molar-mass, reactor/unbalanced, reactor/key-not-consumed); or
 *           reactor/reactant-short with what is needed, what is there and the conversion at which it runs out
 */
export function react(
  call: Pick<Call<unknown>, 'unit' | 'model'>,
  reactions: readonly Reaction[],
  entering_mol_s: Float64Array,
): Outcome<Reacted> {
  const faults = reactions.map((r, k) => fault(call, r, k)).filter((f) => f !== undefined);
  const [first, ...rest] = faults;
  if (first) return noSolution(first, ...rest);
  const n = Float64Array.from(entering_mol_s);
  const extents: number[] = [];
  for (const [k, { stoichiometry, of, conversion }] of reactions.entries()) {
    const key = stoichiometry.find((s) => s.chemical === of)!.value;
    const extent = (conversion * n[of]!) / -key;
    for (const { chemical, value } of stoichiometry) {
      const before = n[chemical]!;
      const after = chemical === of && conversion === 1 ? 0 : before + value * extent;
      if (value < 0 && after < -USED_UP * before) {
        const most = Math.max(0, (conversion * before) / (-value * extent));
        return noSolution({
          code: 'reactor/reactant-short',
          weight: 'beyond-limit',
          at: place(call, k, 'conversion'),
          evidence: [
            saw('reaction', k + 1, 'number'),
            named('chemical', call.model.chemicals[chemical]!.id),
            saw('needed', -value * extent, 'molarFlow'),
            saw('there', before, 'molarFlow'),
            saw('most', most, 'fraction'),
          ],
        });
      }
      n[chemical] = value < 0 && after <= USED_UP * before ? 0 : after;
    }
    extents.push(extent);
  }
  return solved({ n_mol_s: n, extents_mol_s: extents });
}

/**
 * Heat that the reactions take up at 25 degC as ideal gases [W], sum of extent times sum of nu Hf; negative when they set heat
 * free.
 *
 * @param extents  of each reaction [mol/s]
 */
export const heatOfReaction_W = (
  reactions: readonly Reaction[],
  extents: readonly number[],
  chemicals: readonly ChemicalData[],
): number =>
  reactions.reduce(
    (sum, { stoichiometry }, k) =>
      sum +
      extents[k]! * stoichiometry.reduce((h, s) => h + s.value * (chemicals[s.chemical]!.Hf_J_mol ?? 0), 0),
    0,
  );
