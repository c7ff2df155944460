import type { UnitId } from '../../engine/ids';
import type { Finding } from '../../engine/outcome';
import type { KindCatalogue } from '../../engine/units/types';
import { siteOf } from '../../parts/measures';
import type { Stores } from '../../store/react';
import { type Form, makeForm } from './form';
import type { FormSource } from './reads';

/** A finding of the same place said twice, by the compiler and by the solver, is told once. */
const keyOf = ({ code, at }: Finding): string => `${code} ${at.path} ${at.port}`;

/** What there is to say of one unit: what it lacks, what was noticed, what it runs into; each once. */
export function findingsOf(
  id: UnitId,
  which: (finding: Finding) => boolean,
  lists: readonly (readonly Finding[])[],
): readonly Finding[] {
  const seen = new Set<string>();
  return lists.flat().filter((finding) => {
    if (finding.at.unit !== id || !which(finding) || seen.has(keyOf(finding))) return false;
    seen.add(keyOf(finding));
    return true;
  });
}

const atField = (finding: Finding): boolean => finding.at.path !== undefined;

/** The form of one unit, made anew when something of it has changed; of a unit that has gone, the last. */
export function formSource(
  stores: Stores,
  id: UnitId,
  kind: KindCatalogue,
  Editor: Form['Editor'],
): FormSource {
  const { sketch, compiled, results } = stores;
  let last: { readonly of: readonly unknown[]; readonly form: Form } | undefined;
  let site: { readonly of: unknown; readonly read: Form['site'] } | undefined;
  return {
    get() {
      const { sketch: now, writable } = sketch.getState();
      const { gaps, notes, assumptions } = compiled.getState();
      const { findings } = results.getState();
      const unit = now.units.find((u) => u.id === id) ?? last?.form.unit;
      if (!unit) throw new Error('a form is made of a unit that is there');
      const of = [unit, now.site, writable, gaps, notes, assumptions, findings];
      if (last?.of.every((part, k) => part === of[k])) return last.form;
      if (site?.of !== now.site) site = { of: now.site, read: siteOf(now.site) };
      const form = makeForm(
        {
          unit,
          kind,
          site: site?.read ?? siteOf(now.site),
          disabled: !writable,
          findings: findingsOf(id, atField, [gaps, notes, findings]),
          assumptions: assumptions.filter((assumption) => assumption.unit === id),
          Editor,
        },
        sketch,
      );
      last = { of, form };
      return form;
    },
    subscribe(then) {
      const stops = [sketch.subscribe(then), compiled.subscribe(then), results.subscribe(then)];
      return () => {
        for (const stop of stops) stop();
      };
    },
  };
}
