import { heatedCatalogue } from '../heated/catalogue';
import { COOLER_FINDINGS } from './findings';

/** Takes heat from a stream; its duty counts into the unit and is therefore negative. */
export const cooler = heatedCatalogue('cooler', COOLER_FINDINGS);
