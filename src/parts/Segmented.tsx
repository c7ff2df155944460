import { useId } from 'react';

export interface SegmentedProps<T extends string> {
  readonly label: string;
  readonly options: readonly { readonly value: T; readonly text: string; readonly title?: string }[];
  readonly value: T | undefined;
  readonly onChange: (value: T) => void;
  readonly path?: string;
  /** What counts while nothing is chosen. */
  readonly assumed?: T;
  readonly disabled?: boolean;
}

/** One of a few, all in sight: a group of radio buttons drawn as one strip. Arrows move, as in any radio group. */
export function Segmented<T extends string>(props: SegmentedProps<T>) {
  const name = useId();
  return (
    <div className="segmented" role="radiogroup" aria-label={props.label} data-field={props.path}>
      {props.options.map(({ value, text, title }) => (
        <label
          key={value}
          title={title}
          className={props.value === undefined && value === props.assumed ? 'assumed-option' : undefined}
        >
          <input
            type="radio"
            name={name}
            checked={value === props.value}
            disabled={props.disabled}
            onChange={() => props.onChange(value)}
          />
          <span>{text}</span>
        </label>
      ))}
    </div>
  );
}
