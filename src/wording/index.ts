/** Words for people: names, labels and sentences. Codes and keys come from the engine; nothing here is calculated. */
export { sayEditRefusal } from './edits';
export { sayFileProblem } from './files';
export { capital, humanised } from './humanise';
export { sayRefusal } from './refusals';
export { type Said, type SayContext, sayFinding } from './say';
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
