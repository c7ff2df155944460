import { FigureRow } from '../../parts/Figure';
import { useMeasures, withReference } from '../../parts/measures';
import { ABSENT, type Dimension, type Measures, show } from '../../quantity';
import { noStandardLiquid, STANDARD_LIQUID, vapour_mol_s, vapourAsGas } from '../../report/volumeFlows';
import { useSolvedChemicals } from '../chemicalNames';
import type { SolvedStream } from './sentence';

interface Props {
  readonly stream: SolvedStream;
  readonly outOfDate: boolean;
}

/** Keeps each number with its unit where a label takes two lines. */
const unbroken = (label: string): string => label.replace(/(\d) (?=\S)/g, '$1\u00a0');

/** Temperature, pressure, vapour fraction and every way to say the flow. */
export function Conditions({ stream, outOfDate }: Props) {
  const measures = useMeasures();
  const row = (
    label: string,
    si: number | undefined,
    dim: Dimension,
    { as = measures, unit, title }: { as?: Measures; unit?: string; title?: string } = {},
  ) => {
    const shown = show(si, dim, as);
    const text = si === undefined ? ABSENT : shown.number;
    return (
      <FigureRow label={label} title={title} text={text} unit={unit ?? shown.unit} outOfDate={outOfDate} />
    );
  };
  const chemicals = useSolvedChemicals();
  const gas = vapourAsGas(measures);
  const whyNone = noStandardLiquid(stream, (k) => chemicals[k]?.name ?? 'a chemical');
  return (
    <section className="section">
      <dl className="figures">
        {row('Temperature', stream.T_K, 'temperature')}
        {row('Pressure', stream.P_Pa, 'pressure', { as: withReference(measures, 'absolute') })}
        {row('Pressure', stream.P_Pa, 'pressure', { as: withReference(measures, 'gauge') })}
        {row('Vapour fraction', stream.vapourFraction, 'fraction', { unit: 'mol/mol' })}
        {row('Vapour fraction', stream.vapourMassFraction, 'fraction', { unit: 'kg/kg' })}
        {row('Molar flow', stream.n_mol_s, 'molarFlow')}
        {row('Mass flow', stream.m_kg_s, 'massFlow')}
        {row('Volume flow, actual', stream.volume_m3_s, 'volumeFlow')}
        {row(unbroken(gas.label), vapour_mol_s(stream), 'molarFlow', {
          as: gas.measures,
          title: 'The vapour alone, or the dense phase; no liquid',
        })}
        {row(STANDARD_LIQUID, stream.standardLiquid_m3_s, 'volumeFlow', {
          title: 'Ideal mixing of the pure liquids',
        })}
        {row('Molar mass', stream.MW_g_mol / 1000, 'molarMass')}
      </dl>
      {whyNone === undefined ? null : <p className="muted small">No standard liquid: {whyNone}.</p>}
    </section>
  );
}

/** Enthalpy on both data, entropy where it is known. */
export function Energies({ stream, outOfDate }: Props) {
  const measures = useMeasures();
  const H = show(stream.H_W, 'power', measures);
  const ideal = show(stream.HfromIdeal_W, 'power', measures);
  const h = show(stream.h_J_mol, 'molarEnergy', measures);
  const s = show(stream.s_J_molK, 'molarEntropy', measures);
  return (
    <section className="section">
      <div className="section-head">
        <h3>Energy</h3>
        <span className="muted">data at 298.15 K</span>
      </div>
      <dl className="figures">
        <FigureRow label="Enthalpy flow, from elements" text={H.number} unit={H.unit} outOfDate={outOfDate} />
        <FigureRow
          label="Enthalpy flow, from ideal gas"
          text={ideal.number}
          unit={ideal.unit}
          outOfDate={outOfDate}
        />
        <FigureRow label="Enthalpy, from elements" text={h.number} unit={h.unit} outOfDate={outOfDate} />
        <FigureRow
          label="Entropy"
          text={s.number}
          unit={s.unit}
          title={stream.s_J_molK === undefined ? 'A chemical here has no standard entropy' : undefined}
          outOfDate={outOfDate}
        />
      </dl>
    </section>
  );
}
