import { type Dimension, formatSignificant, quantityText, type Refusal, unitLabel } from '../quantity';
import { sayRefusal } from '../wording';

/** A number that was read but lies outside what the setting can be. */
export interface RangeRefusal {
  readonly ok: false;
  readonly range: true;
  readonly min: number | undefined;
  readonly max: number | undefined;
  readonly dim: Dimension;
  readonly unit: string;
}

function rangeSentence({ min, max, dim, unit }: RangeRefusal): string {
  const say = (si: number): string => {
    if (unit === '') return formatSignificant(si, 3);
    return (
      quantityText(si, dim, unit, undefined, { figures: 4 })?.replace(unit, unitLabel(unit, dim)) ??
      String(si)
    );
  };
  if (min !== undefined && max !== undefined) return `Must lie between ${say(min)} and ${say(max)}.`;
  return min !== undefined ? `Must not be below ${say(min)}.` : `Must not be above ${say(max ?? 0)}.`;
}

interface Props {
  readonly id: string;
  readonly refusal: Refusal | RangeRefusal;
  readonly typed: string;
  /** Commits a text offered here. */
  readonly take: (text: string) => void;
}

/** Why a text was not taken, and what would be: each offer is a button that takes it. */
export function RefusalNote({ id, refusal, typed, take }: Props) {
  const isRange = 'range' in refusal;
  const offers = isRange ? percentOf(refusal, typed) : offersOf(refusal, typed);
  return (
    <div className="refusal" id={id} role="alert">
      <p>{isRange ? rangeSentence(refusal) : sayRefusal(refusal.code, refusal.found)}</p>
      {offers.length > 0 ? (
        <p className="offers">
          {offers.map((text) => (
            <button
              key={text}
              type="button"
              className="link"
              // Before the field loses the focus and commits the refused text again.
              onPointerDown={(event) => event.preventDefault()}
              onClick={() => take(text)}
            >
              {text}
            </button>
          ))}
        </p>
      ) : null}
    </div>
  );
}

/** A bare 30 for a fraction most likely means per cent; it is offered, never assumed. */
function percentOf({ dim, unit, max }: RangeRefusal, typed: string): readonly string[] {
  const number = Number(typed.trim());
  return dim === 'fraction' && unit === '' && max === 1 && number > 1 && number <= 100
    ? [`${typed.trim()} %`]
    : [];
}

/** Whole texts that would be taken instead: the near miss put right, or the number with units that fit. */
function offersOf(refusal: Refusal, typed: string): readonly string[] {
  const { near, at, found, code } = refusal;
  if (near !== undefined) return [typed.slice(0, at) + near + typed.slice(at + found.length)];
  const number = /^\s*[+\-−]?(?:\d+\.?\d*|\.\d+)(?:[eE][+\-−]?\d+)?/.exec(typed)?.[0].trim();
  if (number === undefined || code === 'quantity/out-of-range') return [];
  if (code === 'quantity/below-absolute-zero' || code === 'quantity/below-vacuum') return [];
  return refusal.fits.slice(0, 4).map((unit) => `${number} ${unit}`);
}
