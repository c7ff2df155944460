import type { Evidence, Finding } from '../../engine/outcome';
import { useMeasures } from '../../parts/measures';
import { show } from '../../quantity';
import { SENTENCES } from '../../wording/codes';
import { useSay } from '../useSay';
import { capital, evidenceWord } from '../words';

/** Why there is no solution: each reason in a sentence, what was seen, and what to try. */
export function Reasons({ reasons }: { readonly reasons: readonly Finding[] }) {
  const say = useSay();
  if (reasons.length === 0) return null;
  return (
    <section className="section" aria-label="Why there is no solution">
      <div className="section-head">
        <h3>Why</h3>
      </div>
      {reasons.map((reason, k) => {
        const { sentence, next } = say(reason);
        return (
          // biome-ignore lint/suspicious/noArrayIndexKey: the order is the reasons' own
          <div className="reason" key={k}>
            <p>{sentence}</p>
            <EvidenceList evidence={unsaid(reason)} />
            {next ? <p className="next">{next}</p> : null}
          </div>
        );
      })}
    </section>
  );
}

/** What to do about values that are missing and no field of the unit asks for; what is missing stands in the head. */
export function NextSteps({ reasons }: { readonly reasons: readonly Finding[] }) {
  const say = useSay();
  const steps = [...new Set(reasons.flatMap((reason) => say(reason).next ?? []))];
  if (steps.length === 0) return null;
  return (
    <section className="section" aria-label="What to do">
      <div className="section-head">
        <h3>What to do</h3>
      </div>
      {steps.map((step) => (
        <div className="reason" key={step}>
          <p className="next">{step}</p>
        </div>
      ))}
    </section>
  );
}

/** Evidence that neither the sentence nor the next step carries already. */
function unsaid({ code, evidence }: Finding): readonly Evidence[] {
  const { says = '', next = '' } = SENTENCES[code] ?? {};
  return evidence.filter(({ name }) => !`${says} ${next}`.includes(`{${name}`));
}

function EvidenceList({ evidence }: { readonly evidence: readonly Evidence[] }) {
  const measures = useMeasures();
  const numbers = evidence.filter((e) => e.text === undefined);
  if (numbers.length === 0) return null;
  return (
    <p className="muted">
      {numbers
        .map((e) => {
          const isCount = e.dim === 'number' && Number.isInteger(e.value);
          const { number, unit } = show(e.value, e.dim, measures, isCount ? { decimals: 0 } : undefined);
          return `${capital(evidenceWord(e.name))} ${number} ${unit}`.trim();
        })
        .join(', ')}
    </p>
  );
}
