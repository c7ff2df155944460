import { describe, expect, test } from 'vitest';
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import { bankModel } from '../robust/bankModels';
import { type FlashCase, missOf } from '../robust/flashes';
import { faultOf } from '../robust/referee';
import { KEPT, NO_ANSWER, OPEN } from './kept-cases';

type Kept = FlashCase & { readonly name: string };

async function check(kept: Kept): Promise<void> {
  const model = (await bankModel(kept.ids, kept.kind)).of(kept.ids.map((_, i) => i));
  const total = kept.z.reduce((a, b) => a + b, 0);
  const z = Float64Array.from(kept.z, (v) => v / total);
  const outcome = flash(model, z, kept.at, makeFlashWork(model));
  if (outcome.state !== 'solved') throw new Error(outcome.findings[0].code);
  expect(faultOf(model, z, outcome.value)).toBeUndefined();
  expect(missOf(kept.at, outcome.value)).toBeLessThanOrEqual(1);
}

describe('flashes that once failed', () => {
  test.each(KEPT)('$name', check);
  test.fails.each(OPEN)('$name', check);

  test.each(NO_ANSWER)('$name', async (kept) => {
    const model = (await bankModel(kept.ids, kept.kind)).of(kept.ids.map((_, i) => i));
    const total = kept.z.reduce((a, b) => a + b, 0);
    const z = Float64Array.from(kept.z, (v) => v / total);
    const outcome = flash(model, z, kept.at, makeFlashWork(model));
    // An answer would be welcome; one with a wrong phase is not.
    if (outcome.state === 'solved') expect(faultOf(model, z, outcome.value)).toBeUndefined();
    else expect(outcome.findings[0].code).toMatch(/^equilibrium\//);
  });
});
