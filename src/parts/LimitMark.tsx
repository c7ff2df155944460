import type { Finding, Weight } from '../engine/outcome';

const words: Readonly<Record<Weight, string>> = {
  note: 'note',
  caution: 'caution',
  'beyond-limit': 'beyond limit',
};
const dotY: Readonly<Record<Weight, number>> = { note: 11.2, caution: 8, 'beyond-limit': 4.8 };

/** A limit line and a dot: below it (note), on it (caution), beyond it (beyond limit). Told by shape first. */
export function LimitMark({ weight, label }: { readonly weight: Weight; readonly label?: string }) {
  const beyond = weight === 'beyond-limit';
  const ink = beyond ? 'var(--onb)' : weight === 'caution' ? 'var(--caution)' : 'var(--ink2)';
  const box = beyond ? 'var(--beyond)' : weight === 'caution' ? 'var(--cautionw)' : 'var(--paper)';
  const edge = beyond ? 'var(--beyond)' : ink;
  return (
    <svg
      width="16"
      height="16"
      viewBox="0 0 16 16"
      role="img"
      aria-label={label ?? words[weight]}
      style={{ flex: 'none' }}
    >
      <rect
        x="1"
        y="1"
        width="14"
        height="14"
        rx="2.5"
        fill={box}
        stroke={edge}
        strokeWidth={weight === 'note' ? 1 : 1.6}
      />
      <path d="M3.5 8H12.5" stroke={ink} strokeWidth="1.4" />
      <circle cx="8" cy={dotY[weight]} r="2" fill={ink} />
    </svg>
  );
}

const rank: readonly Weight[] = ['beyond-limit', 'caution', 'note'];

export const weightWord = (weight: Weight): string => words[weight];

/** The heaviest weight among findings. */
export const worstWeight = (findings: readonly Finding[]): Weight | undefined =>
  rank.find((weight) => findings.some((finding) => finding.weight === weight));

/** Worst first; within a weight the given order stays. */
export const worstFirst = (findings: readonly Finding[]): Finding[] =>
  rank.flatMap((weight) => findings.filter((finding) => finding.weight === weight));
