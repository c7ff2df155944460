import { useId, useState } from 'react';
import { Choice } from '../../parts/Choice';
import type { SettingChange } from '../edits';
import { capital } from '../words';
import { useForm } from './useForm';

interface Props {
  readonly path: string;
  readonly word: string;
  readonly beside: readonly SettingChange[];
  readonly min: number;
  readonly max?: number | undefined;
  /** Condenser and reboiler are places too; a list names the ends that there are. */
  readonly ends?: boolean | readonly End[];
  readonly assumed?: { readonly text: string; readonly why: string } | undefined;
  readonly needed?: boolean;
  readonly autoFocus?: boolean;
}

type End = 'condenser' | 'reboiler';
const BOTH: readonly End[] = ['condenser', 'reboiler'];

/** A whole number, or a stage: a number counted from the top, or an end by its name. */
export function WholeField(props: Props) {
  const { path, word, beside, min, max } = props;
  const form = useForm();
  const id = useId();
  const value = form.value(path);
  const [draft, setDraft] = useState<string | null>(null);
  const [why, setWhy] = useState<string | null>(null);
  const isEnd = value === 'condenser' || value === 'reboiler';
  const named = props.ends === true ? BOTH : props.ends || [];
  /** An end that has gone stays in sight until another place is chosen. */
  const ends = isEnd && !named.includes(value) ? [...named, value] : named;
  const text = draft ?? (value === undefined || isEnd ? '' : String(value));
  const put = (next: number | string | undefined): void =>
    form.set(
      next === undefined ? [{ path, value: undefined }] : [...beside, { path, value: next }],
      `${next === undefined ? 'clear' : 'set'} ${form.unit.tag} ${word}`,
    );
  const restore = (): void => {
    setDraft(null);
    setWhy(null);
  };
  const commit = (): void => {
    if (draft === null) return;
    const typed = draft.trim();
    const number = Number(typed);
    const refused =
      typed === ''
        ? null
        : !Number.isInteger(number)
          ? 'A whole number fits here.'
          : number >= min && (max === undefined || number <= max)
            ? null
            : max === undefined
              ? `From ${min} up.`
              : `From ${min} to ${max}.`;
    if (refused) {
      setWhy(refused);
      return;
    }
    put(typed === '' ? undefined : number);
    restore();
  };
  const step = (by: number): void => {
    const now = Number(text === '' ? (props.assumed?.text ?? min - by) : text) + by;
    if (Number.isInteger(now) && now >= min && (max === undefined || now <= max)) put(now);
  };
  const blank = value === undefined && draft === null;
  const state = why
    ? 'refused'
    : blank
      ? props.assumed
        ? 'assumed'
        : props.needed
          ? 'needed'
          : 'empty'
      : 'given';
  return (
    <div className="quantity-field whole-field" data-state={state}>
      <div className="whole-line">
        {ends.length > 0 ? (
          <Choice
            label={`${capital(word)}: place`}
            disabled={form.disabled}
            value={isEnd ? String(value) : 'stage'}
            options={[
              { value: 'stage', text: 'stage' },
              ...ends.map((end) => ({ value: end as string, text: end })),
            ]}
            onChange={(next) => put(next === 'stage' ? undefined : next)}
          />
        ) : null}
        {isEnd ? null : (
          <div className="box">
            <input
              type="text"
              inputMode="numeric"
              autoComplete="off"
              data-field={path}
              aria-label={capital(word)}
              aria-invalid={why ? true : undefined}
              aria-describedby={why ? id : undefined}
              placeholder={props.assumed?.text ?? (props.needed ? 'needs a value' : '')}
              // biome-ignore lint/a11y/noAutofocus: only after the user has chosen this field to be typed in
              autoFocus={props.autoFocus}
              disabled={form.disabled}
              value={text}
              onChange={(event) => {
                setDraft(event.target.value);
                setWhy(null);
              }}
              onBlur={commit}
              onKeyDown={(event) => {
                const by = { ArrowUp: 1, ArrowDown: -1 }[event.key];
                if (event.key === 'Enter') commit();
                else if (event.key === 'Escape' && draft !== null) {
                  event.stopPropagation();
                  restore();
                } else if (event.altKey && by !== undefined) {
                  event.preventDefault();
                  step(by * (event.shiftKey ? 10 : 1));
                }
              }}
            />
          </div>
        )}
      </div>
      {why ? (
        <p className="refusal" id={id} role="alert">
          {why}
        </p>
      ) : null}
    </div>
  );
}
