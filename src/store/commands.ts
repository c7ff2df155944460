/** What screens may do to a sketch: the edits, and the names they need to make them. */

export { ASKED_WITHIN } from '../sketch/compiling/composition';
export { MODEL_KINDS } from '../sketch/compiling/modelKinds';
export { describeStream, portWords } from '../sketch/describe';
export * from '../sketch/edits';
export { LABEL_KEYS } from '../sketch/fresh';
export { isOneOf, isThere, nextPortName } from '../sketch/registry';
export { revisionInForce } from '../sketch/revision';
