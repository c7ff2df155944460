import { Choice } from '../../parts/Choice';
import type { FieldEdit } from '../../parts/fieldEdit';
import { QuantityField } from '../../parts/QuantityField';
import { TextField } from '../../parts/TextField';
import { type Dimension, STANDARD_SITE } from '../../quantity';
import type { Quantity, Sketch } from '../../sketch/types';
import type { Edit } from '../../store/commands';
import { useCompiled, useStores } from '../../store/react';
import { run } from '../run';

interface Common {
  readonly label: string;
  readonly path: string;
  readonly disabled: boolean;
}

function Line({ label, children }: { readonly label: string; readonly children: React.ReactNode }) {
  return (
    <div className="setting">
      <div className="setting-label">{label}</div>
      <div className="setting-control">{children}</div>
    </div>
  );
}

/** Words of a record. Text that must be there is not taken away: `needed` says what it is. */
export function Words(
  props: Common & {
    readonly value: string | undefined;
    readonly onChange: (text: string) => void;
    readonly needed?: string;
    readonly lines?: number;
    readonly placeholder?: string;
  },
) {
  return (
    <Line label={props.label}>
      <TextField
        label={props.label}
        path={props.path}
        className="framed"
        value={props.value ?? ''}
        disabled={props.disabled}
        placeholder={props.placeholder}
        {...(props.lines ? { lines: props.lines } : {})}
        onCommit={(text) => {
          if (props.needed && text.trim() === '') return props.needed;
          props.onChange(text.trim());
          return undefined;
        }}
      />
    </Line>
  );
}

/** A quantity of a record, in any unit that measures it; it may stay empty. */
export function Amount(
  props: Common & {
    readonly value: Quantity | undefined;
    readonly dim: Dimension;
    readonly change: (value: Quantity | undefined) => (sketch: Sketch) => Edit;
    readonly assumed?: { readonly text: string; readonly why: string };
  },
) {
  const { sketch } = useStores();
  const site_Pa = useCompiled((state) => state.problem?.site.pressure_Pa);
  const after = (s: Sketch, value: Quantity): Sketch => {
    const edit = props.change(value)(s);
    return edit.ok ? edit.sketch : s;
  };
  const edit: FieldEdit = {
    set: (value) => void run(sketch, props.change(value)),
    begin: () => sketch.begin(`slide ${props.label.toLowerCase()}`),
    change: (value) => sketch.change((s) => after(s, value)),
    commit: () => sketch.commit(),
    cancel: () => sketch.cancel(),
  };
  return (
    <Line label={props.label}>
      <QuantityField
        label={props.label}
        path={props.path}
        value={props.value}
        dims={props.dim}
        site={site_Pa === undefined ? STANDARD_SITE : { P_Pa: site_Pa }}
        disabled={props.disabled}
        edit={edit}
        empty="none"
        {...(props.assumed ? { assumed: props.assumed } : {})}
      />
    </Line>
  );
}

export function OneOf<T extends string>(
  props: Common & {
    readonly value: T;
    readonly options: readonly { readonly value: T; readonly text: string }[];
    readonly onChange: (value: T) => void;
  },
) {
  return (
    <Line label={props.label}>
      <Choice
        label={props.label}
        path={props.path}
        options={props.options}
        value={props.value}
        disabled={props.disabled}
        onChange={props.onChange}
      />
    </Line>
  );
}
