import { useMemo } from 'react';
import type { UnitId } from '../../engine/ids';
import type { Finding } from '../../engine/outcome';
import { useMeasures, useSite } from '../../parts/measures';
import { TextField } from '../../parts/TextField';
import type { SketchUnit } from '../../sketch/types';
import { setMaterial, setTag, setUnitName } from '../../store/commands';
import type { CompiledState } from '../../store/compiledStore';
import { useKind } from '../../store/kinds';
import { useCompiled, useResults, useSketch, useStores, useUnit, useUnitResult } from '../../store/react';
import type { ResultsState } from '../../store/resultsStore';
import { Head } from '../Head';
import { OWN_PARTS } from '../own';
import { run } from '../run';
import { useSay } from '../useSay';
import { useSteady } from '../useSteady';
import { capital, kindWord } from '../words';
import { FormProvider, makeForm } from './form';
import { Known } from './Known';
import { NextSteps, Reasons } from './Reasons';
import { Results } from './Results';
import { SettingEditor } from './SettingEditor';
import { FieldFindingList } from './SettingRow';
import { Settings } from './Settings';
import { stateSentence } from './stateSentence';

/**
 * One unit: its settings, what it knows, what it makes of them. Made from its kind's catalogue, save what a kind draws
 * itself. New results are drawn by the parts that show them; the settings stand as they are.
 */
export function UnitDrawer({ id }: { readonly id: UnitId }) {
  const unit = useUnit(id);
  const kind = useKind(unit?.kind ?? '');
  const { sketch } = useStores();
  const site = useSite();
  const disabled = useSketch((state) => !state.writable);
  const assumptions = useCompiled(
    useSteady((state: CompiledState) => state.assumptions.filter((a) => a.unit === id)),
  );
  const findings = useFindings(id, atField);
  const form = useMemo(
    () =>
      unit && kind
        ? makeForm({ unit, kind, site, disabled, findings, assumptions, Editor: SettingEditor }, sketch)
        : undefined,
    [unit, kind, site, disabled, findings, assumptions, sketch],
  );
  if (!unit) return null;
  if (!kind || !form) return <UnitHead unit={unit} isKnown={false} />;
  const parts = Object.hasOwn(OWN_PARTS, kind.kind) ? OWN_PARTS[kind.kind] : undefined;
  const SettingsPart = parts?.Settings ?? Settings;
  const ResultsPart = parts?.Results ?? Results;
  return (
    <FormProvider value={form}>
      <UnitHead unit={unit} isKnown />
      <div className="drawer-body">
        <SettingsPart key={unit.id} />
        <WhyNot id={id} />
        <Noticed id={id} />
        <Known />
        <ResultsPart />
        {kind.tag.drawn ? <Material unit={unit} disabled={disabled} /> : null}
      </div>
    </FormProvider>
  );
}

const atField = (finding: Finding): boolean => finding.at.path !== undefined;
const atUnit = (finding: Finding): boolean => finding.at.path === undefined;

/** What there is to say of one unit: what it lacks, what was noticed, what it runs into; each once. */
function useFindings(id: UnitId, which: (finding: Finding) => boolean): readonly Finding[] {
  const here = (finding: Finding): boolean => finding.at.unit === id && which(finding);
  const known = useCompiled(
    useSteady(({ gaps, notes }: CompiledState) => [...gaps.filter(here), ...notes.filter(here)]),
  );
  const found = useResults(useSteady(({ findings }: ResultsState) => findings.filter(here)));
  return useMemo(() => {
    const seen = new Set<string>();
    return [...known, ...found].filter((finding) => {
      const key = `${finding.code} ${finding.at.path} ${finding.at.port}`;
      if (seen.has(key)) return false;
      seen.add(key);
      return true;
    });
  }, [known, found]);
}

/** What is said of the unit as a whole, and not of one of its settings. */
function Noticed({ id }: { readonly id: UnitId }) {
  const latest = useUnitResult(id)?.latest;
  // Why there is no solution stands above already.
  const said = (latest?.state === 'no-solution' && latest.reasons) || [];
  const findings = useFindings(id, atUnit).filter(({ code }) => said.every((reason) => reason.code !== code));
  if (findings.length === 0) return null;
  return (
    <section className="section">
      <div className="section-head">
        <h3>Limits and notes</h3>
      </div>
      <FieldFindingList findings={findings} />
    </section>
  );
}

/** Tag, name and how the unit stands. */
function UnitHead({ unit, isKnown }: { readonly unit: SketchUnit; readonly isKnown: boolean }) {
  const say = useSay();
  const measures = useMeasures();
  const entry = useUnitResult(unit.id);
  const gaps = useCompiled(
    useSteady((state: CompiledState) => state.gaps.filter((gap) => gap.at.unit === unit.id)),
  );
  const own = useResults((state) => state.closure?.byUnit[unit.id]);
  return (
    <Head
      label={`${capital(kindWord(unit.kind, unit.settings.service))} ${unit.tag}`}
      title={<Names unit={unit} />}
      sentence={
        isKnown
          ? stateSentence(entry, gaps, say, measures, own)
          : 'This kind of unit is not available in this version; it is kept as it is.'
      }
    />
  );
}

function WhyNot({ id }: { readonly id: UnitId }) {
  const latest = useUnitResult(id)?.latest;
  const reasons = latest?.reasons ?? [];
  if (latest?.state === 'no-solution') return <Reasons reasons={reasons} />;
  return <NextSteps reasons={latest?.state === 'needs-value' ? reasons : []} />;
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
