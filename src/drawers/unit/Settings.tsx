import { Fields } from './Fields';
import { FieldFindings } from './SettingRow';
import { useForm } from './useForm';

/** Every setting of a kind, in its catalogue's order: made from the descriptions alone. */
export function Settings() {
  const { kind } = useForm();
  if (Object.keys(kind.settings).length === 0) return null;
  return (
    <section className="section">
      <div className="section-head">
        <h3>Settings</h3>
        <span className="muted">any unit may be typed</span>
      </div>
      <Fields fields={kind.settings} base="" choose={kind.choose} moot={kind.moot} />
      <FieldFindings path="" />
    </section>
  );
}
