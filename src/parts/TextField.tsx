import { useId, useState } from 'react';

export interface TextFieldProps {
  readonly label: string;
  readonly path: string;
  readonly value: string;
  /** Answers why the text is not taken, or nothing when it was. */
  readonly onCommit: (text: string) => string | undefined;
  readonly placeholder?: string | undefined;
  readonly disabled?: boolean;
  readonly lines?: number;
  readonly className?: string;
  /** Texts to choose from; any other may be typed. */
  readonly offers?: readonly string[];
}

/** Words: Enter or leaving the field commits, Esc restores; a text that is not taken stays, with the reason. */
export function TextField(props: TextFieldProps) {
  const [draft, setDraft] = useState<string | null>(null);
  const [why, setWhy] = useState<string | undefined>();
  const id = useId();
  const commit = (): void => {
    if (draft === null) return;
    if (draft === props.value) {
      restore();
      return;
    }
    const refused = props.onCommit(draft);
    setWhy(refused);
    if (refused === undefined) setDraft(null);
  };
  const restore = (): void => {
    setDraft(null);
    setWhy(undefined);
  };
  const shared = {
    'aria-label': props.label,
    'data-field': props.path,
    'aria-invalid': why ? true : undefined,
    'aria-describedby': why ? id : undefined,
    value: draft ?? props.value,
    placeholder: props.placeholder,
    disabled: props.disabled,
    spellCheck: false,
    onChange: (event: { readonly target: { readonly value: string } }) => {
      setDraft(event.target.value);
      setWhy(undefined);
    },
    onBlur: commit,
  };
  return (
    <span className={`text-field ${props.className ?? ''}`}>
      {props.lines ? (
        <textarea
          {...shared}
          rows={props.lines}
          onKeyDown={(event) => {
            if (event.key !== 'Escape' || draft === null) return;
            event.stopPropagation();
            restore();
          }}
        />
      ) : (
        <input
          {...shared}
          type="text"
          autoComplete="off"
          list={props.offers ? `${id}-offers` : undefined}
          onKeyDown={(event) => {
            if (event.key === 'Enter') commit();
            else if (event.key === 'Escape' && draft !== null) {
              event.stopPropagation();
              restore();
            }
          }}
        />
      )}
      {props.offers ? (
        <datalist id={`${id}-offers`}>
          {props.offers.map((text) => (
            <option key={text} value={text} />
          ))}
        </datalist>
      ) : null}
      {why ? (
        <span className="refusal" id={id} role="alert">
          {why}
        </span>
      ) : null}
    </span>
  );
}
