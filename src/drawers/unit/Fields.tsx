import type { SettingSpec } from '../../engine/units/types';
import { useForm } from './form';

/** The settings of a record, one after the other. */
export function Fields({
  fields,
  base,
}: {
  readonly fields: Readonly<Record<string, SettingSpec>>;
  readonly base: string;
}) {
  const form = useForm();
  return Object.entries(fields).map(([key, spec]) => (
    <form.Editor key={key} spec={spec} path={`${base}.${key}`} />
  ));
}
