import { useCompiled } from '../../store/react';
import { useChemicals } from '../chemicalNames';
import { Head } from '../Head';
import { FieldFindingList } from '../unit/SettingRow';
import { AddChemical } from './AddChemical';
import { ChemicalList } from './ChemicalList';
import { ModelChoices } from './ModelChoices';
import { Pairs } from './Pairs';

/** The sketch's chemicals and the thermodynamic model that every stream is computed with. */
export function ChemicalsDrawer() {
  const chemicals = useChemicals();
  const gaps = useCompiled((state) => state.gaps);
  const about = gaps.filter(({ at }) => at.unit === undefined && !/^(model|site)\./.test(at.path ?? ''));
  return (
    <>
      <Head
        label="Chemicals and model"
        sentence={`${chemicals.length} ${chemicals.length === 1 ? 'chemical' : 'chemicals'}, in the order of every table. One model carries every stream.`}
      />
      <div className="drawer-body">
        <section className="section">
          <div className="section-head">
            <h3>Chemicals</h3>
            <span className="muted">g/mol</span>
          </div>
          <ChemicalList />
          <AddChemical />
          <FieldFindingList findings={about} />
        </section>
        <section className="section">
          <div className="section-head">
            <h3>Thermodynamic model</h3>
          </div>
          <ModelChoices />
          <Pairs />
        </section>
      </div>
    </>
  );
}
