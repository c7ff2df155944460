import { useMemo } from 'react';
import type { UnitId } from '../../engine/ids';
import { useMeasures, useSite } from '../../parts/measures';
import { TextField } from '../../parts/TextField';
import type { SketchUnit } from '../../sketch/types';
import { setMaterial, setTag, setUnitName } from '../../store/commands';
import { useKind } from '../../store/kinds';
import { useCompiled, useResults, useSketch, useStores, useUnit, useUnitResult } from '../../store/react';
import { Head } from '../Head';
import { OWN_PARTS } from '../own';
import { run } from '../run';
import { useSay } from '../useSay';
import { capital, kindWord } from '../words';
import { FormProvider, makeForm } from './form';
import { Known } from './Known';
import { Reasons } from './Reasons';
import { Results } from './Results';
import { SettingEditor } from './SettingEditor';
import { FieldFindingList } from './SettingRow';
import { Settings } from './Settings';
import { stateSentence } from './stateSentence';

/** One unit: its settings, what it knows, what it makes of them. Made from its kind's catalogue, save what a kind draws itself. */
export function UnitDrawer({ id }: { readonly id: UnitId }) {
  const unit = useUnit(id);
  const kind = useKind(unit?.kind ?? '');
  const stores = useStores();
  const site = useSite();
  const writable = useSketch((state) => state.writable);
  const gaps = useCompiled((state) => state.gaps);
  const notes = useCompiled((state) => state.notes);
  const assumptions = useCompiled((state) => state.assumptions);
  const found = useResults((state) => state.findings);
  const entry = useUnitResult(id);
  const say = useSay();
  const measures = useMeasures();
  const own = useResults((state) => state.closure?.byUnit[id]);
  const here = useMemo(() => gaps.filter((gap) => gap.at.unit === id), [gaps, id]);
  const reasons = entry?.latest.state === 'no-solution' ? (entry.latest.reasons ?? []) : [];
  const findings = useMemo(() => {
    const seen = new Set<string>();
    const all = [...here, ...notes, ...found];
    return all.filter((finding) => {
      const key = `${finding.code} ${finding.at.path} ${finding.at.port}`;
      if (finding.at.unit !== id || seen.has(key)) return false;
      seen.add(key);
      return true;
    });
  }, [here, notes, found, id]);

  if (!unit) return null;
  const head = (
    <Head
      label={`${capital(kindWord(unit.kind, unit.settings.service))} ${unit.tag}`}
      title={<Names unit={unit} />}
      sentence={
        kind
          ? stateSentence(entry, here, say, measures, own)
          : 'This kind of unit is not available in this version; it is kept as it is.'
      }
    />
  );
  if (!kind) return head;
  const form = makeForm(
    { unit, kind, site, disabled: !writable, findings, assumptions, Editor: SettingEditor },
    stores.sketch,
  );
  const parts = Object.hasOwn(OWN_PARTS, kind.kind) ? OWN_PARTS[kind.kind] : undefined;
  const SettingsPart = parts?.Settings ?? Settings;
  const ResultsPart = parts?.Results ?? Results;
  const general = findings.filter((f) => f.at.path === undefined);
  return (
    <FormProvider value={form}>
      {head}
      <div className="drawer-body">
        <SettingsPart key={unit.id} />
        <Reasons reasons={reasons} />
        {general.length > 0 ? (
          <section className="section">
            <div className="section-head">
              <h3>Limits and notes</h3>
            </div>
            <FieldFindingList findings={general} />
          </section>
        ) : null}
        <Known />
        <ResultsPart />
        {kind.tag.drawn ? <Material unit={unit} disabled={!writable} /> : null}
      </div>
    </FormProvider>
  );
}

function Names({ unit }: { readonly unit: SketchUnit }) {
  const { sketch } = useStores();
  const writable = useSketch((state) => state.writable);
  return (
    <span className="names">
      <TextField
        label="Tag"
        path="tag"
        className="tag"
        value={unit.tag}
        disabled={!writable}
        onCommit={(text) => run(sketch, (s) => setTag(s, unit.id, text))}
      />
      <TextField
        label="Name"
        path="name"
        value={unit.name ?? ''}
        placeholder={capital(kindWord(unit.kind, unit.settings.service))}
        disabled={!writable}
        onCommit={(text) => run(sketch, (s) => setUnitName(s, unit.id, text))}
      />
    </span>
  );
}

function Material({ unit, disabled }: { readonly unit: SketchUnit; readonly disabled: boolean }) {
  const { sketch } = useStores();
  return (
    <section className="section">
      <div className="setting">
        <div className="setting-label">Material</div>
        <div className="setting-control">
          <TextField
            label="Material of construction"
            path="material"
            className="framed"
            value={unit.material ?? ''}
            placeholder="not said"
            disabled={disabled}
            onCommit={(text) => run(sketch, (s) => setMaterial(s, unit.id, text))}
          />
        </div>
      </div>
    </section>
  );
}
