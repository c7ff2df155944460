/** Between these zooms texts, diamonds and marks keep their size on the screen. */
export const LEAST_STEADY = 0.5;
export const MOST_STEADY = 1.5;
/** Texts are placed for one of so many scales between 1 and 2, so that they do not wander while somebody zooms. */
const STEPS = 8;

/** By how much texts are drawn larger than the sheet at a zoom, so that they keep their size on the screen [-]. */
export const steadyScale = (zoom: number): number => 1 / Math.min(Math.max(zoom, LEAST_STEADY), MOST_STEADY);

/** The text scale a scene is to be built with for a zoom: the next step that is not smaller than what is drawn [-]. */
export const textScaleAt = (zoom: number): number =>
  Math.max(1, Math.ceil(steadyScale(zoom) * STEPS - 1e-9) / STEPS);
