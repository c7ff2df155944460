import type { ChemId, StreamId } from '../../engine/ids';
import type { StreamResult } from '../../engine/network/types';
import {
  judged,
  REQUIREMENT_DIMS,
  REQUIREMENT_KINDS,
  requirementKindWord,
  requirementWords,
  resultWords,
  verdictWords,
} from '../../report/requirements';
import type { Requirement } from '../../sketch/documentTypes';
import type { Sketch } from '../../sketch/types';
import { setDesignBasis } from '../../store/commands';
import { useCompiled, useResults, useSketch, useStores } from '../../store/react';
import { run } from '../run';
import { capital } from '../words';
import { Amount, OneOf, Words } from './fields';
import { ItemList } from './ItemList';

const NONE = { chemicals: [] } as const;

/** What products must keep, each with its verdict while the sketch changes. */
export function Requirements({ disabled }: { readonly disabled: boolean }) {
  const { sketch: store } = useStores();
  const sketch = useSketch((state) => state.sketch);
  const shown = useResults((state) => state.streams);
  const basis = useCompiled((state) => state.basis);
  const site_Pa = useCompiled((state) => state.problem?.site.pressure_Pa);
  const items = sketch.designBasis?.requirements ?? [];
  const latest = new Map<StreamId, StreamResult>([...shown].map(([id, { latest }]) => [id, latest]));
  const chemicals = basis?.chemicals ?? NONE.chemicals;
  const input =
    basis && site_Pa !== undefined ? { sketch, basis, streams: latest, sitePressure_Pa: site_Pa } : undefined;
  const isProduct = ({ to }: Sketch['streams'][number]): boolean =>
    sketch.units.some((unit) => unit.id === to?.[0] && unit.kind === 'product');
  const first = sketch.streams.find(isProduct) ?? sketch.streams.find((s) => !s.to) ?? sketch.streams[0];
  return (
    <ItemList<Requirement>
      title="Product requirements"
      items={items}
      add="Add a requirement"
      disabled={disabled || !first}
      empty="None is given."
      name={(item, k) => `requirement ${k + 1}${basis ? `, ${requirementWords({ basis }, item)}` : ''}`}
      make={() => ({
        stream: first?.id ?? ('' as StreamId),
        of: 'fraction',
        ...(chemicals[0] ? { chemical: chemicals[0].id as ChemId } : {}),
      })}
      onChange={(requirements) => void run(store, (s) => setDesignBasis(s, { requirements }))}
    >
      {(item, set, k) => {
        const path = `designBasis.requirements.${k}`;
        const limit = (key: 'min' | 'max') => (value: Requirement['min']) => (s: Sketch) =>
          setDesignBasis(s, {
            requirements: (s.designBasis?.requirements ?? []).map((was, j) => {
              if (j !== k) return was;
              const { [key]: _, ...rest } = was;
              return value === undefined ? rest : { ...rest, [key]: value };
            }),
          });
        const ofChemical = item.of === 'fraction' || item.of === 'recovery';
        const verdict = input && judged(input, item);
        return (
          <>
            <OneOf
              label="Stream"
              path={`${path}.stream`}
              disabled={disabled}
              value={item.stream}
              options={[
                ...sketch.streams.map((s) => ({ value: s.id, text: `${s.number} ${s.name ?? ''}`.trim() })),
                ...(sketch.streams.some((s) => s.id === item.stream)
                  ? []
                  : [{ value: item.stream, text: 'not in the sketch any more' }]),
              ]}
              onChange={(stream) => set({ ...item, stream })}
            />
            <OneOf
              label="What"
              path={`${path}.of`}
              disabled={disabled}
              value={item.of}
              options={REQUIREMENT_KINDS.map((value) => ({
                value,
                text: capital(requirementKindWord(value)),
              }))}
              onChange={(of) => {
                // Limits of another dimension cannot be kept.
                const { min: _min, max: _max, ...rest } = item;
                set(REQUIREMENT_DIMS[of] === REQUIREMENT_DIMS[item.of] ? { ...item, of } : { ...rest, of });
              }}
            />
            {ofChemical ? (
              <OneOf
                label="Component"
                path={`${path}.chemical`}
                disabled={disabled}
                value={item.chemical ?? ''}
                options={[
                  ...chemicals.map((c) => ({ value: c.id, text: c.name })),
                  ...(chemicals.some((c) => c.id === item.chemical)
                    ? []
                    : [{ value: item.chemical ?? '', text: 'not in the sketch' }]),
                ]}
                onChange={(chemical) => set({ ...item, chemical: chemical as ChemId })}
              />
            ) : null}
            {item.of === 'fraction' ? (
              <OneOf
                label="By"
                path={`${path}.basis`}
                disabled={disabled}
                value={item.basis ?? 'mole'}
                options={[
                  { value: 'mole', text: 'mole' },
                  { value: 'mass', text: 'mass' },
                ]}
                onChange={(by) => set({ ...item, basis: by })}
              />
            ) : null}
            <Amount
              label="At least"
              path={`${path}.min`}
              disabled={disabled}
              value={item.min}
              dim={REQUIREMENT_DIMS[item.of]}
              change={limit('min')}
            />
            <Amount
              label="At most"
              path={`${path}.max`}
              disabled={disabled}
              value={item.max}
              dim={REQUIREMENT_DIMS[item.of]}
              change={limit('max')}
            />
            <Words
              label="Note"
              path={`${path}.note`}
              disabled={disabled}
              value={item.note}
              onChange={(note) => set({ ...item, note })}
            />
            {verdict && input ? (
              <p className="basis-verdict" data-verdict={verdict.is}>
                {capital(verdictWords(input, item, verdict))}
                {verdict.is === 'open' ? '' : `: ${resultWords(input, item, verdict)}`}
              </p>
            ) : null}
          </>
        );
      }}
    </ItemList>
  );
}
