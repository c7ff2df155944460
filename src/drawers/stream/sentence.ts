import type { StreamResult } from '../../engine/network/types';
import { capital, phaseWord } from '../words';

export type SolvedStream = Extract<StreamResult, { state: 'solved' }>;

/** "Liquid at its bubble point", "Vapour and liquid", "Nothing flows". */
export function phaseSentence(stream: SolvedStream): string {
  if (!(stream.n_mol_s > 0) || stream.phases.length === 0) return 'Nothing flows.';
  const there = stream.phases.filter((phase) => phase.fraction > 0);
  const [only] = there;
  if (there.length === 1 && only) {
    const word = capital(phaseWord(only.kind));
    const incipient = stream.phases.find((phase) => phase.fraction === 0);
    if (!incipient)
      return `${word}${only.byConvention ? ', by name only: there is one phase and none to compare with' : ''}.`;
    return only.kind === 'vapour' ? `${word} at its dew point.` : `${word} at its bubble point.`;
  }
  return `${capital(there.map((phase) => phaseWord(phase.kind)).join(' and '))}.`;
}
