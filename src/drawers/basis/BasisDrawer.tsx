import { dayOf } from '../../report/day';
import type { DesignBasis, FeedCase, Hold, Revision, UtilityLevel } from '../../sketch/documentTypes';
import type { Sketch } from '../../sketch/types';
import { setDesignBasis, setHolds, setRevisions, setTitle } from '../../store/commands';
import { useCompiled, useSketch, useStores } from '../../store/react';
import { Head } from '../Head';
import { run } from '../run';
import { assumptionWords, capital } from '../words';
import { Amount, OneOf, Words } from './fields';
import { ItemList } from './ItemList';
import { Requirements } from './Requirements';
import './basis.css';

interface Part {
  readonly disabled: boolean;
}

/** What the documents carry beside the numbers: purpose, revisions, design basis, requirements, utilities, HOLDs. */
export function BasisDrawer() {
  const disabled = useSketch((state) => !state.writable);
  return (
    <>
      <Head
        label="Design basis and revisions"
        sentence="Printed with every document; requirements are judged against the results."
      />
      <div className="drawer-body">
        <Purpose disabled={disabled} />
        <Revisions disabled={disabled} />
        <Cases disabled={disabled} />
        <Requirements disabled={disabled} />
        <Utilities disabled={disabled} />
        <Holds disabled={disabled} />
        <Remarks disabled={disabled} />
      </div>
    </>
  );
}

function Purpose({ disabled }: Part) {
  const { sketch } = useStores();
  const purpose = useSketch((state) => state.sketch.title.purpose);
  return (
    <section className="section">
      <div className="section-head">
        <h3>Purpose</h3>
      </div>
      <Words
        label="Purpose"
        path="title.purpose"
        disabled={disabled}
        value={purpose}
        placeholder="for review"
        onChange={(text) => void run(sketch, (s) => setTitle(s, 'purpose', text))}
      />
      <p className="field-note">
        Every page warns “preliminary – not for construction” unless this says “for construction”, “for
        detailed design” or “as built”.
      </p>
    </section>
  );
}

/**
 * A, B ... before approval; whoever has reached numbers goes on with numbers. The table's first entry records the revision
 * that the title block has had until then.
 */
function nextMark({ title, revisions = [] }: Pick<Sketch, 'title' | 'revisions'>): string {
  const [newest] = revisions;
  if (!newest) return title.revision?.trim() || 'A';
  const last = newest.mark;
  if (/^\d+$/.test(last)) return String(Number(last) + 1);
  return /^[A-Y]$/.test(last) ? String.fromCharCode(last.charCodeAt(0) + 1) : 'A';
}

function Revisions({ disabled }: Part) {
  const { sketch } = useStores();
  const revisions = useSketch((state) => state.sketch.revisions) ?? [];
  return (
    <ItemList<Revision>
      title="Revisions, newest first"
      items={revisions}
      add="Add a revision"
      addFirst
      disabled={disabled}
      empty="None is recorded: the document is a draft."
      name={(item) => `revision ${item.mark}`}
      make={() => ({ mark: nextMark(sketch.getState().sketch), date: dayOf(new Date()) })}
      onChange={(items) => void run(sketch, (s) => setRevisions(s, items))}
    >
      {(item, set, k) => {
        const words = (key: Exclude<keyof Revision, 'mark'>, label: string) => (
          <Words
            label={label}
            path={`revisions.${k}.${key}`}
            disabled={disabled}
            value={item[key]}
            onChange={(text) => set({ ...item, [key]: text })}
          />
        );
        return (
          <>
            <Words
              label="Mark"
              path={`revisions.${k}.mark`}
              disabled={disabled}
              value={item.mark}
              needed="A revision needs a mark."
              onChange={(mark) => set({ ...item, mark })}
            />
            {words('date', 'Date')}
            {words('what', 'What changed')}
            {words('by', 'By')}
            {words('checked', 'Checked')}
            {words('approved', 'Approved')}
          </>
        );
      }}
    </ItemList>
  );
}

function Cases({ disabled }: Part) {
  const { sketch } = useStores();
  const cases = useSketch((state) => state.sketch.designBasis?.cases) ?? [];
  return (
    <ItemList<FeedCase>
      title="Feed cases"
      items={cases}
      add="Add a feed case"
      disabled={disabled}
      empty="None is named: the feeds of the sketch are the only case."
      name={(item) => `feed case ${item.name}`}
      make={() => ({ name: `Case ${cases.length + 1}` })}
      onChange={(items) => void run(sketch, (s) => setDesignBasis(s, { cases: items }))}
    >
      {(item, set, k) => (
        <>
          <Words
            label="Name"
            path={`designBasis.cases.${k}.name`}
            disabled={disabled}
            value={item.name}
            needed="A feed case needs a name."
            onChange={(name) => set({ ...item, name })}
          />
          <Words
            label="In words"
            path={`designBasis.cases.${k}.text`}
            disabled={disabled}
            value={item.text}
            lines={2}
            onChange={(text) => set({ ...item, text })}
          />
        </>
      )}
    </ItemList>
  );
}

function Utilities({ disabled }: Part) {
  const { sketch } = useStores();
  const basis = useSketch((state) => state.sketch.designBasis);
  const levels = basis?.utilities ?? [];
  const temperature = (k: number, key: 'supply' | 'back') => (value: UtilityLevel['supply']) => (s: Sketch) =>
    setDesignBasis(s, {
      utilities: (s.designBasis?.utilities ?? []).map((was, j) => {
        if (j !== k) return was;
        const { [key]: _, ...rest } = was;
        return value === undefined ? rest : { ...rest, [key]: value };
      }),
    });
  return (
    <>
      <ItemList<UtilityLevel>
        title="Utility levels"
        items={levels}
        add="Add a level"
        disabled={disabled}
        empty="None is given: documents say what temperature each duty needs."
        name={(item) => `utility level ${item.name}`}
        make={() => ({ name: `Level ${levels.length + 1}`, use: 'heating' })}
        onChange={(items) => void run(sketch, (s) => setDesignBasis(s, { utilities: items }))}
      >
        {(item, set, k) => (
          <>
            <Words
              label="Name"
              path={`designBasis.utilities.${k}.name`}
              disabled={disabled}
              value={item.name}
              needed="A level needs a name."
              onChange={(name) => set({ ...item, name })}
            />
            <OneOf
              label="For"
              path={`designBasis.utilities.${k}.use`}
              disabled={disabled}
              value={item.use}
              options={[
                { value: 'heating', text: 'heating' },
                { value: 'cooling', text: 'cooling' },
              ]}
              onChange={(use) => set({ ...item, use })}
            />
            <Amount
              label="Comes at"
              path={`designBasis.utilities.${k}.supply`}
              disabled={disabled}
              value={item.supply}
              dim="temperature"
              change={temperature(k, 'supply')}
            />
            <Amount
              label="Leaves at"
              path={`designBasis.utilities.${k}.back`}
              disabled={disabled}
              value={item.back}
              dim="temperature"
              change={temperature(k, 'back')}
            />
            <Words
              label="Note"
              path={`designBasis.utilities.${k}.note`}
              disabled={disabled}
              value={item.note}
              onChange={(note) => set({ ...item, note })}
            />
          </>
        )}
      </ItemList>
      <Amount
        label="Least approach"
        path="designBasis.approach"
        disabled={disabled}
        value={basis?.approach}
        dim="temperatureDifference"
        assumed={{ text: '10 K', why: 'Between a process and its utility; common practice.' }}
        change={(approach) => (s) => setDesignBasis(s, { approach })}
      />
    </>
  );
}

function Holds({ disabled }: Part) {
  const { sketch } = useStores();
  const holds = useSketch((state) => state.sketch.holds) ?? [];
  const units = useSketch((state) => state.sketch.units);
  const assumptions = useCompiled((state) => state.assumptions);
  const keyOf = (of: { readonly unit?: string; readonly path?: string }): string =>
    of.path === undefined ? '' : `${of.unit ?? ''} ${of.path}`;
  const options = assumptions.map((a) => {
    const unit = units.find((u) => u.id === a.unit);
    return { value: keyOf(a), text: `${a.no} ${unit?.tag ?? ''} ${assumptionWords(a, unit?.kind).what}` };
  });
  const next = holds.reduce((most, hold) => Math.max(most, Number(hold.no) || 0), 0) + 1;
  return (
    <ItemList<Hold>
      title="HOLDs"
      items={holds}
      add="Raise a HOLD"
      disabled={disabled}
      empty="None is raised."
      name={(item) => `HOLD ${item.no}`}
      make={() => ({ no: String(next), what: 'To be confirmed' })}
      onChange={(items) => void run(sketch, (s) => setHolds(s, items))}
    >
      {(item, set, k) => (
        <>
          <Words
            label={`HOLD ${item.no}`}
            path={`holds.${k}.what`}
            disabled={disabled}
            value={item.what}
            needed="Say what is not settled."
            lines={2}
            onChange={(what) => set({ ...item, what })}
          />
          <OneOf
            label="Assumption"
            path={`holds.${k}.path`}
            disabled={disabled}
            value={keyOf(item)}
            options={[
              { value: '', text: 'none' },
              ...options,
              ...(item.path !== undefined && !options.some((o) => o.value === keyOf(item))
                ? [{ value: keyOf(item), text: 'not assumed any more' }]
                : []),
            ]}
            onChange={(key) => {
              const { unit: _unit, path: _path, ...rest } = item;
              const chosen = assumptions.find((a) => keyOf(a) === key);
              set(
                chosen ? { ...rest, path: chosen.path, ...(chosen.unit ? { unit: chosen.unit } : {}) } : rest,
              );
            }}
          />
          <Words
            label="Owner"
            path={`holds.${k}.owner`}
            disabled={disabled}
            value={item.owner}
            onChange={(owner) => set({ ...item, owner })}
          />
          <Words
            label="Due"
            path={`holds.${k}.date`}
            disabled={disabled}
            value={item.date}
            onChange={(date) => set({ ...item, date })}
          />
        </>
      )}
    </ItemList>
  );
}

const REMARKS: readonly (readonly [keyof Pick<DesignBasis, 'conditions' | 'notes'>, string])[] = [
  ['conditions', 'site conditions'],
  ['notes', 'notes'],
];

function Remarks({ disabled }: Part) {
  const { sketch } = useStores();
  const basis = useSketch((state) => state.sketch.designBasis);
  return (
    <section className="section">
      <div className="section-head">
        <h3>In words</h3>
      </div>
      {REMARKS.map(([key, label]) => (
        <Words
          key={key}
          label={capital(label)}
          path={`designBasis.${key}`}
          disabled={disabled}
          value={basis?.[key]}
          lines={3}
          onChange={(text) => void run(sketch, (s) => setDesignBasis(s, { [key]: text }))}
        />
      ))}
    </section>
  );
}
