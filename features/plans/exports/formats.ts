/** The forms a plan leaves Hilum in: one list for the menu, the route and the tests. Pure. */
export const EXPORT_FORMATS = [
  { id: 'pdf', label: 'PDF, for office and cab', contentType: 'application/pdf', ending: 'pdf' },
  { id: 'csv', label: 'CSV table', contentType: 'text/csv; charset=utf-8', ending: 'csv' },
] as const;

export type ExportFormat = (typeof EXPORT_FORMATS)[number]['id'];
