import type { ReportInput } from '../../report/input';
import type { Action } from '../../store/action';
import type { Stores } from '../../store/react';
import { download, fileName } from '../files';
import { cleanReportInput } from '../reporting';

/** Solves from nothing, then hands the input on; says plainly when there is nothing to document. */
async function withCleanAnswer(
  stores: Stores,
  use: (input: ReportInput) => void | Promise<void>,
): Promise<void> {
  try {
    const input = await cleanReportInput(stores);
    if (input) await use(input);
    else
      stores.session.say('caution', 'There is nothing to document yet.', [
        'Choose chemicals and draw a feed first; the stream summary follows.',
      ]);
  } catch (error) {
    stores.session.say('beyond', 'The document was not made.', [
      error instanceof Error ? error.message : String(error),
    ]);
  }
}

export const documentActions: readonly Action[] = [
  {
    id: 'summary',
    label: 'Stream summary (heat and material balance)',
    group: 'result',
    keys: ['Ctrl+Shift+S'],
    run: ({ session }) =>
      session.setState({ over: session.getState().over === 'summary' ? 'none' : 'summary' }),
  },
  {
    id: 'export-pdf',
    label: 'Export PDF',
    group: 'result',
    keys: ['Ctrl+P'],
    whileTyping: true,
    run: (stores) =>
      void withCleanAnswer(stores, async (input) => {
        stores.session.setState({ spoken: 'Making the PDF' });
        const { makePdf } = await import('../pdf');
        const name = fileName(input.sketch.title.title, '.pdf');
        download(name, (await makePdf(input)) as BlobPart, 'application/pdf');
        stores.session.setState({ spoken: `${name} is made` });
      }),
  },
  {
    id: 'export-csv',
    label: 'Export CSV',
    group: 'sketch',
    keys: ['Ctrl+Shift+E'],
    run: (stores) =>
      void withCleanAnswer(stores, async (input) => {
        const [{ buildReport }, { writeCsv }] = await Promise.all([
          import('../../report/model'),
          import('../../report/csv'),
        ]);
        download(
          fileName(input.sketch.title.title, '.csv'),
          writeCsv(buildReport(input)),
          'text/csv;charset=utf-8',
        );
      }),
  },
  {
    id: 'export-svg',
    label: 'Export the drawing as SVG',
    group: 'sketch',
    keys: [],
    run: (stores) =>
      void withCleanAnswer(stores, async (input) => {
        const [{ reportScene }, { sceneToSvg }] = await Promise.all([
          import('../../report/sheet'),
          import('../../drawing/svg'),
        ]);
        download(fileName(input.sketch.title.title, '.svg'), sceneToSvg(reportScene(input)), 'image/svg+xml');
      }),
  },
];
