import { scaleLinear } from 'd3-scale';
import type { Finding, Weight } from '../engine/outcome';
import { inOurDigits } from '../parts/tickText';
import { displayUnit, type Measures } from '../quantity';

interface RulerData {
  readonly value: number;
  readonly limit: number;
  readonly unit: string;
}

/**
 * Value and limit on one scale, where the finding has both: the threshold is the evidence named 'limit', the value the first
 * other number of its dimension. Shares are shown in per cent.
 */
export function rulerOf(finding: Finding, measures: Measures): RulerData | undefined {
  const numbers = finding.evidence.filter((e) => e.text === undefined && Number.isFinite(e.value));
  const limit = numbers.find((e) => e.name === 'limit');
  const seen = limit && numbers.find((e) => e !== limit && e.dim === limit.dim);
  if (!limit || !seen) return undefined;
  if (limit.dim === 'fraction') return { value: seen.value * 100, limit: limit.value * 100, unit: '%' };
  const { toDisplay, label } = displayUnit(limit.dim, measures);
  return { value: toDisplay(seen.value), limit: toDisplay(limit.value), unit: label };
}

const W = 290;
const [LEFT, RIGHT] = [4, 262];

/** The limit as a tick across the line (dashed for a caution), the value as a dot; the line is thick up to it. */
export function LimitRuler({ value, limit, unit, weight }: RulerData & { readonly weight: Weight }) {
  const far = Math.max(value, limit);
  const near = Math.min(value, limit);
  const room = (far - near || Math.abs(far) || 1) * 0.6;
  const isFromZero = near >= 0 && near < (far - near) * 12;
  const x = scaleLinear([isFromZero ? 0 : near - room, far + room], [LEFT, RIGHT]).nice(5);
  const [from = 0] = x.domain();
  const text = inOurDigits(x.tickFormat(5));
  return (
    <svg
      className="limit-ruler"
      viewBox={`0 0 ${W} 30`}
      role="img"
      aria-label={`${text(value)} against a limit of ${text(limit)} ${unit}`}
    >
      <path d={`M${LEFT} 10H${RIGHT}`} className="axis" />
      {x.ticks(5).map((tick) => (
        <g key={tick}>
          <path d={`M${x(tick)} 7V13`} className="axis" />
          <text x={x(tick)} y={26} textAnchor="middle">
            {text(tick)}
          </text>
        </g>
      ))}
      <text x={W} y={26} textAnchor="end">
        {unit}
      </text>
      <path d={`M${x(from)} 10H${x(value)}`} className="upto" />
      <path d={`M${x(limit)} 2V18`} className={weight === 'beyond-limit' ? 'tick' : 'tick soft'} />
      <circle cx={x(value)} cy={10} r={4.5} className={`spot ${weight}`} />
    </svg>
  );
}
