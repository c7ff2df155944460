import { GASES } from '../../chemicals/gases';
import type { StreamState } from '../../equilibrium/types';
import type { Model } from '../../thermo/types';

export interface FuelShare {
  /** Fuel as a share of the mixture's lower flammability limit, by Le Chatelier's rule [-]; 1 at the limit. */
  readonly share: number;
  /** Oxygen in the gas [-], by volume. */
  readonly oxygen: number;
  /** The chemical that weighs most; absent when nothing in the gas burns. */
  readonly chemical?: string;
}

/**
 * How near the gas of a stream is to burning in air: sum of y_i / LFL_i over its vapour (or its dense phase). The limits hold
 * at 25 degC and 1 atm in air; chemicals without one count as not burning.
 *
 * @returns  share 0 without a gas
 * Source: Le Chatelier, Ann. Mines 19 (1891) 388.
 */
export function fuelShareOfLimit(stream: StreamState, model: Model): FuelShare {
  const gas = stream.phases.find((p) => p.fraction > 0 && (p.kind === 'vapour' || p.kind === 'dense'));
  if (!gas) return { share: 0, oxygen: 0 };
  let share = 0;
  let oxygen = 0;
  let most = 0;
  let chemical: string | undefined;
  model.chemicals.forEach((c, i) => {
    const y = gas.x[i]!;
    if (c.cas === GASES.O2.cas) oxygen += y;
    if (c.LFL === undefined || c.LFL <= 0 || y === 0) return;
    const part = y / c.LFL;
    share += part;
    if (part > most) {
      most = part;
      chemical = c.id;
    }
  });
  return chemical === undefined ? { share, oxygen } : { share, oxygen, chemical };
}
