/** Quantities: read from text, converted to SI, written back and shown. */
export type { Dimension } from './dimension';
export {
  ABSENT,
  formatChange,
  formatDecimals,
  formatDifference,
  formatNumber,
  formatSignificant,
  MINUS,
  type NumberStyle,
  plainNumber,
  SCREEN,
  splitAtDecimal,
  THIN_SPACE,
  traceBelow,
} from './format';
export {
  type DisplayUnit,
  displayUnit,
  gasVolumes,
  inPercent,
  type MeasureSet,
  type Measures,
  type ShownQuantity,
  show,
  unitLabel,
} from './measures';
export { QUANTITY_PATTERN } from './number';
export { type ParsedQuantity, parseQuantity, type Site, STANDARD_SITE, unitRefusal } from './parse';
export type { QuantityCode, Refusal } from './refusal';
export { quantityText, type Rounding, stepNumber, stepSize, withNumber } from './rewrite';
export { DIMENSIONS } from './shapes';
export { suggestedUnits } from './suggest';
export { R_J_molK, STANDARD_ATMOSPHERE_Pa } from './symbols';
