import { useMemo } from 'react';
import type { Finding } from '../../engine/outcome';
import { conflictsOf, countMiss, type FixedView } from '../../engine/units/column/free';
import type { Json } from '../../sketch/types';
import { type Form, FormProvider, useForm } from '../unit/form';
import { FieldFindings } from '../unit/SettingRow';
import { capital } from '../words';
import { draftForm } from './draft';
import { useDraft } from './drafts';
import { FixingRow } from './FixingRow';
import { fittingOffers, fixedOf, type Offer, offerKey } from './fixings';
import { useFixingWords } from './words';

/** What fixes the column: one row each, how many of how many, and what contradicts what before anything is solved. */
export function FixedBy() {
  const plain = useForm();
  const form = useMemo(() => ({ ...plain, findings: knownAtOnce(plain) }), [plain]);
  const words = useFixingWords();
  const view = form.unit.settings as FixedView;
  const items = useMemo(() => {
    const list = form.unit.settings.fixedBy;
    return Array.isArray(list) ? (list as readonly Json[]) : [];
  }, [form.unit.settings.fixedBy]);
  const sides = Object.keys(form.unit.settings.sides ?? {}).length;
  const { fixed, free } = fixedOf(view);
  const { draft, isNew, keep: setDraft } = useDraft(form.unit.id);
  const isStale = draft !== null && draft.row > items.length;
  if (isStale) setDraft(null);

  const put = (row: number, item: Json, label: string): void => {
    setDraft(null);
    const next = row < items.length ? items.map((old, k) => (k === row ? item : old)) : [...items, item];
    form.set([{ path: 'fixedBy', value: next }], label);
  };
  const take = (row: number): void => {
    setDraft(null);
    form.set(
      [{ path: 'fixedBy', value: items.filter((_, k) => k !== row) }],
      `take away ${form.unit.tag} ${words.offer(offerKey((items[row] ?? {}) as object))}`,
    );
  };
  const choose = (row: number, offer: Offer): void => {
    const old = items[row];
    setDraft(old !== undefined && offerKey(old as object) === offer.key ? null : { row, item: offer.item });
  };
  const rowOf = (row: number) => {
    const pending = draft?.row === row ? draft : null;
    const old = items[row];
    return (
      <FormProvider
        key={row}
        value={
          pending
            ? draftForm(
                form,
                pending,
                (item) => setDraft({ row, item }),
                (item, label) => put(row, item, label),
              )
            : form
        }
      >
        <FixingRow
          row={row}
          offers={fittingOffers(view, row, sides)}
          choose={(offer) => choose(row, offer)}
          take={() => (pending && old === undefined ? setDraft(null) : take(row))}
          stays={pending && old !== undefined ? words.item(old) : undefined}
          isNew={pending !== null && isNew}
          leave={pending ? () => setDraft(null) : undefined}
        />
      </FormProvider>
    );
  };
  const rows = Math.max(items.length, draft ? draft.row + 1 : 0);
  const isOpen = free !== undefined && rows < free;
  return (
    <section className="section fixed-by" data-field="fixedBy">
      <div className="section-head">
        <h3>Fixed by</h3>
        <span className="count" role="status">
          {free === undefined ? 'choose the ends first' : `fixed ${fixed} of ${free}`}
        </span>
      </div>
      {Array.from({ length: rows }, (_, row) => rowOf(row))}
      {isOpen ? (
        <BlankRow
          offers={fittingOffers(view, rows, sides)}
          choose={(offer) => setDraft({ row: rows, item: offer.item })}
        />
      ) : null}
      {free === 0 && rows === 0 ? (
        <p className="muted">Without ends nothing is free: feeds, stages and pressures fix this column.</p>
      ) : null}
      <FormProvider value={form}>
        <FieldFindings path="fixedBy" />
      </FormProvider>
    </section>
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

/** The row that is missing: all that may stand there. */
function BlankRow({
  offers,
  choose,
}: {
  readonly offers: readonly Offer[];
  readonly choose: (offer: Offer) => void;
}) {
  const form = useForm();
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
