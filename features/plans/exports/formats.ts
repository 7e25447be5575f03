/** The forms a plan leaves Hilum in: one list for the menu, the route and the tests. Pure. */
export const EXPORT_FORMATS = [
  { id: 'pdf', label: 'Plan (PDF)', contentType: 'application/pdf', ending: 'pdf' },
  { id: 'cab', label: 'Planting sheet for the cab (PDF)', contentType: 'application/pdf', ending: 'planting-sheet.pdf' },
  {
    id: 'xlsx',
    label: 'Workbook (XLSX)',
    contentType: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
    ending: 'xlsx',
  },
  { id: 'csv', label: 'CSV table', contentType: 'text/csv; charset=utf-8', ending: 'csv' },
  { id: 'shp', label: 'Shapefile (zipped)', contentType: 'application/zip', ending: 'shp.zip' },
  { id: 'geojson', label: 'GeoJSON', contentType: 'application/geo+json', ending: 'geojson' },
  { id: 'isoxml', label: 'Task file for the tractor (ISO 11783)', contentType: 'application/zip', ending: 'taskdata.zip' },
  { id: 'ics', label: 'Calendar of stages', contentType: 'text/calendar; charset=utf-8', ending: 'ics' },
] as const;

export type ExportFormat = (typeof EXPORT_FORMATS)[number]['id'];
