import { strFromU8, unzipSync } from 'fflate';

export interface ReadCell {
  readonly value: number | string;
  /** Number format of the cell's style; empty for none. */
  readonly format: string;
  readonly formula: boolean;
}

export interface ReadSheet {
  readonly name: string;
  /** By address: "B3". */
  readonly cells: ReadonlyMap<string, ReadCell>;
  /** First row and column that scroll, from 0; undefined when nothing is frozen. */
  readonly frozen?: { readonly rows: number; readonly columns: number };
}

const unescaped = (text: string): string =>
  text
    .replaceAll('&lt;', '<')
    .replaceAll('&gt;', '>')
    .replaceAll('&quot;', '"')
    .replaceAll('&apos;', "'")
    .replace(/&#(\d+);/g, (_, code: string) => String.fromCodePoint(Number(code)))
    .replaceAll('&amp;', '&');
const attribute = (tag: string, name: string): string | undefined =>
  new RegExp(`\\b${name}="([^"]*)"`).exec(tag)?.[1];
const all = (xml: string, pattern: RegExp): RegExpMatchArray[] => [...xml.matchAll(pattern)];

/** Reads a workbook from its parts (ECMA-376), knowing nothing of the writer: shared texts, styles, frozen panes, cells. */
export function readXlsx(bytes: Uint8Array): ReadSheet[] {
  const files = unzipSync(bytes);
  const part = (name: string): string => {
    const file = files[name];
    if (!file) throw new Error(`no part ${name}`);
    return strFromU8(file);
  };
  const shared = all(part('xl/sharedStrings.xml'), /<si>(.*?)<\/si>/gs).map((si) =>
    unescaped(
      all(si[1] ?? '', /<t[^>]*>(.*?)<\/t>/gs)
        .map((t) => t[1])
        .join(''),
    ),
  );
  const styles = part('xl/styles.xml');
  const formats = new Map(
    all(styles, /<numFmt [^>]*>/g).map((m) => [
      attribute(m[0], 'numFmtId'),
      unescaped(attribute(m[0], 'formatCode') ?? ''),
    ]),
  );
  const cellXfs = /<cellXfs[^>]*>(.*?)<\/cellXfs>/s.exec(styles)?.[1] ?? '';
  const formatOf = all(cellXfs, /<xf [^>]*>/g).map((m) => formats.get(attribute(m[0], 'numFmtId')) ?? '');
  const targets = new Map(
    all(part('xl/_rels/workbook.xml.rels'), /<Relationship [^>]*>/g).map((m) => [
      attribute(m[0], 'Id'),
      attribute(m[0], 'Target') ?? '',
    ]),
  );
  return all(part('xl/workbook.xml'), /<sheet [^>]*>/g).map((m): ReadSheet => {
    const xml = part(`xl/${targets.get(attribute(m[0], 'r:id'))?.replace(/^\/?(xl\/)?/, '')}`);
    const pane = /<pane [^>]*>/.exec(xml)?.[0];
    const cells = all(xml, /<c ([^>]*?)(?:\/>|>(.*?)<\/c>)/gs).map((c): [string, ReadCell] => {
      const [, tag = '', inner = ''] = c;
      const raw = /<v>(.*?)<\/v>/s.exec(inner)?.[1] ?? '';
      const isText = attribute(tag, 't') === 's';
      return [
        attribute(tag, 'r') ?? '',
        {
          value: isText ? (shared[Number(raw)] ?? '') : raw === '' ? '' : Number(raw),
          format: formatOf[Number(attribute(tag, 's') ?? -1)] ?? '',
          formula: inner.includes('<f'),
        },
      ];
    });
    return {
      name: unescaped(attribute(m[0], 'name') ?? ''),
      cells: new Map(cells),
      ...(pane
        ? {
            frozen: {
              rows: Number(attribute(pane, 'ySplit') ?? 0),
              columns: Number(attribute(pane, 'xSplit') ?? 0),
            },
          }
        : {}),
    };
  });
}
