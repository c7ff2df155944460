import { useEffect, useRef, useState } from 'react';
import { type Dimension, parseQuantity, type Site, stepNumber } from '../quantity';
import type { Quantity } from '../sketch/types';
import type { FieldEdit } from './fieldEdit';

/** Pixels of the hand for one step. */
export const PX_PER_STEP = 2;
/** Pixels before a press on a number becomes a slide. */
const SLACK_PX = 3;

export interface SlideState {
  /** The text before the slide. */
  readonly from: string;
  readonly now: string;
}

export interface SlideRange {
  readonly min?: number | undefined;
  readonly max?: number | undefined;
}

interface Keys {
  readonly shiftKey: boolean;
  readonly ctrlKey: boolean;
}

const timesOf = (keys: Keys): 0.1 | 1 | 10 => (keys.shiftKey ? 10 : keys.ctrlKey ? 0.1 : 1);

/**
 * The text so many tenths of a step away from where a slide began, or undefined where it would leave the range or stop
 * being a quantity of the dimension: a slide stops there.
 */
export function slidText(
  from: string,
  tenths: number,
  dims: Dimension | readonly Dimension[],
  site: Site,
  { min = Number.NEGATIVE_INFINITY, max = Number.POSITIVE_INFINITY }: SlideRange,
): string | undefined {
  const text = stepNumber(from, tenths, 0.1);
  if (text === undefined) return undefined;
  const read = parseQuantity(text, dims, site);
  return read.ok && read.si >= min && read.si <= max ? text : undefined;
}

/** How far a slide is: whole steps of one size since the size last changed, on top of what was reached before it. */
export interface Way {
  /** Reached before this stretch, in tenths of a step: whole. */
  readonly before: number;
  readonly times: 0.1 | 1 | 10;
  /** Steps of this stretch; a hand makes parts of one. */
  readonly steps: number;
}
export const START: Way = { before: 0, times: 1, steps: 0 };

export const tenthsOf = ({ before, times, steps }: Way): number =>
  before + Math.round(steps) * Math.round(10 * times);

/** The way after so many steps more; coarse steps after fine ones go on from there, so that no number jumps. */
export const farther = (way: Way, by: number, times: Way['times']): Way =>
  times === way.times ? { ...way, steps: way.steps + by } : { before: tenthsOf(way), times, steps: by };

interface Options extends SlideRange {
  readonly text: Quantity | undefined;
  readonly dims: Dimension | readonly Dimension[];
  readonly site: Site;
  readonly edit: FieldEdit;
  readonly disabled: boolean;
}

/** A number under the hand: dragged sideways, or stepped with Alt and the arrows. Esc goes back; letting go is one edit. */
export function useSlide(options: Options) {
  const latest = useRef(options);
  latest.current = options;
  const [state, setState] = useState<SlideState | null>(null);
  const running = useRef<{ from: string; way: Way; now: string } | null>(null);

  const begin = (): boolean => {
    const { text, dims, site, edit, disabled } = latest.current;
    if (disabled || text === undefined || !parseQuantity(text, dims, site).ok) return false;
    const from = String(text);
    running.current = { from, way: START, now: from };
    edit.begin();
    setState({ from, now: from });
    return true;
  };
  const move = (by: number, times: 0.1 | 1 | 10): void => {
    const run = running.current;
    if (!run) return;
    const { dims, site, edit, min, max } = latest.current;
    const way = farther(run.way, by, times);
    const text = slidText(run.from, tenthsOf(way), dims, site, { min, max });
    if (text === undefined) return;
    run.way = way;
    if (text === run.now) return;
    run.now = text;
    edit.change(text);
    setState({ from: run.from, now: text });
  };
  const end = (keep: boolean): void => {
    if (!running.current) return;
    running.current = null;
    setState(null);
    if (keep) latest.current.edit.commit();
    else latest.current.edit.cancel();
  };

  const endRef = useRef(end);
  endRef.current = end;
  // A field that goes away under the hand keeps what was shown last.
  useEffect(() => () => endRef.current(true), []);
  const isSliding = state !== null;
  useEffect(() => {
    if (!isSliding) return;
    const stop = (event: KeyboardEvent): void => {
      if (event.key !== 'Escape') return;
      event.preventDefault();
      event.stopPropagation();
      endRef.current(false);
    };
    window.addEventListener('keydown', stop, true);
    return () => window.removeEventListener('keydown', stop, true);
  }, [isSliding]);

  /** For the number's element. `onPress`: the pointer went up without a slide. */
  const pointer = (onPress: () => void) => {
    const start = (event: React.PointerEvent<HTMLElement>): void => {
      if (event.button !== 0) return;
      event.preventDefault();
      const element = event.currentTarget;
      const origin = event.clientX;
      let last = origin;
      let began = false;
      element.setPointerCapture?.(event.pointerId);
      const onMove = (e: PointerEvent): void => {
        if (!began) {
          if (Math.abs(e.clientX - origin) < SLACK_PX) return;
          began = begin();
          if (!began) return;
          last = origin;
        }
        move((e.clientX - last) / PX_PER_STEP, timesOf(e));
        last = e.clientX;
      };
      const finish = (keep: boolean): void => {
        element.removeEventListener('pointermove', onMove);
        element.removeEventListener('pointerup', onUp);
        element.removeEventListener('pointercancel', onCancel);
        if (began) end(keep);
        else if (keep) onPress();
      };
      const onUp = (): void => finish(true);
      const onCancel = (): void => finish(false);
      element.addEventListener('pointermove', onMove);
      element.addEventListener('pointerup', onUp);
      element.addEventListener('pointercancel', onCancel);
    };
    return { onPointerDown: start };
  };

  /** True when the key belonged to the slide. */
  const keyDown = (event: React.KeyboardEvent): boolean => {
    const by = { ArrowUp: 1, ArrowRight: 1, ArrowDown: -1, ArrowLeft: -1 }[event.key];
    if (!event.altKey || by === undefined) return false;
    event.preventDefault();
    if (!running.current && !begin()) return true;
    move(by, timesOf(event));
    return true;
  };
  const keyUp = (event: React.KeyboardEvent): void => {
    if (event.key === 'Alt') end(true);
  };

  return { state, pointer, keyDown, keyUp, end };
}
