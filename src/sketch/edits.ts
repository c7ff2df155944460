/** Everything a user can do to a sketch: pure functions that share what did not change, each with a label for undo. */
export { setDesignBasis, setDocuments, setHolds, setRevisions } from './editing/basis';
export { setChemicals } from './editing/chemicals';
export { bendStream, connect, deleteStream, disconnect, type End, whyNotConnect } from './editing/connect';
export {
  addNote,
  changeNote,
  deleteNote,
  moveNotes,
  setDisplay,
  setLimit,
  setModel,
  setSite,
  setTitle,
} from './editing/document';
export { EDIT_REFUSALS, type Edit, type EditCode, type Edited, type Refused } from './editing/edited';
export {
  copyPart,
  FRAGMENT_FORMAT,
  type Fragment,
  fragmentText,
  readFragment,
} from './editing/fragment';
export { deleteAndJoin, passingThrough, reconnect } from './editing/heal';
export { setMaterial, setNumber, setStreamName, setTag, setUnitName } from './editing/names';
export { setPair } from './editing/pairs';
export { duplicateUnits, pasteFragment } from './editing/paste';
export type { SettingPath } from './editing/path';
export { READABLE, type ScaledFlow, scaledFlows, scaleFeeds } from './editing/scale';
export { clearSetting, normaliseParts, setByPath, setSetting, setSettings } from './editing/settings';
export { addUnit, deleteUnits, insertUnitOnStream, mirrorUnit, moveUnits, turnUnit } from './editing/units';
