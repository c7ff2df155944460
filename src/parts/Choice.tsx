export interface ChoiceProps<T extends string> {
  readonly label: string;
  readonly options: readonly { readonly value: T; readonly text: string }[];
  readonly value: T;
  readonly onChange: (value: T) => void;
  readonly path?: string;
  readonly disabled?: boolean;
  /** Without a frame: stands where a label would. */
  readonly asLabel?: boolean;
}

/** One of many: the browser's own list, in our type. */
export function Choice<T extends string>(props: ChoiceProps<T>) {
  return (
    <span className={props.asLabel ? 'choice as-label' : 'choice'}>
      <select
        aria-label={props.label}
        data-field={props.path}
        value={props.value}
        disabled={props.disabled}
        onChange={(event) => props.onChange(event.target.value as T)}
      >
        {props.options.map(({ value, text }) => (
          <option key={value} value={value}>
            {text}
          </option>
        ))}
      </select>
    </span>
  );
}
