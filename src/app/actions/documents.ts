import type { Action } from '../../store/action';
import { exportDocument } from '../export/exports';
import { cancelNewest, documentsUnderWay } from '../export/underWay';

export const documentActions: readonly Action[] = [
  {
    id: 'cancel-document',
    label: 'Cancel the document that is being made',
    group: 'result',
    keys: ['Esc'],
    whileTyping: true,
    when: () => documentsUnderWay.getState().all.length > 0,
    run: () => void cancelNewest(),
  },
  {
    id: 'summary',
    label: 'Stream summary (heat and material balance)',
    group: 'result',
    keys: ['Ctrl+Shift+S'],
    run: ({ session }) =>
      session.setState({ over: session.getState().over === 'summary' ? 'none' : 'summary' }),
  },
  {
    id: 'documents',
    label: 'Documents: choose, look at, save',
    group: 'sketch',
    keys: ['P'],
    run: ({ session }) => session.setState({ over: 'documents' }),
  },
  {
    id: 'export-pdf',
    label: 'Export PDF',
    group: 'result',
    keys: ['Ctrl+P'],
    whileTyping: true,
    run: (stores) => void exportDocument(stores, 'summary-pdf'),
  },
  {
    id: 'export-xlsx',
    label: 'Export the tables as a spreadsheet',
    group: 'sketch',
    keys: [],
    run: (stores) => void exportDocument(stores, 'xlsx'),
  },
  {
    id: 'export-csv',
    label: 'Export CSV',
    group: 'sketch',
    keys: ['Ctrl+Shift+E'],
    run: (stores) => void exportDocument(stores, 'csv'),
  },
  {
    id: 'export-json',
    label: 'Export the results as JSON',
    group: 'sketch',
    keys: [],
    run: (stores) => void exportDocument(stores, 'json'),
  },
  {
    id: 'export-svg',
    label: 'Export the drawing as SVG',
    group: 'sketch',
    keys: [],
    run: (stores) => void exportDocument(stores, 'svg'),
  },
];
