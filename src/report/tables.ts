import type { ReportModel, Table } from './types';

/** Every table of the report in the order of the document, with the words over its first column. */
export function tablesOf(report: ReportModel): readonly (readonly [Table, string])[] {
  const all: (readonly [Table | undefined, string])[] = [
    [report.streams, 'Stream'],
    [report.duties, 'Unit'],
    [report.powers, 'Unit'],
    [report.units, 'Tag'],
    ...report.columns.flatMap(({ settings, figures, stages }) => [
      [settings, 'Setting'] as const,
      [figures, 'Result'] as const,
      [stages, 'Place'] as const,
    ]),
    [report.closure, 'Balance'],
    [report.requirements, 'Stream'],
    [report.limits, 'Where'],
    [report.basis, 'What'],
    [report.utilities, 'Level'],
    [report.assumptions, 'No.'],
    [report.holds, 'No.'],
    [report.pairs, 'Pair'],
    [report.revisions, 'Revision'],
  ];
  return all.filter((entry): entry is readonly [Table, string] => entry[0] !== undefined);
}
