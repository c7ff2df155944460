import { useState } from 'react';
import { Choice } from '../../parts/Choice';
import { QuantityField } from '../../parts/QuantityField';
import { Segmented } from '../../parts/Segmented';
import { type Dimension, parseQuantity } from '../../quantity';
import type { Json } from '../../sketch/types';
import { useSketch } from '../../store/react';
import { useChemicals } from '../chemicalNames';
import { type SettingChange, valueAt } from '../edits';
import { capital } from '../words';
import { quantityOf } from './given';
import { useForm } from './useForm';

interface Props {
  readonly path: string;
  readonly word: string;
  readonly beside: readonly SettingChange[];
  /** A bare fraction means that mole share of what enters the unit. */
  readonly share: boolean;
  readonly assumed?: { readonly text: string; readonly why: string } | undefined;
  readonly needed?: boolean;
  readonly empty?: string;
  readonly autoFocus?: boolean;
}

const AS_TYPED = 'typed';
const ALL_FEEDS = 'feed';
const FLOWS: readonly Dimension[] = ['molarFlow', 'massFlow'];

const basisWords = (dim: Dimension): string =>
  dim === 'massFlow' ? 'mass' : dim === 'molarFlow' ? 'molar' : 'of the inlet, mol';

/** A flow: amount, mass or gas volume as typed, or a share of a stream or of all feeds, its basis said in words. */
export function FlowEditor({ path, word, beside, share, ...rest }: Props) {
  const form = useForm();
  const streams = useSketch((state) => state.sketch.streams);
  const chemicals = useChemicals();
  const value = form.value(path);
  const [pending, setPending] = useState<string | null>(null);
  const isShare = typeof value === 'object' && value !== null && !Array.isArray(value);
  const ofStream = valueAt(value, 'of.stream');
  const given = !isShare ? AS_TYPED : typeof ofStream === 'string' ? ofStream : ALL_FEEDS;
  const of = pending ?? given;
  const label = capital(word);
  const shared = { ...rest, label, site: form.site, disabled: form.disabled };
  const readable = streams.filter((stream) => stream.from?.[0] !== form.unit.id);
  const hasInlets = form.kind.ports.some((port) => port.dir === 'in');
  const options = [
    { value: AS_TYPED, text: 'given as a flow' },
    ...(hasInlets ? [{ value: ALL_FEEDS, text: 'given as a share of all its feeds' }] : []),
    ...readable.map((stream) => ({
      value: stream.id as string,
      text: `given as a share of stream ${stream.number}`,
    })),
  ];
  const ofJson = (key: string): Json => (key === ALL_FEEDS ? 'feed' : { stream: key });
  const choose = (next: string): void => {
    if (next === given) {
      setPending(null);
      return;
    }
    // A share may be taken of something else at once; between a flow and a share the number has to be typed.
    if (isShare && next !== AS_TYPED) {
      setPending(null);
      form.set([{ path: `${path}.of`, value: ofJson(next) }], `set ${form.unit.tag} ${word}`);
    } else setPending(next);
  };
  const which = (
    <Choice
      asLabel
      label={`${label}: what it counts from`}
      value={of}
      options={options}
      disabled={form.disabled}
      onChange={choose}
    />
  );
  if (of === AS_TYPED) {
    const text = isShare ? undefined : quantityOf(value);
    const dims = share ? (['fraction', ...FLOWS] as const) : FLOWS;
    const read = text === undefined ? undefined : parseQuantity(text, dims, form.site);
    return (
      <>
        <QuantityField
          {...shared}
          path={path}
          value={text}
          dims={dims}
          min={0}
          basis={read?.ok ? basisWords(read.dim) : undefined}
          edit={form.edit(path, word, beside, (next) => {
            setPending(null);
            return next;
          })}
        />
        {share ? null : <div className="flow-of">{which}</div>}
      </>
    );
  }
  const basis = valueAt(value, 'basis') === 'mass' ? 'mass' : 'mole';
  const chemical = valueAt(value, 'chemical');
  const wrap = (text: Json): Json => ({
    ...(isShare ? (value as { readonly [key: string]: Json }) : { basis: 'mole' }),
    share: text,
    of: ofJson(of),
  });
  const setPart = (key: string, part: Json | undefined): void =>
    form.set([{ path: `${path}.${key}`, value: part }], `set ${form.unit.tag} ${word}`);
  return (
    <>
      <QuantityField
        {...shared}
        path={isShare ? `${path}.share` : path}
        value={isShare ? quantityOf(valueAt(value, 'share')) : undefined}
        dims="fraction"
        min={0}
        unitKept="%"
        needed
        basis={`of ${of === ALL_FEEDS ? 'all feeds' : `stream ${streams.find((s) => s.id === of)?.number ?? '?'}`}, ${basis === 'mass' ? 'mass' : 'mol'}`}
        edit={{
          ...form.edit(path, word, beside, (next) => {
            setPending(null);
            return wrap(next);
          }),
        }}
      />
      <div className="flow-of">
        {which}
        {isShare ? (
          <>
            <Segmented
              label={`${label}: basis`}
              value={basis}
              disabled={form.disabled}
              options={[
                { value: 'mole', text: 'mol' },
                { value: 'mass', text: 'mass' },
              ]}
              onChange={(next) => setPart('basis', next)}
            />
            <Choice
              label={`${label}: of which chemical`}
              value={typeof chemical === 'string' ? chemical : ''}
              disabled={form.disabled}
              options={[
                { value: '', text: 'of the whole' },
                ...chemicals.map(({ id, name }) => ({ value: id as string, text: `of its ${name}` })),
              ]}
              onChange={(next) => setPart('chemical', next === '' ? undefined : next)}
            />
          </>
        ) : null}
      </div>
    </>
  );
}
