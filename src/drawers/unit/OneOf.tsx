import { useState } from 'react';
import type { SettingSpec } from '../../engine/units/types';
import { Choice } from '../../parts/Choice';
import { unitLabel } from '../../quantity';
import { capital } from '../words';
import { joined } from './form';
import { assumedKey, quantityOf } from './given';
import { SettingControl } from './SettingControl';
import { FieldFindings, SettingRow } from './SettingRow';
import { choices, choose, freshSlots, type Group, keptSlots, losers } from './slots';
import { useForm } from './useForm';

interface Props {
  /** '' for settings at the top level. */
  readonly base: string;
  readonly of: Readonly<Record<string, SettingSpec>>;
  readonly count: 1 | 2 | readonly [1, 2];
  readonly pairs?: readonly (readonly [string, string])[] | undefined;
  readonly optional: boolean;
  /** The setting that these are, with what is assumed when none is given; of a record's fields the record itself says what there is to say. */
  readonly spec?: SettingSpec;
}

/** So many of these: each row a list of which, and its field. What is given stays until the new key has a value. */
export function OneOf({ base, of, count, pairs = [], optional, spec }: Props) {
  const form = useForm();
  const assumed = assumedKey(form, base, spec);
  const group: Group = {
    all: Object.keys(of),
    least: optional ? 0 : count === 2 ? 2 : 1,
    most: count === 1 && pairs.length === 0 ? 1 : 2,
    pairs,
    assumed: assumed?.key,
  };
  const given = group.all.filter((key) => form.has(joined(base, key)));
  const [slots, setSlots] = useState(() => freshSlots(group, given));
  const kept = keptSlots(group, slots, given);
  if (kept !== slots) setSlots(kept);
  const [chosen, setChosen] = useState<string | null>(null);

  const groupWord = base === '' ? 'condition' : form.word(base);
  const wordOf = (key: string): string => form.word(joined(base, key));
  const textOf = (key: string): string => {
    const value = quantityOf(form.value(joined(base, key)));
    return `${wordOf(key)} ${value === undefined ? '' : value}`.trim();
  };

  const pick = (row: number, key: string): void => {
    const old = kept.replaces[row] ?? kept.keys[row];
    if (key === '') {
      setSlots({ keys: kept.keys.map((k, i) => (i === row ? '' : k)), replaces: {} });
      if (old)
        form.set([{ path: joined(base, old), value: undefined }], `clear ${form.unit.tag} ${wordOf(old)}`);
      return;
    }
    setSlots(choose(kept, row, key, given));
    setChosen(key);
  };

  const rows = kept.keys.map((key, row) => {
    const offered = choices(group, kept, row);
    const mayBeEmpty = row >= group.least;
    if (key === '' && offered.length === 0) return null;
    // The second of a pair is offered only beside a first that has partners.
    if (row > 0 && pairs.length > 0 && kept.keys[0] === '') return null;
    if (key === '' && row > 0)
      return (
        <p className="setting-more" key="more">
          {offered.map((other) => (
            <button
              key={other}
              type="button"
              className="link quiet"
              disabled={form.disabled}
              onClick={() => pick(row, other)}
            >
              and {wordOf(other)}
            </button>
          ))}
        </p>
      );
    const path = joined(base, key);
    const isAssumed = given.length === 0 && key !== '' && key === assumed?.key;
    const replaced = kept.replaces[row];
    const emptyText = row === 0 ? `${capital(groupWord)}: none` : 'Nothing more';
    const rowName = row === 0 ? capital(groupWord) : `${capital(groupWord)}, second`;
    return (
      <SettingRow
        // biome-ignore lint/suspicious/noArrayIndexKey: rows are places, not things
        key={row}
        path={path}
        label={
          <Choice
            asLabel
            label={`${rowName}: which`}
            value={key}
            disabled={form.disabled}
            options={[
              ...(mayBeEmpty ? [{ value: '', text: emptyText }] : []),
              ...offered.map((k) => ({ value: k, text: capital(wordOf(k)) })),
            ]}
            onChange={(next) => pick(row, next)}
          />
        }
      >
        {key === '' || !of[key] ? null : (
          <SettingControl
            key={key}
            spec={of[key]}
            path={path}
            word={wordOf(key)}
            beside={losers(group, kept, row, given).map((k) => ({ path: joined(base, k), value: undefined }))}
            assumed={isAssumed ? assumed : undefined}
            needed={!isAssumed}
            autoFocus={chosen === key}
            {...(replaced === undefined
              ? {}
              : { onLeave: () => setSlots(choose(kept, row, replaced, given)) })}
          />
        )}
        {replaced !== undefined ? (
          <p className="field-note">Until a value is typed, {unitLabel(textOf(replaced))} stays.</p>
        ) : null}
        {replaced === undefined && assumed && given.length === 0 && key !== assumed.key && row === 0 ? (
          <p className="field-note">
            Until a value is typed, {wordOf(assumed.key)} {assumed.text} is assumed.
          </p>
        ) : null}
      </SettingRow>
    );
  });
  return (
    <>
      {rows}
      {spec ? <FieldFindings path={base} /> : null}
    </>
  );
}
