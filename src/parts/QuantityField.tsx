import { useId, useRef, useState } from 'react';
import {
  type Dimension,
  parseQuantity,
  type Refusal,
  type Site,
  stepSize,
  suggestedUnits,
  unitLabel,
} from '../quantity';
import type { Quantity } from '../sketch/types';
import type { FieldEdit } from './fieldEdit';
import { type RangeRefusal, RefusalNote } from './RefusalNote';
import { SlideRuler } from './SlideRuler';
import { useSlide } from './slide';

export interface QuantityFieldProps {
  /** Accessible name. */
  readonly label: string;
  /** Path of the field in the sketch, for scripts: 'p.P'. */
  readonly path: string;
  /** As typed. */
  readonly value: Quantity | undefined;
  readonly dims: Dimension | readonly Dimension[];
  readonly site: Site;
  readonly edit: FieldEdit;
  readonly min?: number | undefined;
  readonly max?: number | undefined;
  /** Used while nothing is given: shown dashed, as its own text. */
  readonly assumed?: { readonly text: string; readonly why: string } | undefined;
  /** Nothing given and nothing assumed: the solve waits for this. */
  readonly needed?: boolean;
  /** What stands in an empty field that may stay empty. */
  readonly empty?: string;
  /** Behind a hairline, in words. */
  readonly basis?: React.ReactNode;
  /** A bare number takes this unit; it stands in the field while typing. */
  readonly unitKept?: string;
  /** What stood here last, offered while a needed value is missing. */
  readonly formerly?: Quantity | undefined;
  readonly disabled?: boolean;
  readonly describedBy?: string | undefined;
  readonly autoFocus?: boolean;
  readonly onPaste?: (text: string) => boolean;
  /** Esc in a field that has nothing to take back; without it, Esc goes on to what the field stands in. */
  readonly onLeave?: () => void;
}

const BARE = /^\s*[+\-−]?(?:\d+\.?\d*|\.\d+)(?:[eE][+\-−]?\d+)?\s*$/;

/** A typed text in two pieces for showing: number, and unit as people write it. */
function pieces(value: Quantity, dims: QuantityFieldProps['dims'], site: Site): readonly [string, string] {
  const read = parseQuantity(value, dims, site);
  if (!read.ok) return [String(value), ''];
  return [read.number, unitLabel(read.unit, read.dim)];
}

/** The unit as it was typed; undefined for a pure number or what cannot be read. */
function unitTyped(value: Quantity, dims: QuantityFieldProps['dims'], site: Site): string | undefined {
  const read = parseQuantity(value, dims, site);
  return read.ok && read.unit !== '' ? read.unit : undefined;
}

/**
 * A number with the unit its user likes. Enter or leaving the field commits, Esc restores; what cannot be read stays as
 * typed with the reason below it. Dragging the number, or Alt and the arrows, slides it.
 */
export function QuantityField(props: QuantityFieldProps) {
  const { label, path, value, dims, site, edit, min, max, assumed, needed, disabled = false } = props;
  const [draft, setDraft] = useState<string | null>(null);
  const [focused, setFocused] = useState(false);
  const [refusal, setRefusal] = useState<Refusal | RangeRefusal | null>(null);
  const [seen, setSeen] = useState(value);
  const input = useRef<HTMLInputElement>(null);
  const id = useId();
  const slide = useSlide({ text: value, dims, site, edit, min, max, disabled });

  // Another value from elsewhere (undo, another field) ends a text that was refused.
  if (seen !== value) {
    setSeen(value);
    if (draft !== null) setDraft(null);
    if (refusal) setRefusal(null);
  }

  const typed = value === undefined ? '' : String(value);
  const shownAside = !focused && draft === null && value !== undefined;
  const blank = draft === null && value === undefined;
  /** A bare number keeps the unit that stood here: all is selected on coming in, so that any other can be typed over it. */
  const keptUnit = props.unitKept ?? (value === undefined ? undefined : unitTyped(value, dims, site));

  const commit = (text: string | null): void => {
    if (text === null) return;
    const whole = text.trim();
    if (whole === typed.trim()) {
      restore();
      return;
    }
    if (whole === '') {
      restore();
      edit.set(undefined);
      return;
    }
    const full = keptUnit && BARE.test(whole) ? `${whole} ${keptUnit}` : whole;
    const read = parseQuantity(full, dims, site);
    if (!read.ok) setRefusal(read);
    else if ((min !== undefined && read.si < min) || (max !== undefined && read.si > max))
      setRefusal({ ok: false, range: true, min, max, dim: read.dim, unit: read.unit });
    else {
      restore();
      edit.set(full);
    }
  };
  const restore = (): void => {
    setDraft(null);
    setRefusal(null);
  };
  const focusNumber = (): void => {
    const element = input.current;
    if (!element) return;
    element.focus();
    element.select();
  };

  const [number, unit] = value === undefined ? ['', ''] : pieces(value, dims, site);
  const state = refusal ? 'refused' : blank ? (assumed ? 'assumed' : needed ? 'needed' : 'empty') : 'given';
  const [assumedNumber, assumedUnit] = assumed ? pieces(assumed.text, dims, site) : ['', ''];

  return (
    <div className="quantity-field" data-state={state}>
      <div className="box">
        <input
          ref={input}
          type="text"
          inputMode="text"
          autoComplete="off"
          spellCheck={false}
          className={shownAside || blank ? 'under' : ''}
          data-field={path}
          aria-label={label}
          aria-invalid={refusal ? true : undefined}
          aria-describedby={refusal ? `${id}-why` : props.describedBy}
          aria-required={needed || undefined}
          title={blank && assumed ? `Assumed: ${assumed.why}` : undefined}
          disabled={disabled}
          // biome-ignore lint/a11y/noAutofocus: only after the user has chosen this field to be typed in
          autoFocus={props.autoFocus}
          value={draft ?? typed}
          onFocus={(event) => {
            setFocused(true);
            if (draft === null) event.target.select();
          }}
          onChange={(event) => {
            setDraft(event.target.value);
            if (refusal) setRefusal(null);
          }}
          onPaste={(event) => {
            if (props.onPaste?.(event.clipboardData.getData('text/plain'))) event.preventDefault();
          }}
          onBlur={() => {
            setFocused(false);
            slide.end(true);
            commit(draft);
          }}
          onKeyDown={(event) => {
            if (slide.keyDown(event)) return;
            if (event.key === 'Enter') commit(draft);
            else if (event.key === 'Escape') {
              // With nothing to take back, Esc belongs to what the field stands in.
              if (draft === null && !refusal && !props.onLeave) return;
              event.stopPropagation();
              if (draft === null && !refusal) props.onLeave?.();
              restore();
            }
          }}
          onKeyUp={slide.keyUp}
        />
        {shownAside ? (
          <span className="shown" aria-hidden="true">
            <span
              className="digits"
              data-slides={disabled ? undefined : true}
              title={disabled ? undefined : 'Drag sideways to slide, click to type'}
              {...(disabled ? {} : slide.pointer(focusNumber))}
            >
              {number}
            </span>
            <span className="uom">{unit}</span>
          </span>
        ) : null}
        {blank && !focused ? (
          <span className="shown placeholder" aria-hidden="true">
            {assumed ? (
              <>
                <span className="digits">{assumedNumber}</span>
                <span className="uom">{assumedUnit}</span>
              </>
            ) : needed ? (
              <span className="blank-mark">needs a value</span>
            ) : (
              <span className="uom">{props.empty ?? ''}</span>
            )}
          </span>
        ) : null}
        {focused && needed && (draft ?? typed).trim() === '' ? (
          <span className="kept" aria-hidden="true">
            needs a value
          </span>
        ) : null}
        {focused && keptUnit && BARE.test(draft ?? '') ? (
          <span className="kept" aria-hidden="true">
            {keptUnit}
          </span>
        ) : null}
        {props.basis ? <span className="basis">{props.basis}</span> : null}
      </div>
      {focused && needed && (draft ?? typed).trim() === '' ? (
        <p className="hint">
          {suggestedUnits(dims).slice(0, 4).join(', ')} or another unit
          {props.formerly === undefined ? null : (
            <button
              type="button"
              className="link"
              onPointerDown={(event) => event.preventDefault()}
              onClick={() => edit.set(props.formerly)}
            >
              Back to {String(props.formerly)}
            </button>
          )}
        </p>
      ) : null}
      {slide.state ? <SlideRuler state={slide.state} step={stepSize(slide.state.from) ?? 1} /> : null}
      {refusal ? (
        <RefusalNote
          id={`${id}-why`}
          refusal={refusal}
          typed={draft ?? ''}
          take={(text) => {
            setDraft(text);
            commit(text);
          }}
        />
      ) : null}
    </div>
  );
}
