import { memo, useMemo } from 'react';
import { useShallow } from 'zustand/react/shallow';
import type { UnitId } from '../../engine/ids';
import type { Finding } from '../../engine/outcome';
import { useMeasures } from '../../parts/measures';
import { TextField } from '../../parts/TextField';
import { setMaterial, setTag, setUnitName } from '../../store/commands';
import type { CompiledState } from '../../store/compiledStore';
import { useKind } from '../../store/kinds';
import { useCompiled, useResults, useSketch, useStores, useUnitResult } from '../../store/react';
import type { ResultsState } from '../../store/resultsStore';
import { Head } from '../Head';
import { OWN_PARTS } from '../own';
import { run } from '../run';
import { useSay } from '../useSay';
import { useSteady } from '../useSteady';
import { capital, kindWord } from '../words';
import { findingsOf, formSource } from './formSource';
import { Known } from './Known';
import { NextSteps, Reasons } from './Reasons';
import { Results } from './Results';
import { SettingEditor } from './SettingEditor';
import { FieldFindingList } from './SettingRow';
import { Settings } from './Settings';
import { stateSentence } from './stateSentence';
import { FormProvider } from './useForm';

/**
 * One unit: its settings, what it knows, what it makes of them. Made from its kind's catalogue, save what a kind draws
 * itself. The drawer as a whole is drawn once; fields and figures follow what they show.
 */
export function UnitDrawer({ id }: { readonly id: UnitId }) {
  const name = useSketch((state) => state.sketch.units.find((unit) => unit.id === id)?.kind);
  const kind = useKind(name ?? '');
  const stores = useStores();
  const source = useMemo(
    () => (kind ? formSource(stores, id, kind, SettingEditor) : undefined),
    [stores, id, kind],
  );
  if (name === undefined) return null;
  if (!kind || !source) return <UnitHead id={id} isKnown={false} />;
  const parts = Object.hasOwn(OWN_PARTS, kind.kind) ? OWN_PARTS[kind.kind] : undefined;
  const SettingsPart = parts?.Settings ?? Settings;
  const ResultsPart = parts?.Results ?? Results;
  return (
    <FormProvider value={source}>
      <UnitHead id={id} isKnown />
      <div className="drawer-body">
        <SettingsPart key={id} />
        <WhyNot id={id} />
        <Noticed id={id} />
        <Known />
        <ResultsPart />
        {kind.tag.drawn ? <Material id={id} /> : null}
      </div>
    </FormProvider>
  );
}

const atUnit = (finding: Finding): boolean => finding.at.path === undefined;

function useFindings(id: UnitId): readonly Finding[] {
  const here = (...lists: (readonly Finding[])[]) => findingsOf(id, atUnit, lists);
  const known = useCompiled(useSteady(({ gaps, notes }: CompiledState) => here(gaps, notes)));
  const found = useResults(useSteady(({ findings }: ResultsState) => here(findings)));
  return useMemo(() => findingsOf(id, atUnit, [known, found]), [id, known, found]);
}

/** What is said of the unit as a whole, and not of one of its settings. */
function Noticed({ id }: { readonly id: UnitId }) {
  const latest = useUnitResult(id)?.latest;
  // Why there is no solution stands above already.
  const said = (latest?.state === 'no-solution' && latest.reasons) || [];
  const findings = useFindings(id).filter(({ code }) => said.every((reason) => reason.code !== code));
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

/** What the head says of a unit apart from how it stands. */
const useNames = (id: UnitId) =>
  useSketch(
    useShallow(({ sketch }) => {
      const unit = sketch.units.find((u) => u.id === id);
      return {
        tag: unit?.tag ?? '',
        name: unit?.name ?? '',
        word: unit ? kindWord(unit.kind, unit.settings.service) : '',
      };
    }),
  );

/** Tag, name and how the unit stands. */
function UnitHead({ id, isKnown }: { readonly id: UnitId; readonly isKnown: boolean }) {
  const say = useSay();
  const measures = useMeasures();
  const { tag, word } = useNames(id);
  const entry = useUnitResult(id);
  const gaps = useCompiled(
    useSteady((state: CompiledState) => state.gaps.filter((gap) => gap.at.unit === id)),
  );
  const own = useResults((state) => state.closure?.byUnit[id]);
  return (
    <Head
      label={`${capital(word)} ${tag}`}
      title={<Names id={id} />}
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
  const isAsked = useCompiled(({ gaps }) => gaps.some((gap) => gap.at.unit === id));
  const reasons = latest?.reasons ?? [];
  if (latest?.state === 'no-solution') return <Reasons reasons={reasons} />;
  // What the sketch itself lacks is asked for at its field, or among the notes.
  return latest?.state === 'needs-value' && !isAsked ? <NextSteps reasons={reasons} /> : null;
}

const Names = memo(function Names({ id }: { readonly id: UnitId }) {
  const { sketch } = useStores();
  const writable = useSketch((state) => state.writable);
  const { tag, name, word } = useNames(id);
  return (
    <span className="names">
      <TextField
        label="Tag"
        path="tag"
        className="tag"
        value={tag}
        disabled={!writable}
        onCommit={(text) => run(sketch, (s) => setTag(s, id, text))}
      />
      <TextField
        label="Name"
        path="name"
        value={name}
        placeholder={capital(word)}
        disabled={!writable}
        onCommit={(text) => run(sketch, (s) => setUnitName(s, id, text))}
      />
    </span>
  );
});

function Material({ id }: { readonly id: UnitId }) {
  const { sketch } = useStores();
  const disabled = useSketch((state) => !state.writable);
  const material = useSketch((state) => state.sketch.units.find((unit) => unit.id === id)?.material);
  return (
    <section className="section">
      <div className="setting">
        <div className="setting-label">Material</div>
        <div className="setting-control">
          <TextField
            label="Material of construction"
            path="material"
            className="framed"
            value={material ?? ''}
            placeholder="not said"
            disabled={disabled}
            onCommit={(text) => run(sketch, (s) => setMaterial(s, id, text))}
          />
        </div>
      </div>
    </section>
  );
}
