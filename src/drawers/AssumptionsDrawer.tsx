import type { Assumption } from '../sketch/types';
import { setHolds } from '../store/commands';
import { useCompiled, useSketch, useStores } from '../store/react';
import { focusField } from './focusField';
import { Head } from './Head';
import { run } from './run';
import { assumptionWords, capital } from './words';

/** Every value used because the user gave none: number, value, reason, and the way to the place where it can be given. */
export function AssumptionsDrawer() {
  const assumptions = useCompiled((state) => state.assumptions);
  const units = useSketch((state) => state.sketch.units);
  const n = assumptions.length;
  return (
    <>
      <Head
        label="Assumption register"
        sentence={
          n === 0
            ? 'Everything that is used was given.'
            : `${n} ${n === 1 ? 'value is' : 'values are'} used that nobody gave. Giving one takes it off this list.`
        }
      />
      <div className="drawer-body">
        <ul className="assumptions">
          {assumptions.map((assumption) => {
            const unit = units.find((u) => u.id === assumption.unit);
            return (
              <Row
                key={`${assumption.unit} ${assumption.path}`}
                assumption={assumption}
                tag={unit?.tag}
                kind={unit?.kind}
              />
            );
          })}
        </ul>
      </div>
    </>
  );
}

interface RowProps {
  readonly assumption: Assumption;
  readonly tag: string | undefined;
  readonly kind: string | undefined;
}

function Row({ assumption, tag, kind }: RowProps) {
  const { session, sketch } = useStores();
  const writable = useSketch((state) => state.writable);
  const hold = useSketch((state) =>
    state.sketch.holds?.find((h) => h.path === assumption.path && h.unit === assumption.unit),
  );
  const raise = (): void => {
    run(sketch, (s) => {
      const holds = s.holds ?? [];
      const no = holds.reduce((most, h) => Math.max(most, Number(h.no) || 0), 0) + 1;
      const { path, unit } = assumption;
      const what = `${tag ? `${tag} ` : ''}${assumptionWords(assumption, kind).what} to be confirmed`;
      return setHolds(s, [...holds, { no: String(no), what, path, ...(unit ? { unit } : {}) }]);
    });
  };
  const { what, value, where } = assumptionWords(assumption, kind);
  const change = (): void => {
    if (assumption.unit) session.select([assumption.unit]);
    else session.openDrawer({ is: assumption.path.startsWith('site.') ? 'sketch' : 'chemicals' });
    focusField(assumption.path);
  };
  return (
    <li data-assumption={assumption.no} data-path={assumption.path}>
      <span className="entry-no">{assumption.no}</span>
      <div>
        <p>
          {tag ? <b>{tag} </b> : null}
          {tag ? what : capital(what)}: <span className="assumed-value">{value}</span>
        </p>
        <p className="muted">{assumption.reason}</p>
        <button type="button" className="link" onClick={change}>
          Change in {tag ?? where}
        </button>{' '}
        {hold ? (
          <button type="button" className="link" onClick={() => session.openDrawer({ is: 'basis' })}>
            HOLD {hold.no}
            {hold.owner ? `, ${hold.owner}` : ''}
          </button>
        ) : (
          <button type="button" className="link" disabled={!writable} onClick={raise}>
            Raise a HOLD
          </button>
        )}
      </div>
    </li>
  );
}
