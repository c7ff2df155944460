/** Solved columns by an independent route: bubble-point sweeps that share nothing with the solver but the model. */
import { expect, test } from 'vitest';
import { sweep } from './bubblePoint';
import { scenarios, solveCall } from './fixtures';

const all = await scenarios();
const named = (part: string) => all.find((s) => s.name.includes(part))!;

test.each(['a duty and a reflux', 'a temperature and a distillate', 'under Raoult'])(
  'bubble-point sweeps end at the same temperatures, compositions and flows: %s',
  (name) => {
    const s = named(name);
    const { call } = s;
    const a = solveCall(call);
    const r = a.results;
    const { n_mol_s: fed, H_W } = call.in.feed1!;
    const present = s.chemicals.map((_, i) => i).filter((i) => fed[i]! > 0);
    const model = s.model.of(present);
    const feedStage = call.settings.feeds.feed1!.stage as number;
    const bottomT = r.reboiler!.T_K;
    const topT = r.condenser!.T_K;
    const places = r.stages.T_K.length + 2;
    const swept = sweep(
      {
        model,
        P_Pa: [r.condenser!.P_Pa, ...r.stages.P_Pa, r.reboiler!.P_Pa],
        top: r.condenser!.distillate,
        feedPlace: feedStage,
        feed: present.map((i) => fed[i]!),
        feedH_W: H_W,
        refluxRatio: r.refluxRatio!,
        distillate: r.condenser!.distillate_mol_s,
      },
      // A straight line some kelvin off, not the answer.
      Array.from({ length: places }, (_, j) => topT + 8 + ((bottomT - topT - 20) * j) / (places - 1)),
    );
    expect(swept.change_K).toBeLessThan(1e-7);
    const T = [topT, ...r.stages.T_K, bottomT];
    for (let j = 0; j < places; j++) expect(Math.abs(swept.T[j]! - T[j]!)).toBeLessThan(2e-6);
    for (let j = 1; j <= r.stages.T_K.length; j++) {
      expect(Math.abs(swept.V[j]! / r.stages.V_mol_s[j - 1]! - 1)).toBeLessThan(1e-6);
      present.forEach((full, i) => {
        const x = r.stages.x[s.chemicals[full]!.id]![j - 1]!;
        expect(Math.abs(swept.x[j]![i]! - x)).toBeLessThan(1e-7);
      });
    }
  },
);
