import type { SketchStorage } from '../store/autosave';

let storage: SketchStorage | null = null;

/** The page's one connection to its sketches; null where the browser denies storage. */
export const theStorage = (): SketchStorage | null => storage;
export const setStorage = (opened: SketchStorage | null): void => {
  storage = opened;
};
