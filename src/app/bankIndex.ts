import { loadIndex } from '../data/bank';

/** The bank's index for the drawers: small, there from the start. */
export const bankIndex = loadIndex();
