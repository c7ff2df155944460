import { capital } from '../words';
import { CasesEditor } from './CasesEditor';
import { CompositionEditor } from './CompositionEditor';
import { Fields } from './Fields';
import type { EditorProps } from './form';
import { assumedAt } from './given';
import { ListEditor } from './ListEditor';
import { MapEditor } from './MapEditor';
import { OneOf } from './OneOf';
import { SettingControl } from './SettingControl';
import { FieldFindings, SettingRow } from './SettingRow';
import { useForm } from './useForm';

/** Any setting, by its description alone. */
export function SettingEditor({ spec, path, dormant = false }: EditorProps) {
  const form = useForm();
  const word = form.word(path);
  const assumed = assumedAt(form, path, spec);
  const needed = !spec.optional && !spec.sameAs && !assumed && !dormant;
  switch (spec.is) {
    case 'some':
      return (
        <OneOf
          base={path}
          of={spec.of}
          count={spec.count}
          pairs={spec.pairs}
          optional={spec.optional === true || dormant}
          spec={spec}
        />
      );
    case 'composition':
      return <CompositionEditor path={path} assumed={assumed} />;
    case 'record': {
      const isAbsent = spec.optional === true && !form.has(path);
      const inside = (
        <>
          <Fields fields={spec.fields} base={path} choose={spec.choose} dormant={dormant || isAbsent} />
          <FieldFindings path={path} />
        </>
      );
      // A group of one needs no head of its own.
      if (Object.keys(spec.fields).length === 1) return inside;
      return (
        <fieldset className="group">
          <legend>{capital(word)}</legend>
          {inside}
        </fieldset>
      );
    }
    case 'list':
      return <ListEditor spec={spec} path={path} />;
    case 'map':
      return <MapEditor spec={spec} path={path} needed={needed} />;
    case 'cases':
      return <CasesEditor spec={spec} path={path} />;
    default:
      return (
        <SettingRow label={capital(word)} path={path}>
          <SettingControl
            spec={spec}
            path={path}
            word={word}
            assumed={assumed}
            needed={needed}
            {...(spec.sameAs && !assumed ? { empty: `as ${form.word(besides(path, spec.sameAs.key))}` } : {})}
          />
        </SettingRow>
      );
  }
}

/** The path of a setting beside another. */
const besides = (path: string, key: string): string => [...path.split('.').slice(0, -1), key].join('.');
