import type { ModelSpec } from '../../engine/thermo/types';

/** Thermodynamic models that are solved in this version. */
export const MODEL_KINDS: readonly ModelSpec['kind'][] = ['peng-robinson', 'raoult'];
