import { type ColumnResults, stageRows } from '../../drawing/columnProfiles';
import { useMeasures } from '../../parts/measures';
import { displayUnit, formatDecimals, formatSignificant } from '../../quantity';

interface Props {
  readonly results: ColumnResults;
  readonly chosen: readonly string[];
  readonly nameOf: (id: string) => string;
}

const FRACTION_PLACES = 4;

/** Every place of the column with its temperature, pressure, flows and fractions. */
export function StageTable({ results, chosen, nameOf }: Props) {
  const measures = useMeasures();
  const T = displayUnit('temperature', measures);
  const P = displayUnit('pressure', measures);
  const n = displayUnit('molarFlow', measures);
  const flow = (value: number | undefined): string =>
    formatSignificant(value === undefined ? undefined : n.toDisplay(value));
  return (
    <>
      <p className="field-note">
        L and V leave the stage, draws not included; at the ends reflux, distillate vapour, boil-up and
        bottoms. x liquid, y vapour, mol/mol.
      </p>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reached by the keyboard */}
      <section className="stage-table" aria-label="Stage table" tabIndex={0}>
        <table>
          <thead>
            <tr>
              <th scope="col">Stage</th>
              <th scope="col">T, {T.label}</th>
              <th scope="col">P, {P.label}</th>
              <th scope="col">L, {n.label}</th>
              <th scope="col">V, {n.label}</th>
              {chosen.map((id) => (
                <th scope="col" key={`x ${id}`}>
                  x {nameOf(id)}
                </th>
              ))}
              {chosen.map((id) => (
                <th scope="col" key={`y ${id}`}>
                  y {nameOf(id)}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {stageRows(results).map((row) => (
              <tr key={row.at}>
                <th scope="row">{row.at}</th>
                <td>{formatSignificant(T.toDisplay(row.T_K))}</td>
                <td>{formatSignificant(P.toDisplay(row.P_Pa))}</td>
                <td>{flow(row.L_mol_s)}</td>
                <td>{flow(row.V_mol_s)}</td>
                {chosen.map((id) => (
                  <td key={`x ${id}`}>{formatDecimals(row.x(id), FRACTION_PLACES)}</td>
                ))}
                {chosen.map((id) => (
                  <td key={`y ${id}`}>{formatDecimals(row.y(id), FRACTION_PLACES)}</td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </section>
    </>
  );
}
