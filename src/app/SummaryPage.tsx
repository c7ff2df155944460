import { useEffect, useState } from 'react';
import { printed } from '../report/cells';
import type { ReportInput } from '../report/input';
import { buildReport } from '../report/model';
import type { ReportModel, Table } from '../report/types';
import { useStores } from '../store/react';
import { actions } from './actions';
import { Dialogue } from './Dialogue';
import { cleanReportInput } from './reporting';
import './summary.css';

/** The stream summary in the app: the same model as PDF and CSV, solved once more from nothing. */
export function SummaryPage() {
  const stores = useStores();
  const [report, setReport] = useState<ReportModel | 'nothing' | null>(null);
  useEffect(() => {
    let alive = true;
    const end = new AbortController();
    const show = (input: ReportInput | undefined): void => {
      if (alive) setReport(input ? buildReport(input) : 'nothing');
    };
    cleanReportInput(stores, end.signal).then(show, (error: Error) => {
      if (!alive) return;
      setReport('nothing');
      stores.session.say('beyond', 'The stream summary was not made.', [error.message]);
    });
    return () => {
      alive = false;
      end.abort();
    };
  }, [stores]);
  const run = (id: string): void => actions.find((action) => action.id === id)?.run(stores);
  return (
    <Dialogue title="Stream summary (heat and material balance)" wide>
      <div className="summary-tools">
        <button type="button" className="button fill" onClick={() => run('export-pdf')}>
          Export PDF
        </button>
        <button type="button" className="button line" onClick={() => run('export-csv')}>
          Export CSV
        </button>
        <button type="button" className="button line" onClick={() => run('documents')}>
          More documents
        </button>
        {report && report !== 'nothing' ? (
          <span className="muted">
            {[report.state.text, report.strip.purpose, report.strip.warning, report.strip.margin]
              .filter(Boolean)
              .join('. ')}
            .
          </span>
        ) : null}
      </div>
      {report === null ? <p className="muted">Solving once more from nothing …</p> : null}
      {report === 'nothing' ? (
        <p>Nothing to show yet: choose chemicals, draw a feed, connect a unit. The table follows.</p>
      ) : null}
      {report && report !== 'nothing' ? (
        // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must take the focus to be scrolled by keys
        <section className="summary-scroll" aria-label="Tables" tabIndex={0}>
          {[
            report.streams,
            report.duties,
            report.powers,
            report.units,
            report.closure,
            report.requirements,
            report.limits,
            report.basis,
            report.utilities,
            report.assumptions,
            report.holds,
            report.pairs,
            report.revisions,
          ].map((table) => (
            <SummaryTable key={table.key} table={table} />
          ))}
          <h3>Cautions</h3>
          {report.cautions.map((text) => (
            <p key={text}>{text}</p>
          ))}
        </section>
      ) : null}
    </Dialogue>
  );
}

function SummaryTable({ table }: { readonly table: Table }) {
  return (
    <>
      <h3>{table.title}</h3>
      {table.rows.length > 0 ? (
        <table className="summary-table" data-table={table.key}>
          <thead>
            <tr>
              <th scope="col" colSpan={2}>
                <span className="unseen">Row</span>
              </th>
              {table.columns.map((column) => (
                <th scope="col" key={column.key} data-align={column.align}>
                  {column.head}
                  {column.sub ? <span className="muted">{column.sub}</span> : null}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {table.rows.map((row) => (
              <tr key={row.key} data-style={row.style} data-row={row.key}>
                <th scope="row">{row.label}</th>
                <td className="muted">{row.unit ?? ''}</td>
                {table.columns.map((column, k) => (
                  <td key={column.key} data-align={column.align}>
                    {row.cells[k] ? printed(row.cells[k]) : ''}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      ) : null}
      {table.notes.map((note) => (
        <p key={note} className="muted">
          {note}
        </p>
      ))}
    </>
  );
}
