import { memo, useMemo } from 'react';
import { Disclosure } from '../../parts/Disclosure';
import { Segmented } from '../../parts/Segmented';
import type { ReportInput } from '../../report/input';
import { SECTIONS } from '../../report/sections';
import { rowChoices } from '../../report/streamTable';
import type { DocumentChoices } from '../../sketch/documentTypes';
import { setDocuments } from '../../store/commands';
import { useSketch, useStores } from '../../store/react';

interface Option {
  readonly key: string;
  readonly text: string;
}

/** Paper, sections, rows and streams of the documents; saved with the sketch, each change one step of undo. */
export const Choices = memo(function Choices({ input }: { readonly input: ReportInput }) {
  const { sketch: store } = useStores();
  const sketch = useSketch((state) => state.sketch);
  const disabled = useSketch((state) => !state.writable);
  const choices = sketch.documents ?? {};
  const change = (next: Partial<DocumentChoices>): void => {
    const edit = setDocuments(store.getState().sketch, next);
    if (edit.ok) store.apply(edit.label, () => edit.sketch);
  };
  // Which rows there are hangs on the results, not on what is chosen.
  const rows = useMemo(() => rowChoices(input), [input]);
  const streams = sketch.streams.map((s) => ({
    key: s.id,
    text: `${s.number}${s.name ? ` ${s.name}` : ''}`,
  }));
  const lists = [
    ['withoutSections', 'Sections', SECTIONS.map(({ key, title }) => ({ key, text: title }))],
    ['withoutRows', 'Rows of the stream summary', rows],
    ['withoutStreams', 'Streams', streams],
  ] as const;
  return (
    <>
      <div className="documents-paper">
        <span>Paper</span>
        <Segmented
          label="Paper"
          path="documents.paper"
          options={[
            { value: 'A3', text: 'A3', title: 'A3 landscape' },
            { value: 'A4', text: 'A4', title: 'A4 landscape' },
          ]}
          value={choices.paper}
          assumed="A3"
          disabled={disabled}
          onChange={(paper) => change({ paper })}
        />
      </div>
      {lists.map(([field, title, options]) => (
        <Checks
          key={field}
          field={field}
          title={title}
          options={options}
          without={choices[field] ?? []}
          disabled={disabled}
          onChange={(next) => change({ [field]: next })}
        />
      ))}
    </>
  );
});

function Checks(props: {
  readonly field: string;
  readonly title: string;
  readonly options: readonly Option[];
  readonly without: readonly string[];
  readonly disabled: boolean;
  readonly onChange: (without: readonly string[]) => void;
}) {
  const { options, without, onChange } = props;
  const shown = options.filter(({ key }) => !without.includes(key)).length;
  return (
    <Disclosure title={props.title} aside={`${shown} of ${options.length}`}>
      <div className="documents-checks" data-field={`documents.${props.field}`}>
        <span>
          <button type="button" className="link" disabled={props.disabled} onClick={() => onChange([])}>
            All
          </button>{' '}
          <button
            type="button"
            className="link"
            disabled={props.disabled}
            onClick={() => onChange(options.map(({ key }) => key))}
          >
            None
          </button>
        </span>
        {options.map(({ key, text }) => (
          <label key={key}>
            <input
              type="checkbox"
              checked={!without.includes(key)}
              disabled={props.disabled}
              onChange={() =>
                onChange(without.includes(key) ? without.filter((k) => k !== key) : [...without, key])
              }
            />
            {text}
          </label>
        ))}
      </div>
    </Disclosure>
  );
}
