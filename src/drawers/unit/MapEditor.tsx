import { useState } from 'react';
import type { SettingSpec } from '../../engine/units/types';
import { Choice } from '../../parts/Choice';
import { ABSENT, formatNumber } from '../../quantity';
import { useSketch, useUnitResult } from '../../store/react';
import { useChemicals } from '../chemicalNames';
import { capital, portWord } from '../words';
import { Fields } from './Fields';
import { hasOneLine, SettingControl } from './SettingControl';
import { FieldFindings, SettingRow } from './SettingRow';
import { useForm } from './useForm';

type MapSpec = Extract<SettingSpec, { is: 'map' }>;
interface Props {
  readonly spec: MapSpec;
  readonly path: string;
  readonly needed: boolean;
}

export const MapEditor = (props: Props) =>
  props.spec.keys === 'port' ? <PortMap {...props} /> : <ChemicalMap {...props} />;

interface Entry {
  readonly key: string;
  readonly label: string;
  readonly note?: string | undefined;
}

/** A number for each stream at the unit's numbered ports; where one may take the rest, the one left blank does. */
function PortMap({ spec, path }: Props) {
  const form = useForm();
  const streams = useSketch((state) => state.sketch.streams);
  const result = useUnitResult(form.unit.id);
  const numbered = form.kind.ports.filter((port) => port.numbered !== undefined);
  const family = numbered.find((port) => `${port.name}s` === path.split('.').at(-1)) ?? numbered.at(-1);
  const entries: Entry[] = streams.flatMap((stream): Entry[] => {
    const end = family?.dir === 'in' ? stream.to : stream.from;
    if (!family || end?.[0] !== form.unit.id || !new RegExp(`^${family.name}\\d+$`).test(end[1])) return [];
    return [{ key: end[1], label: `${capital(portWord(form.kind.kind, end[1]))}, stream ${stream.number}` }];
  });
  const value = form.value(path);
  const stray = Object.keys(typeof value === 'object' && value !== null ? value : {})
    .filter((key) => !entries.some((entry) => entry.key === key))
    .map((key): Entry => ({ key, label: capital(portWord(form.kind.kind, key)), note: 'no stream here' }));
  const oneTakesRest = spec.of.is === 'flow' && spec.of.share === true;
  const blanks = entries.filter(({ key }) => form.value(`${path}.${key}`) === undefined);
  const solved = result?.latest.state === 'solved' ? result.latest.results?.[path] : undefined;
  const shareOf = (key: string): string => {
    const share =
      typeof solved === 'object' && solved !== null ? (solved as Record<string, unknown>)[key] : undefined;
    return typeof share === 'number' ? `the rest, ${formatNumber(share * 100)} %` : 'the rest';
  };
  return (
    <>
      {[...entries, ...stray].map(({ key, label, note }) => {
        const one = soleField(spec.of);
        const at = one ? `${path}.${key}.${one.key}` : `${path}.${key}`;
        const inner = one?.spec ?? spec.of;
        const takesRest = oneTakesRest && blanks.length === 1 && blanks[0]?.key === key;
        const word = one
          ? `${form.word(at)} of ${portWord(form.kind.kind, key)}`
          : `${form.word(path)} of ${portWord(form.kind.kind, key)}`;
        return hasOneLine(inner) ? (
          <SettingRow key={key} path={at} label={label}>
            <SettingControl
              spec={inner}
              path={at}
              word={word}
              needed={!takesRest}
              {...(takesRest ? { empty: shareOf(key) } : {})}
            />
            {note ? <p className="field-note">{note}</p> : null}
          </SettingRow>
        ) : (
          <fieldset className="group" key={key}>
            <legend>{label}</legend>
            {spec.of.is === 'record' ? (
              <Fields fields={spec.of.fields} base={at} choose={spec.of.choose} />
            ) : (
              <form.Editor spec={spec.of} path={at} />
            )}
          </fieldset>
        );
      })}
      {entries.length === 0 ? (
        <p className="muted">Connect {portsWord(family?.dir)} first: each gets a row here.</p>
      ) : null}
      <FieldFindings path={path} />
    </>
  );
}

/** The only field of a record, where it fits beside the port's name. */
function soleField(spec: SettingSpec): { readonly key: string; readonly spec: SettingSpec } | undefined {
  const [first, ...others] = spec.is === 'record' ? Object.entries(spec.fields) : [];
  return first && others.length === 0 && hasOneLine(first[1]) ? { key: first[0], spec: first[1] } : undefined;
}

const portsWord = (dir: 'in' | 'out' | undefined): string => (dir === 'in' ? 'inlets' : 'outlets');

/** A number for each chemical that is named; others are added from the sketch's list. */
function ChemicalMap({ spec, path }: Props) {
  const form = useForm();
  const chemicals = useChemicals();
  const [added, setAdded] = useState<readonly string[]>([]);
  const value = form.value(path);
  const given = Object.keys(typeof value === 'object' && value !== null ? value : {});
  const shown = chemicals.filter(({ id }) => given.includes(id) || added.includes(id));
  const free = chemicals.filter((chemical) => !shown.includes(chemical));
  return (
    <fieldset className="group">
      <legend>{capital(form.word(path))}</legend>
      {shown.map(({ id, name }) => (
        <SettingRow key={id} path={`${path}.${id}`} label={name}>
          <SettingControl
            spec={spec.of}
            path={`${path}.${id}`}
            word={`${form.word(path)} of ${name}`}
            autoFocus={added.at(-1) === id}
          />
        </SettingRow>
      ))}
      {free.length > 0 ? (
        <Choice
          label={`${capital(form.word(path))}: add a chemical`}
          value=""
          disabled={form.disabled}
          options={[
            { value: '', text: 'Add a chemical' },
            ...free.map(({ id, name }) => ({ value: id as string, text: name })),
          ]}
          onChange={(id) => setAdded([...added, id])}
        />
      ) : null}
      {shown.length === 0 && free.length === 0 ? <p className="muted">{ABSENT}</p> : null}
      <FieldFindings path={path} />
    </fieldset>
  );
}
