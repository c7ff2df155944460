/** Kinds without thermodynamics for tests of loops: amounts part as told, everything stays at its temperature and pressure. */
import { type Kinds, KNOWN_KINDS } from '../../src/engine/network/kinds';
import { type Outcome, solved } from '../../src/engine/outcome';
import { answerOf } from '../../src/engine/units/answer';
import type { AnyKind } from '../../src/engine/units/solvers';
import { mixed, streamAt } from '../../src/engine/units/streams';
import type { Answer, Call, KindCatalogue } from '../../src/engine/units/types';

/** Amounts of the outlets from the amount that enters. */
export type Parting = (n_mol_s: Float64Array) => Readonly<Record<string, Float64Array>>;

const catalogue: KindCatalogue = {
  ...KNOWN_KINDS.catalogue.drum!,
  kind: 'parting',
  ports: [
    { name: 'in', dir: 'in', numbered: { min: 1, max: 9 } },
    { name: 'out', dir: 'out', numbered: { min: 1, max: 9 } },
  ],
  settings: {},
  findings: [],
};

/** All inlets together, parted over numbered outlets by settings.part; the heat is what that takes. */
export const parting: AnyKind = {
  solve(call: Call<never>): Outcome<Answer<never>> {
    const { part } = call.settings as { part: Parting };
    const all = mixed(call.in, call.model.nc);
    const amounts = part(all.n_mol_s);
    const out: Record<string, Answer['out'][string]> = {};
    let H_W = -all.H_W;
    for (const port of call.outPorts) {
      const made = streamAt(call, amounts[port]!, { T_K: 300, P_Pa: 1e5 }, { T_K: 300, P_Pa: 1e5 });
      if (made.state !== 'solved') return made as unknown as Outcome<Answer<never>>;
      out[port] = made.value;
      H_W += made.value.H_W;
    }
    return solved(answerOf(out, {} as never, [], H_W));
  },
  limits: () => [],
};

export const WITH_PARTING: Kinds = {
  catalogue: { ...KNOWN_KINDS.catalogue, parting: catalogue },
  solvers: { ...KNOWN_KINDS.solvers, parting },
};

/** Given shares of every chemical to every outlet; shares[port][i]. */
export const byShares =
  (shares: Readonly<Record<string, readonly number[]>>): Parting =>
  (n) =>
    Object.fromEntries(Object.entries(shares).map(([port, s]) => [port, n.map((v, i) => v * s[i]!)]));
