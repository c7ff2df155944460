import { useState } from 'react';
import type { ChemId } from '../../engine/ids';
import { formatDecimals } from '../../quantity';
import type { Sketch } from '../../sketch/types';
import { setChemicals } from '../../store/commands';
import { useSketch, useStores } from '../../store/react';
import { type NamedChemical, useChemicals, useSolvedChemicals } from '../chemicalNames';
import { run } from '../run';

const idOf = (chemical: Sketch['chemicals'][number]): string =>
  typeof chemical === 'string' ? chemical : chemical.id;

const moved = <T,>(list: readonly T[], from: number, to: number): readonly T[] => {
  const rest = list.filter((_, k) => k !== from);
  const thing = list[from];
  return thing === undefined ? list : [...rest.slice(0, to), thing, ...rest.slice(to)];
};

/** The sketch's chemicals in their order, which is the order everywhere. */
export function ChemicalList() {
  const { sketch } = useStores();
  const writable = useSketch((state) => state.writable);
  const chemicals = useChemicals();
  const brought = useSolvedChemicals().filter(({ id }) => !chemicals.some((c) => c.id === id));
  const [refused, setRefused] = useState<{ readonly id: ChemId; readonly why: string } | null>(null);

  const remove = (id: ChemId, cleanUp: boolean): void => {
    const why = run(sketch, (s) =>
      setChemicals(
        s,
        s.chemicals.filter((c) => idOf(c) !== id),
        { cleanUp },
      ),
    );
    setRefused(why === undefined ? null : { id, why });
  };
  const shift = (from: number, by: number): void => {
    run(sketch, (s) => ({
      ...setChemicals(s, moved(s.chemicals, from, from + by)),
      label: 'order of the chemicals',
    }));
  };
  return (
    <>
      <ol className="chemicals">
        {chemicals.map((chemical, k) => (
          <li key={chemical.id} data-chemical={chemical.id} tabIndex={-1}>
            <Row chemical={chemical} />
            <span className="tools">
              <button
                type="button"
                className="link quiet"
                aria-label={`Move ${chemical.name} up`}
                disabled={!writable || k === 0}
                onClick={() => shift(k, -1)}
              >
                Up
              </button>
              <button
                type="button"
                className="link quiet"
                aria-label={`Move ${chemical.name} down`}
                disabled={!writable || k === chemicals.length - 1}
                onClick={() => shift(k, 1)}
              >
                Down
              </button>
              <button
                type="button"
                className="link quiet"
                aria-label={`Remove ${chemical.name}`}
                disabled={!writable}
                onClick={() => remove(chemical.id, false)}
              >
                Remove
              </button>
            </span>
            {refused?.id === chemical.id ? (
              <div className="refusal" role="alert">
                <p>{refused.why}</p>
                <p className="offers">
                  <button type="button" className="link" onClick={() => remove(chemical.id, true)}>
                    Remove it there too
                  </button>
                  <button type="button" className="link" onClick={() => setRefused(null)}>
                    Keep it
                  </button>
                </p>
              </div>
            ) : null}
          </li>
        ))}
      </ol>
      {brought.length > 0 ? (
        <p className="muted small">
          Brought in by units, as an assumption: {brought.map(({ name }) => name).join(', ')}.
        </p>
      ) : null}
    </>
  );
}

function Row({ chemical }: { readonly chemical: NamedChemical }) {
  const { name, formula, MW_g_mol, own } = chemical;
  return (
    <>
      <span className="chemical-name">
        {name}
        {own ? <span className="muted"> own data</span> : null}
      </span>
      <span className="muted">{formula ?? ''}</span>
      <span className="muted mw">{MW_g_mol === undefined ? '' : formatDecimals(MW_g_mol, 2)}</span>
    </>
  );
}
