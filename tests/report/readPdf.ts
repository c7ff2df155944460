import { join } from 'node:path';
import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import type { PdfFonts } from '../../src/report/pdf/write';

const font = (name: string): string => join(import.meta.dirname, '../../public/fonts', name);
export const FONTS: PdfFonts = {
  normal: font('SourceSans3-Regular.ttf'),
  bold: font('SourceSans3-SemiBold.ttf'),
  italics: font('SourceSans3-Italic.ttf'),
};

export interface Placed {
  readonly text: string;
  readonly x: number;
  readonly right: number;
  /** Of the baseline, from the foot of the page. */
  readonly y: number;
  readonly size: number;
}

export interface ReadPage {
  readonly width: number;
  readonly height: number;
  readonly texts: readonly Placed[];
  /** Places that links of the page lead to, by name. */
  readonly links: readonly string[];
}

/** Texts of each page with their places, and its links, as an independent reader of PDF gives them. */
export async function readPdf(bytes: Uint8Array): Promise<{
  readonly pages: readonly ReadPage[];
  readonly info: Readonly<Record<string, unknown>>;
  readonly destinations: readonly string[];
  /** Number of the page, from 1, and height above its foot [pt] that each destination leads to. */
  readonly places: ReadonlyMap<string, { readonly page: number; readonly y: number }>;
  /** Titles of the bookmarks, one level in the other. */
  readonly bookmarks: readonly { readonly title: string; readonly inside: readonly string[] }[];
}> {
  const document = await getDocument({ data: new Uint8Array(bytes), verbosity: 0 }).promise;
  const pages: ReadPage[] = [];
  for (let k = 1; k <= document.numPages; k += 1) {
    const page = await document.getPage(k);
    const { items } = await page.getTextContent();
    const [, , width = 0, height = 0] = page.view;
    const links = (await page.getAnnotations()).flatMap((a) =>
      typeof a.dest === 'string' ? [a.dest] : Array.isArray(a.dest) ? ['page'] : [],
    );
    pages.push({
      width,
      height,
      links,
      texts: items.flatMap((item) =>
        'str' in item && item.str.trim() !== ''
          ? [
              {
                text: item.str,
                x: item.transform[4],
                right: item.transform[4] + item.width,
                y: item.transform[5],
                size: Math.hypot(item.transform[2], item.transform[3]),
              },
            ]
          : [],
      ),
    });
  }
  const { info } = await document.getMetadata();
  const found = await document.getDestinations();
  const places = new Map<string, { page: number; y: number }>();
  for (const [name, place] of Object.entries(found) as [string, unknown[]][]) {
    const page = await document.getPageIndex(place[0] as Parameters<typeof document.getPageIndex>[0]);
    places.set(name, { page: page + 1, y: Number(place[3]) });
  }
  const outline = (await document.getOutline()) ?? [];
  return {
    pages,
    info: info as Record<string, unknown>,
    destinations: Object.keys(found),
    places,
    bookmarks: outline.map(({ title, items }) => ({
      title,
      inside: (items as { readonly title: string }[]).map((item) => item.title),
    })),
  };
}

/** Texts one after the other; a space where the page leaves one. */
const joined = (texts: readonly Placed[]): string =>
  texts
    .map((t, k) => {
      const before = texts[k - 1];
      const touches = before && Math.abs(before.y - t.y) < 1 && Math.abs(before.right - t.x) < 0.5;
      return touches || k === 0 ? t.text : ` ${t.text}`;
    })
    .join('')
    .replace(/\s+/g, ' ')
    .trim();

/** Words of a page in the order in which they were written. */
export const wordsOf = (page: ReadPage): string => joined(page.texts);

/** Texts inside the border: without the zone marks at the page's edges. */
export const inside = (page: ReadPage): Placed[] =>
  page.texts.filter((t) => t.x > 20 && t.right < page.width - 18 && t.y > 18 && t.y < page.height - 18);

/** Lines of a page from the top: texts on one baseline, from left to right. */
export function linesOf(page: ReadPage): Placed[][] {
  const lines: Placed[][] = [];
  for (const t of inside(page).sort((a, b) => b.y - a.y || a.x - b.x)) {
    const line = lines.at(-1);
    if (line?.[0] && Math.abs(line[0].y - t.y) < 1) line.push(t);
    else lines.push([t]);
  }
  return lines.map((line) => line.sort((a, b) => a.x - b.x));
}

const GROUPS = ['Flows', 'Vapour', 'Liquid', 'Composition', 'Flow by component'];

/** The stream summary as it is printed: stream number -> "group/row unit" -> text. */
export function streamFigures(pages: readonly ReadPage[]): Map<string, Map<string, string>> {
  const found = new Map<string, Map<string, string>>();
  for (const page of pages) {
    const lines = linesOf(page);
    const heads = lines.findIndex((line) => line[0]?.text.trim() === 'Description');
    const title = lines.slice(0, heads).some((line) =>
      line
        .map((t) => t.text)
        .join('')
        .includes('heat'),
    );
    if (heads < 0 || !title) continue;
    // A diamond is 22 wide and ends where its column ends; its number stands in the middle.
    const columns = lines
      .slice(0, heads)
      .flat()
      .filter((t) => /^\d+$/.test(t.text))
      .map((t) => ({ number: t.text, right: (t.x + t.right) / 2 + 11 }))
      .sort((a, b) => a.right - b.right);
    // Where the first column begins.
    const first = columns[1] ? 2 * columns[0]!.right - columns[1].right : columns[0]!.right - 90;
    let group = '';
    for (const line of lines.slice(heads + 1)) {
      const label = joined(line.filter((t) => t.x < first));
      const bare = label.replace(/ \(continued\)/, '');
      const asGroup = GROUPS.find((g) => bare === g || bare.startsWith(`${g} `));
      if (asGroup && line.every((t) => t.x < first)) group = asGroup;
      for (const { number, right } of columns) {
        const before = columns.filter((c) => c.right < right - 1).at(-1)?.right ?? first;
        const text = line
          .filter((t) => t.right <= right + 1 && t.right > before + 1 && t.x > first)
          .map((t) => t.text)
          .join('')
          .replace(/[\s\u2009]/g, '');
        if (text === '') continue;
        const stream = found.get(number) ?? new Map<string, string>();
        found.set(number, stream.set(`${group}/${label}`, text));
      }
    }
  }
  return found;
}
