import type { DocumentChoices } from '../sketch/documentTypes';

/** Parts of the document that may be left out, in their order. Contents, revisions and cautions always stay. */
export const SECTIONS = [
  { key: 'sheet', title: 'Drawing' },
  { key: 'basis', title: 'Design basis and utilities' },
  { key: 'streams', title: 'Stream summary' },
  { key: 'duties', title: 'Duties and powers' },
  { key: 'units', title: 'Units' },
  { key: 'columns', title: 'Columns with profiles' },
  { key: 'closure', title: 'Balance and closure' },
  { key: 'requirements', title: 'Product requirements' },
  { key: 'limits', title: 'Limits' },
  { key: 'assumptions', title: 'Assumption register and HOLDs' },
  { key: 'model', title: 'Model, pairs and sources' },
] as const;

export type SectionKey = (typeof SECTIONS)[number]['key'];

export const isShown = (choices: DocumentChoices | undefined, key: SectionKey): boolean =>
  !choices?.withoutSections?.includes(key);
