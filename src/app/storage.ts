import type { SketchStorage } from '../store/autosave';

let storage: SketchStorage | null = null;

/** The page's one connection to its sketches; null where the browser denies storage. */
export const theStorage = (): SketchStorage | null => storage;
export const setStorage = (opened: SketchStorage | null): void => {
  storage = opened;
};

let takeOver: (() => Promise<void>) | null = null;

/** Makes this the tab that may change the sketch; null where nothing is saved. */
export const theTakeOver = (): (() => Promise<void>) | null => takeOver;
export const setTakeOver = (take: () => Promise<void>): void => {
  takeOver = take;
};
