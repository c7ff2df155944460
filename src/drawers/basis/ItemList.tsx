import type { ReactNode } from 'react';

interface Props<T> {
  readonly title: string;
  readonly items: readonly T[];
  /** "Add a revision" */
  readonly add: string;
  readonly disabled: boolean;
  /** Of one item, for its remove button and for screen readers. */
  readonly name: (item: T, k: number) => string;
  readonly make: () => T;
  readonly onChange: (items: readonly T[]) => void;
  readonly children: (item: T, set: (next: T) => void, k: number) => ReactNode;
  /** Where a new one goes; absent: at the end. */
  readonly addFirst?: true;
  readonly empty: string;
}

/** A list of records that can be added to, taken from, and changed one by one; each change is one step of undo. */
export function ItemList<T>(props: Props<T>) {
  const { items, disabled, onChange } = props;
  const add = (): void => {
    const made = props.make();
    onChange(props.addFirst ? [made, ...items] : [...items, made]);
  };
  return (
    <section className="section">
      <div className="section-head">
        <h3>{props.title}</h3>
        <button type="button" className="link" disabled={disabled} onClick={add}>
          {props.add}
        </button>
      </div>
      {items.length === 0 ? <p className="muted">{props.empty}</p> : null}
      {items.map((item, k) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: records have no name of their own that stays
        <fieldset className="basis-item" key={k} aria-label={props.name(item, k)}>
          {props.children(item, (next) => onChange(items.map((was, j) => (j === k ? next : was))), k)}
          <button
            type="button"
            className="link quiet"
            disabled={disabled}
            aria-label={`Remove ${props.name(item, k)}`}
            onClick={() => onChange(items.filter((_, j) => j !== k))}
          >
            Remove
          </button>
        </fieldset>
      ))}
    </section>
  );
}
