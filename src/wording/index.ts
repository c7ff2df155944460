/** Words for people: names, labels and sentences. Codes and keys come from the engine; nothing here is calculated. */
export { dutyText, endWords, fixedByText, fixingText, flowText, placeText, stagesText } from './fixedBy';
export { sayEditRefusal } from './general/edits';
export { sayFileProblem } from './general/files';
export { type QuantitySaid, sayQuantityRefusal } from './general/quantity';
export { capital, humanised } from './humanise';
export { loopName, sayLoopStop } from './loops';
export { type Said, type SayContext, sayFinding } from './say';
export { sayRefusal } from './sayRefusal';
export {
  basisWord,
  kindAbout,
  kindWord,
  mixtureRuleWord,
  modelWord,
  optionWord,
  phaseWord,
  portWord,
  propertyWord,
  resultWord,
  settingWord,
  stateWord,
  weightWord,
} from './words';
