import { useState } from 'react';
import { Bars } from '../../parts/Bars';
import { NumberCell } from '../../parts/Figure';
import { useMeasures } from '../../parts/measures';
import { Segmented } from '../../parts/Segmented';
import { useSolvedChemicals } from '../chemicalNames';
import { amounts, amountText, BASES, type Basis, basisLabel, byMass, isShare } from './amounts';
import type { SolvedStream } from './sentence';

/** The other way to say the same: beside shares their flow, beside flows their share. */
const beside = (basis: Basis): Basis =>
  isShare(basis) ? (byMass(basis) ? 'masses' : 'moles') : byMass(basis) ? 'mass' : 'mole';

interface Props {
  readonly stream: SolvedStream;
  readonly outOfDate: boolean;
}

/** Components in the sketch's order, with bars from a common zero line; two phases have a bar each. */
export function Composition({ stream, outOfDate }: Props) {
  const { set } = useMeasures();
  const chemicals = useSolvedChemicals();
  const [basis, setBasis] = useState<Basis>('mole');
  const MW = chemicals.map((chemical) => chemical.MW_g_mol);
  const other = beside(basis);
  const whole = amounts(stream.z, MW, stream.n_mol_s, basis, set);
  const second = amounts(stream.z, MW, stream.n_mol_s, other, set);
  const phase = (isVapour: boolean) => {
    const found = stream.phases.find((p) => p.fraction > 0 && (p.kind === 'vapour') === isVapour);
    return found && amounts(found.x, MW, found.fraction * stream.n_mol_s, basis, set);
  };
  const [vapour, liquid] = [phase(true), phase(false)];
  const isTwo = vapour !== undefined && liquid !== undefined;
  const lengths = isTwo ? [...vapour, ...liquid] : whole;
  const full = lengths.reduce<number>((most, x) => Math.max(most, x ?? 0), 0);
  return (
    <section className="section">
      <div className="section-head">
        <h3>Composition</h3>
        <Segmented
          label="Composition: basis"
          value={basis}
          onChange={setBasis}
          options={BASES.map((value) => ({ value, text: basisLabel(value, set) }))}
        />
      </div>
      <table className={outOfDate ? 'components older' : 'components'}>
        <thead>
          <tr>
            <th scope="col">Component</th>
            <td />
            <th scope="col">{basisLabel(basis, set)}</th>
            <th scope="col">{basisLabel(other, set)}</th>
          </tr>
        </thead>
        <tbody>
          {chemicals.map(({ id, name, assumed }, k) => (
            <tr key={id} data-component={id}>
              <th scope="row" title={assumed ? 'Brought in by a unit, not listed by the sketch' : undefined}>
                {name}
              </th>
              <td>
                {isTwo ? (
                  <Bars filled={liquid[k]} outlined={vapour[k]} full={full} />
                ) : (
                  <Bars filled={whole[k]} full={full} />
                )}
              </td>
              <td>
                <NumberCell text={amountText(whole[k], basis)} />
              </td>
              <td>
                <NumberCell text={amountText(second[k], other)} />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {isTwo ? (
        <p className="key">
          <i className="outlined" /> vapour <i className="filled" /> liquid, each of its own phase
        </p>
      ) : null}
    </section>
  );
}
