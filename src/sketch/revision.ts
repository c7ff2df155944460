import type { Sketch, TitleBlock } from './types';

type Issued = Pick<Sketch, 'title' | 'revisions'>;

const said = (text: string | undefined): string | undefined => text?.trim() || undefined;

/**
 * The mark of the revision in force: the newest entry of the revision table (it stands newest first), else what the title
 * block's own field says; undefined for a draft.
 */
export const revisionInForce = ({ title, revisions }: Issued): string | undefined =>
  revisions && revisions.length > 0 ? said(revisions[0]?.mark) : said(title.revision);

/** The title block as it is printed: with the revision in force. */
export function printedTitle(sketch: Issued): TitleBlock {
  const { revision: _, ...rest } = sketch.title;
  const mark = revisionInForce(sketch);
  return mark === undefined ? rest : { ...rest, revision: mark };
}
