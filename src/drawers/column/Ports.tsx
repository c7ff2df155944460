import type { Port } from '../../engine/ids';
import { Segmented } from '../../parts/Segmented';
import { FlowEditor } from '../unit/FlowEditor';
import { FieldFindings, SettingRow } from '../unit/SettingRow';
import { useForm } from '../unit/useForm';
import { WholeField } from '../unit/WholeField';
import { capital, portWord } from '../words';
import { endsOf, type PortRow, usePortRows } from './places';

const labelOf = ({ port, stream }: PortRow): string =>
  `${capital(portWord('column', port))}${stream === undefined ? '' : `, stream ${stream}`}`;

function useStages(): number | undefined {
  const stages = useForm().value('stages');
  return typeof stages === 'number' ? stages : undefined;
}

/** Where each connected feed enters: on a stage, or in an end. */
export function Feeds() {
  const form = useForm();
  const rows = usePortRows('feed');
  const stages = useStages();
  return (
    <fieldset className={rows.length === 0 ? 'group line' : 'group plain'}>
      <legend className={rows.length === 0 ? undefined : 'unseen'}>Feeds</legend>
      {rows.map((row) => {
        const path = `feeds.${row.port}.stage`;
        return (
          <SettingRow key={row.port} label={labelOf(row)} path={path}>
            <WholeField
              path={path}
              word={`stage of ${portWord('column', row.port)}`}
              beside={[]}
              min={1}
              max={stages}
              ends={endsOf(form)}
              needed={row.stream !== undefined}
            />
            {row.stream === undefined ? <NoStream path={`feeds.${row.port}`} word="feed stage" /> : null}
            <FieldFindings path={`feeds.${row.port}`} />
          </SettingRow>
        );
      })}
      {rows.length === 0 ? <p className="muted">Connect a feed first: each gets a row here.</p> : null}
      <FieldFindings path="feeds" />
    </fieldset>
  );
}

/** A setting of a stream that has gone can be taken away. */
function NoStream({ path, word }: { readonly path: string; readonly word: string }) {
  const form = useForm();
  return (
    <p className="field-note">
      no stream here{' '}
      <button
        type="button"
        className="link"
        disabled={form.disabled}
        onClick={() => form.set([{ path, value: undefined }], `clear ${form.unit.tag} ${word}`)}
      >
        Take this away
      </button>
    </p>
  );
}

/** What is drawn between the ends: from which stage, which phase, how much. */
export function SideDraws() {
  const rows = usePortRows('side');
  return (
    <fieldset className={rows.length === 0 ? 'group line' : 'group plain'}>
      <legend className={rows.length === 0 ? undefined : 'unseen'}>Side draws</legend>
      {rows.map((row) => (
        <SideDraw key={row.port} row={row} />
      ))}
      {rows.length === 0 ? <p className="muted">None: pull a stream from the side.</p> : null}
      <FieldFindings path="sides" />
    </fieldset>
  );
}

function SideDraw({ row }: { readonly row: PortRow }) {
  const form = useForm();
  const stages = useStages();
  const base = `sides.${row.port}`;
  const word = portWord('column', row.port);
  return (
    <>
      <SettingRow label={labelOf(row)} path={`${base}.stage`}>
        <div className="stages-line">
          <WholeField
            path={`${base}.stage`}
            word={`stage of ${word}`}
            beside={[]}
            min={1}
            max={stages}
            needed
          />
          <Phase port={row.port} />
        </div>
        {row.stream === undefined ? <NoStream path={base} word={word} /> : null}
        <FieldFindings path={`${base}.phase`} />
        <FieldFindings path={base} />
      </SettingRow>
      <SettingRow label={<span className="unseen">{capital(`flow of ${word}`)}</span>} path={`${base}.flow`}>
        <FlowEditor
          path={`${base}.flow`}
          word={`flow of ${word}`}
          beside={[]}
          share={false}
          needed={!form.has(`${base}.flow`)}
        />
      </SettingRow>
    </>
  );
}

function Phase({ port }: { readonly port: Port }) {
  const form = useForm();
  const path = `sides.${port}.phase`;
  const value = form.value(path);
  return (
    <span data-state={value === undefined ? 'needed' : undefined}>
      <Segmented
        label={`Phase of ${portWord('column', port)}`}
        path={path}
        value={value === 'liquid' || value === 'vapour' ? value : undefined}
        disabled={form.disabled}
        options={[
          { value: 'liquid', text: 'liquid' },
          { value: 'vapour', text: 'vapour' },
        ]}
        onChange={(next) =>
          form.set([{ path, value: next }], `set ${form.unit.tag} phase of ${portWord('column', port)}`)
        }
      />
    </span>
  );
}
