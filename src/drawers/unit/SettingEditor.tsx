import type { SettingSpec } from '../../engine/units/types';
import { capital } from '../words';
import { CasesEditor } from './CasesEditor';
import { CompositionEditor } from './CompositionEditor';
import { Fields } from './Fields';
import { useForm } from './form';
import { assumedAt } from './given';
import { ListEditor } from './ListEditor';
import { MapEditor } from './MapEditor';
import { OneOf } from './OneOf';
import { SettingControl } from './SettingControl';
import { SettingRow } from './SettingRow';

/** Any setting, by its description alone. */
export function SettingEditor({ spec, path }: { readonly spec: SettingSpec; readonly path: string }) {
  const form = useForm();
  const word = form.word(path);
  const assumed = assumedAt(form, path, spec);
  const needed = !spec.optional && !assumed;
  switch (spec.is) {
    case 'some':
      return (
        <OneOf
          base={path}
          of={spec.of}
          count={spec.count}
          pairs={spec.pairs}
          optional={spec.optional === true}
          spec={spec}
        />
      );
    case 'composition':
      return <CompositionEditor path={path} />;
    case 'record':
      return (
        <fieldset className="group">
          <legend>{capital(word)}</legend>
          <Fields fields={spec.fields} base={path} />
        </fieldset>
      );
    case 'list':
      return <ListEditor spec={spec} path={path} />;
    case 'map':
      return <MapEditor spec={spec} path={path} needed={needed} />;
    case 'cases':
      return <CasesEditor spec={spec} path={path} />;
    default:
      return (
        <SettingRow label={capital(word)} path={path}>
          <SettingControl spec={spec} path={path} word={word} assumed={assumed} needed={needed} />
        </SettingRow>
      );
  }
}
