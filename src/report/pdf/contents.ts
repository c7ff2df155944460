import type { Content, TableCell } from 'pdfmake/interfaces';

/** A heading that the contents and the reader's list of bookmarks name. */
export interface Entry {
  readonly key: string;
  readonly title: string;
  /** Key of the heading that it belongs to. */
  readonly parent?: string;
}

/** What makes a text the place of an entry: contents, links and bookmarks lead there. */
export const marked = ({ key, title, parent }: Entry) => ({
  id: key,
  outline: true,
  outlineText: title,
  ...(parent === undefined ? {} : { outlineParentId: parent }),
});

/**
 * The place of an entry `up` pt above what follows, for headings in the head of a table: such a head is repeated, and the
 * PDF maker takes the last repetition for the place of what stands in it.
 */
export const anchor = (entry: Entry, up: number): Content => ({
  ...marked(entry),
  text: '\u00a0',
  fontSize: 1,
  relativePosition: { x: 0, y: -up },
});

type Node = { readonly [name: string]: unknown };

/** Entries of a document in their order. */
export function entriesOf(content: unknown): Entry[] {
  if (Array.isArray(content)) return content.flatMap(entriesOf);
  if (typeof content !== 'object' || content === null) return [];
  const { id, outlineText, outlineParentId, stack, columns, table } = content as Node;
  const own: Entry[] =
    typeof id === 'string' && typeof outlineText === 'string'
      ? [
          {
            key: id,
            title: outlineText,
            ...(typeof outlineParentId === 'string' ? { parent: outlineParentId } : {}),
          },
        ]
      : [];
  return [
    ...own,
    ...entriesOf(stack),
    ...entriesOf(columns),
    ...entriesOf((table as Node | undefined)?.body),
  ];
}

/** The contents: titles that lead to their places, with the pages where these stand. */
export const contentsTable = (entries: readonly Entry[], fontSize: number): Content => ({
  fontSize,
  table: {
    dontBreakRows: true,
    widths: ['*', 'auto'],
    body: entries.map(({ key, title, parent }): TableCell[] => [
      { text: title, linkToDestination: key, margin: [parent === undefined ? 0 : 12, 0, 0, 0] },
      { pageReference: key, bold: true, alignment: 'right' },
    ]),
  },
  layout: 'noBorders',
});
