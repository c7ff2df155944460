import type { PhaseResult } from '../../engine/network/types';
import { Disclosure } from '../../parts/Disclosure';
import { LimitMark } from '../../parts/LimitMark';
import { useMeasures } from '../../parts/measures';
import { ABSENT, type Dimension, displayUnit, formatSignificant, show } from '../../quantity';
import { useSolvedChemicals } from '../chemicalNames';
import { capital, mixtureRuleWord, phaseWord } from '../words';
import { amounts, amountText } from './amounts';
import type { SolvedStream } from './sentence';

interface Row {
  readonly label: string;
  readonly dim: Dimension;
  readonly unit?: string;
  readonly of: (phase: PhaseResult) => number | undefined;
}

const ROWS: readonly Row[] = [
  { label: 'Molar mass', dim: 'molarMass', of: (p) => p.MW_g_mol / 1000 },
  { label: 'Density', dim: 'density', of: (p) => p.density_kg_m3 },
  { label: 'Z', dim: 'number', of: (p) => p.Z },
  { label: 'Cp, molar', dim: 'molarEntropy', of: (p) => p.cp_J_molK },
  { label: 'Cp, by mass', dim: 'heatCapacity', of: (p) => (p.cp_J_molK / p.MW_g_mol) * 1000 },
  { label: 'Cp/Cv', dim: 'number', of: (p) => p.cpOverCv },
  { label: 'Viscosity', dim: 'viscosity', of: (p) => p.viscosity_Pa_s },
];

interface Props {
  readonly stream: SolvedStream;
  readonly outOfDate: boolean;
}

/** Each phase in a column: share, density and what else is known of it. */
export function Phases({ stream, outOfDate }: Props) {
  const measures = useMeasures();
  const { phases } = stream;
  if (phases.length === 0) return null;
  const rules = [
    ...new Set(phases.flatMap((p) => (p.viscosityRule ? [mixtureRuleWord(p.viscosityRule)] : []))),
  ];
  return (
    <section className="section">
      <div className="section-head">
        <h3>Phases</h3>
      </div>
      <table className={outOfDate ? 'phases older' : 'phases'}>
        <thead>
          <tr>
            <td />
            {phases.map((phase) => (
              <th scope="col" key={phase.kind}>
                {capital(phaseWord(phase.kind))}
              </th>
            ))}
            <td />
          </tr>
        </thead>
        <tbody>
          <tr>
            <th scope="row">Share</th>
            {phases.map((phase) => (
              <td key={phase.kind}>{formatSignificant(phase.fraction * 100, 4)}</td>
            ))}
            <td className="uom">mol %</td>
          </tr>
          {ROWS.filter(({ of }) => phases.some((phase) => of(phase) !== undefined)).map(
            ({ label, dim, of }) => (
              <tr key={label}>
                <th scope="row">{label}</th>
                {phases.map((phase) => (
                  <td key={phase.kind}>
                    {of(phase) === undefined ? ABSENT : show(of(phase), dim, measures).number}
                  </td>
                ))}
                <td className="uom">{displayUnit(dim, measures).label}</td>
              </tr>
            ),
          )}
        </tbody>
      </table>
      {rules.length > 0 ? <p className="muted small">Viscosity by {rules.join('; ')}.</p> : null}
      {stream.hiddenLiquid ? (
        <p className="said">
          <LimitMark weight="caution" />
          <span>
            {stream.liquidsTogether
              ? 'This liquid parts into two. Enthalpy and entropy are those of both together, the composition is that of the whole.'
              : 'A second liquid would form here. The numbers are for one liquid.'}
          </span>
        </p>
      ) : null}
      {phases.length > 1 ? <PhaseCompositions stream={stream} /> : null}
    </section>
  );
}

function PhaseCompositions({ stream }: { readonly stream: SolvedStream }) {
  const chemicals = useSolvedChemicals();
  const columns = stream.phases.map((phase) => amounts(phase.x, [], 1, 'mole', 'SI'));
  const [y, x] = stream.phases[0]?.kind === 'vapour' ? columns : [];
  const kValue = (k: number): string => {
    const [a, b] = [y?.[k], x?.[k]];
    return a && b ? formatSignificant(a / b, 4) : ABSENT;
  };
  return (
    <Disclosure title="Composition of each phase" aside="mol %">
      <table className="phases">
        <thead>
          <tr>
            <td />
            {stream.phases.map((phase) => (
              <th scope="col" key={phase.kind}>
                {capital(phaseWord(phase.kind))}
              </th>
            ))}
            {y && x ? <th scope="col">K-value</th> : null}
          </tr>
        </thead>
        <tbody>
          {chemicals.map(({ id, name }, k) => (
            <tr key={id}>
              <th scope="row">{name}</th>
              {columns.map((column, c) => (
                <td key={stream.phases[c]?.kind}>{amountText(column[k], 'mole')}</td>
              ))}
              {y && x ? <td>{kValue(k)}</td> : null}
            </tr>
          ))}
        </tbody>
      </table>
    </Disclosure>
  );
}
