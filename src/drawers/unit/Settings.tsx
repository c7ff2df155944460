import type { Moot } from '../../engine/units/types';
import { capital } from '../words';
import { type Form, useForm } from './form';
import { OneOf } from './OneOf';
import { SettingEditor } from './SettingEditor';
import { FieldFindings } from './SettingRow';

const isMoot = (form: Form, rules: readonly Moot[], key: string): Moot | undefined =>
  rules.find((rule) => rule.key === key && rule.when.every((path) => form.value(path) !== undefined));

/** Every setting of a kind, in its catalogue's order: made from the descriptions alone. */
export function Settings() {
  const form = useForm();
  const { settings, choose = [], moot = [] } = form.kind;
  const entries = Object.entries(settings);
  if (entries.length === 0) return null;
  return (
    <section className="section">
      <div className="section-head">
        <h3>Settings</h3>
        <span className="muted">any unit may be typed</span>
      </div>
      {entries.map(([key, spec]) => {
        const choice = choose.find(({ keys }) => keys.includes(key));
        if (choice) {
          if (choice.keys[0] !== key) return null;
          const of = Object.fromEntries(entries.filter(([k]) => choice.keys.includes(k)));
          return (
            <OneOf key={key} base="" of={of} count={choice.count} pairs={choice.pairs} optional={false} />
          );
        }
        const rule = isMoot(form, moot, key);
        if (rule && form.value(key) === undefined)
          return (
            <p className="field-note" key={key}>
              {capital(form.word(key))} follows from {rule.when.map((path) => form.word(path)).join(' and ')}.
            </p>
          );
        return <SettingEditor key={key} spec={spec} path={key} />;
      })}
      <FieldFindings path="" />
    </section>
  );
}
