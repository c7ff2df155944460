import { useCallback, useRef } from 'react';
import type { Finding } from '../../engine/outcome';
import { conflictsOf, countMiss, type FixedView } from '../../engine/units/column/free';
import type { Json } from '../../sketch/types';
import { type Form, withAnswers } from '../unit/form';
import { FieldFindings } from '../unit/SettingRow';
import { FormProvider, useChanged, useForm } from '../unit/useForm';
import { capital } from '../words';
import { type Draft, draftForm } from './draft';
import { useDraft } from './drafts';
import { FixingRow } from './FixingRow';
import { fittingOffers, fixedOf, type Offer, offerKey } from './fixings';
import { useFixingWords } from './words';

/** What fixes the column: one row each, how many of how many, and what contradicts what before anything is solved. */
export function FixedBy() {
  const form = useForm();
  const source = useChanged(withOwnFindings);
  const words = useFixingWords();
  const { count, fixed, free } = form.ask(({ unit }) => ({
    count: listOf(unit.settings.fixedBy).length,
    ...fixedOf(unit.settings as FixedView),
  }));
  const { draft, isNew, keep: setDraft } = useDraft(form.unit.id);
  const isStale = draft !== null && draft.row > count;
  if (isStale) setDraft(null);

  /** The rows as they stand when something is done to them. */
  const items = (): readonly Json[] => listOf(form.value('fixedBy'));
  const put = (row: number, item: Json, label: string): void => {
    setDraft(null);
    const next = row < count ? items().map((old, k) => (k === row ? item : old)) : [...items(), item];
    form.set([{ path: 'fixedBy', value: next }], label);
  };
  const take = (row: number): void => {
    setDraft(null);
    form.set(
      [{ path: 'fixedBy', value: items().filter((_, k) => k !== row) }],
      `take away ${form.unit.tag} ${words.offer(offerKey((items()[row] ?? {}) as object))}`,
    );
  };
  const choose = (row: number, offer: Offer): void => {
    const old = items()[row];
    setDraft(old !== undefined && offerKey(old as object) === offer.key ? null : { row, item: offer.item });
  };
  const rows = Math.max(count, draft ? draft.row + 1 : 0);
  const isOpen = free !== undefined && rows < free;
  return (
    <FormProvider value={source}>
      <section className="section fixed-by" data-field="fixedBy">
        <div className="section-head">
          <h3>Fixed by</h3>
          <span className="count" role="status">
            {free === undefined ? 'choose the ends first' : `fixed ${fixed} of ${free}`}
          </span>
        </div>
        {Array.from({ length: rows }, (_, row) => (
          <Row
            // biome-ignore lint/suspicious/noArrayIndexKey: rows are places, not things
            key={row}
            row={row}
            draft={draft?.row === row ? draft : null}
            stands={row < count}
            isNew={isNew}
            keep={setDraft}
            put={put}
            choose={(offer) => choose(row, offer)}
            take={() => take(row)}
          />
        ))}
        {isOpen ? (
          <BlankRow row={rows} choose={(offer) => setDraft({ row: rows, item: offer.item })} />
        ) : null}
        {free === 0 && rows === 0 ? (
          <p className="muted">Without ends nothing is free: feeds, stages and pressures fix this column.</p>
        ) : null}
        <FieldFindings path="fixedBy" />
      </section>
    </FormProvider>
  );
}

const listOf = (value: Json | undefined): readonly Json[] => (Array.isArray(value) ? value : []);

/** What a row may be made of: the same for as long as only numbers change. */
const useOffers = (row: number): readonly Offer[] =>
  useForm().ask(({ unit }) =>
    fittingOffers(unit.settings as FixedView, row, Object.keys(unit.settings.sides ?? {}).length),
  );

interface RowProps {
  readonly row: number;
  /** In place of what stands in this row, until it has a value. */
  readonly draft: Draft | null;
  /** Something stands in this row. */
  readonly stands: boolean;
  readonly isNew: boolean;
  readonly keep: (draft: Draft | null) => void;
  readonly put: (row: number, item: Json, label: string) => void;
  readonly choose: (offer: Offer) => void;
  readonly take: () => void;
}

function Row({ row, draft, stands, isNew, keep, put, choose, take }: RowProps) {
  const words = useFixingWords();
  const form = useForm();
  const offers = useOffers(row);
  const hands = useRef({ keep, put });
  hands.current = { keep, put };
  const source = useChanged(
    useCallback(
      (plain: Form) =>
        draft
          ? draftForm(
              plain,
              draft,
              (item) => hands.current.keep({ row, item }),
              (item, label) => hands.current.put(row, item, label),
            )
          : plain,
      [draft, row],
    ),
  );
  const stays = draft && stands ? words.item(form.value(`fixedBy.${row}`) ?? {}) : undefined;
  return (
    <FormProvider value={source}>
      <FixingRow
        row={row}
        offers={offers}
        choose={choose}
        take={() => (draft && !stands ? keep(null) : take())}
        stays={stays}
        isNew={draft !== null && isNew}
        leave={draft ? () => keep(null) : undefined}
      />
    </FormProvider>
  );
}

/**
 * What the solver said of these settings, and what can be said without it: contradictions stand at their rows before an
 * answer comes. That something is missing the count and the blank row say already.
 */
function knownAtOnce({ unit, findings }: Form): readonly Finding[] {
  const view = unit.settings as FixedView;
  const miss = countMiss(view);
  const own = [...conflictsOf(view, Object.keys(unit.settings.sides ?? {}).length), ...(miss ? [miss] : [])];
  const said = (f: Finding): boolean =>
    findings.some(({ code, at }) => code === f.code && at.path === f.at.path);
  return [
    ...findings,
    ...own.filter((f) => !said(f)).map((f) => ({ ...f, at: { ...f.at, unit: unit.id } })),
  ].filter(({ code }) => code !== 'column/fixed-too-few');
}

const withOwnFindings = (form: Form): Form => withAnswers({ ...form, findings: knownAtOnce(form) });

/** The row that is missing: all that may stand there. */
function BlankRow({ row, choose }: { readonly row: number; readonly choose: (offer: Offer) => void }) {
  const form = useForm();
  const offers = useOffers(row);
  const words = useFixingWords();
  return (
    <fieldset className="blank-row">
      <legend>
        <span className="blank-mark">needs a value</span> one of these fixes it:
      </legend>
      {offers.map((offer) => (
        <button
          key={offer.key}
          type="button"
          className="link"
          disabled={form.disabled}
          onClick={() => choose(offer)}
        >
          {capital(words.offer(offer.key))}
        </button>
      ))}
    </fieldset>
  );
}
