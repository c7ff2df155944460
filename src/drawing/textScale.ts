/** Zoomed out, texts, diamonds and marks shrink with the sheet to this share of their size: 9 px is still read. */
const LEAST_READ = 0.8;
/** Then they keep that size on the screen down to this zoom; zoomed in, they keep their full size up to the other one. */
const LEAST_STEADY = 0.5;
const MOST_STEADY = 1.5;
/** Texts are placed for one of so many scales from 1 to 2, and as many a unit below, so that they do not wander while somebody zooms. */
const STEPS = 8;
const MOST_SCALE = 2;
/** From one such scale to the next [-]. */
export const SCALE_STEP = 1 / STEPS;

/** By how much texts are drawn larger than the sheet at a zoom, so that they stay legible and do not swell [-]. */
export const steadyScale = (zoom: number): number =>
  zoom > 1 ? 1 / Math.min(zoom, MOST_STEADY) : Math.max(1, LEAST_READ / Math.max(zoom, LEAST_STEADY));

/** The text scale a scene is to be built with for a zoom: the next step that is not smaller than what is drawn [-]. */
export const textScaleAt = (zoom: number): number => Math.ceil(steadyScale(zoom) * STEPS - 1e-9) / STEPS;

/** The step of text scale that draws texts at least so many times their size, as far as there are steps [-]. */
export const textScaleFor = (times: number): number =>
  Math.min(MOST_SCALE, Math.max(1, Math.ceil(times * STEPS - 1e-9) / STEPS));
