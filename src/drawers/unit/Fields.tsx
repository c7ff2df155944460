import type { Choice, Moot, SettingSpec } from '../../engine/units/types';
import { capital } from '../words';
import { type Form, joined } from './form';
import { OneOf } from './OneOf';
import { useForm } from './useForm';

interface Props {
  readonly fields: Readonly<Record<string, SettingSpec>>;
  /** '' at the top level. */
  readonly base: string;
  readonly choose?: readonly Choice[] | undefined;
  readonly moot?: readonly Moot[] | undefined;
  /** The group as a whole may be absent, and is: nothing in it is asked for. */
  readonly dormant?: boolean;
}

const isMoot = (form: Form, rules: readonly Moot[], key: string): Moot | undefined =>
  rules.find((rule) => rule.key === key && rule.when.every((path) => form.has(path)));

/** Settings one after the other, in the catalogue's order; those of which only some are given share their rows. */
export function Fields({ fields, base, choose = [], moot = [], dormant = false }: Props) {
  const form = useForm();
  const entries = Object.entries(fields);
  return entries.map(([key, spec]) => {
    const choice = choose.find(({ keys }) => keys.includes(key));
    if (choice) {
      if (choice.keys[0] !== key) return null;
      const of = Object.fromEntries(entries.filter(([k]) => choice.keys.includes(k)));
      return (
        <OneOf key={key} base={base} of={of} count={choice.count} pairs={choice.pairs} optional={dormant} />
      );
    }
    const rule = isMoot(form, moot, key);
    if (rule && !form.has(key))
      return (
        <p className="field-note" key={key}>
          {capital(form.word(key))} follows from {rule.when.map((path) => form.word(path)).join(' and ')}.
        </p>
      );
    return <form.Editor key={key} spec={spec} path={joined(base, key)} dormant={dormant} />;
  });
}
