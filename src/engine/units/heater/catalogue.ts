import { heatedCatalogue } from '../heated/catalogue';
import { HEATER_FINDINGS } from './findings';

/** Brings a stream to a condition; duty is the heat into it. */
export const heater = heatedCatalogue('heater', HEATER_FINDINGS);
