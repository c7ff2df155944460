import { useLayoutEffect, useMemo, useRef, useState } from 'react';
import {
  type ColumnResults,
  columnProfiles,
  keyChemicals,
  presentChemicals,
} from '../../drawing/columnProfiles';
import { DASHES, profilePicture } from '../../drawing/profiles';
import { Disclosure } from '../../parts/Disclosure';
import { useMeasures } from '../../parts/measures';
import { useSolvedChemicals } from '../chemicalNames';
import { Picture } from './Picture';
import { ProfileReader } from './ProfileReader';
import { profileSentence } from './profileSentence';
import { StageTable } from './StageTable';

interface Props {
  readonly results: ColumnResults;
  readonly outOfDate: boolean;
}

const [USUAL_WIDTH, HEIGHT] = [332, 236];

/** Width of an element, followed while it changes. */
function useWidth() {
  const element = useRef<HTMLDivElement>(null);
  const [width, setWidth] = useState(USUAL_WIDTH);
  useLayoutEffect(() => {
    if (!element.current || typeof ResizeObserver === 'undefined') return undefined;
    const observer = new ResizeObserver(([entry]) => {
      const px = Math.floor(entry?.contentRect.width ?? 0);
      if (px > 0) setWidth(px);
    });
    observer.observe(element.current);
    return () => observer.disconnect();
  }, []);
  return { element, width };
}

/** Temperature, flows and liquid fractions over the stages: three plots of one axis, and the same as a table. */
export function Profiles({ results, outOfDate }: Props) {
  const measures = useMeasures();
  const chemicals = useSolvedChemicals();
  const { element, width } = useWidth();
  const [picked, setPicked] = useState<readonly string[] | null>(null);
  const present = useMemo(() => presentChemicals(results), [results]);
  const chosen = useMemo(() => {
    const kept = picked?.filter((id) => present.includes(id));
    return kept ?? keyChemicals(results);
  }, [picked, present, results]);
  const nameOf = useMemo(() => {
    const names = new Map<string, string>(chemicals.map(({ id, name }) => [id, name]));
    return (id: string) => names.get(id) ?? id;
  }, [chemicals]);
  const data = useMemo(
    () => columnProfiles(results, measures, chosen, nameOf),
    [results, measures, chosen, nameOf],
  );
  const picture = useMemo(() => profilePicture(data, { width, height: HEIGHT }), [data, width]);
  const says = useMemo(() => profileSentence(data), [data]);
  return (
    <section className="section profiles" data-profiles="">
      <div className="section-head">
        <h3>Stage profiles</h3>
        <span className="muted">real trays = stages / overall efficiency (not set)</span>
      </div>
      <div ref={element}>
        <ProfileReader data={data} picture={picture}>
          <Picture picture={picture} label={says} stale={outOfDate} />
        </ProfileReader>
      </div>
      <Disclosure title="Components shown" aside={chosen.map(nameOf).join(', ')}>
        <div className="checks">
          {present.map((id) => {
            const isOn = chosen.includes(id);
            return (
              <label key={id}>
                <input
                  type="checkbox"
                  checked={isOn}
                  disabled={!isOn && chosen.length >= DASHES.length}
                  onChange={() =>
                    setPicked(present.filter((other) => (other === id ? !isOn : chosen.includes(other))))
                  }
                />
                {nameOf(id)}
              </label>
            );
          })}
          {picked === null ? null : (
            <button type="button" className="link" onClick={() => setPicked(null)}>
              Back to those that change most
            </button>
          )}
        </div>
      </Disclosure>
      <Disclosure title="Stage table">
        <StageTable results={results} chosen={chosen} nameOf={nameOf} />
      </Disclosure>
    </section>
  );
}
