import { FigureRow } from '../../parts/Figure';
import { useMeasures, withReference } from '../../parts/measures';
import { ABSENT, type Dimension, type Measures, REFERENCE_GAS, show } from '../../quantity';
import type { SolvedStream } from './sentence';

interface Props {
  readonly stream: SolvedStream;
  readonly outOfDate: boolean;
}

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
  const gas = { ...measures, units: { ...measures.units, molarFlow: REFERENCE_GAS[measures.set].unit } };
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
        {row('All as ideal gas', stream.n_mol_s, 'molarFlow', {
          as: gas,
          title: `The whole stream, liquid too, as ideal gas at ${REFERENCE_GAS[measures.set].state}`,
        })}
        {row('As liquid, 15 °C', stream.standardLiquid_m3_s, 'volumeFlow', {
          title:
            stream.standardLiquid_m3_s === undefined
              ? '1 ppm (mol) or more is above its critical temperature at 15 °C and has no liquid there'
              : 'Ideal mixing of the pure liquids at 15 °C',
        })}
        {row('Molar mass', stream.MW_g_mol / 1000, 'molarMass')}
      </dl>
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
