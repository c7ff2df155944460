import { scaleLinear } from 'd3-scale';
import { MINUS } from '../quantity';
import { PX_PER_STEP, type SlideState } from './slide';
import { inOurDigits } from './tickText';

const W = 240;
const PAD = 10;

const numberIn = (text: string): number => Number.parseFloat(text.replace(MINUS, '-'));

/**
 * The ruler under a number while it slides, in the unit that was typed: fine ticks, a tick where it began, the handle in
 * accent. It is stretched when the hand leaves it.
 */
export function SlideRuler({ state, step }: { readonly state: SlideState; readonly step: number }) {
  const from = numberIn(state.from);
  const now = numberIn(state.now);
  let half = ((W / 2 - PAD) / PX_PER_STEP) * step;
  while (Math.abs(now - from) > half) half *= 2;
  const x = scaleLinear([from - half, from + half], [PAD, W - PAD]);
  const label = inOurDigits(x.tickFormat(5));
  return (
    <svg className="slide-ruler" viewBox={`0 0 ${W} 26`} aria-hidden="true">
      {x.ticks(40).map((tick) => (
        <path key={tick} d={`M${x(tick)} 4V8`} className="fine" />
      ))}
      <path d={`M${PAD} 8H${W - PAD}`} className="axis" />
      {x.ticks(5).map((tick) => (
        <g key={tick}>
          <path d={`M${x(tick)} 2V8`} className="axis" />
          <text x={x(tick)} y={21} textAnchor="middle">
            {label(tick)}
          </text>
        </g>
      ))}
      <path d={`M${x(from)} 0V13`} className="began" />
      <circle cx={x(now)} cy={8} r={4.5} className="handle" />
    </svg>
  );
}
