import 'server-only';
import type { PlanView } from '../model';
import { cabPdf } from './cab-pdf';
import { planCalendar } from './calendar';
import { planCsv } from './csv';
import type { ExportFormat } from './formats';
import { planGeojson } from './geojson';
import { planIsoxml } from './isoxml';
import { planPdf } from './pdf';
import { planShapefile } from './shapefile';
import { planXlsx } from './xlsx';

export interface ExportOptions {
  /** Prices go only to the dealership's own people. */
  dealershipSide: boolean;
  /** ISO date. */
  madeOn: string;
}

/** The plan in one of the known forms, as bytes. */
export async function writeExport(format: ExportFormat, view: PlanView, options: ExportOptions): Promise<Uint8Array> {
  const text = (words: string) => new TextEncoder().encode(words);
  switch (format) {
    case 'pdf':
      return planPdf(view, options.madeOn);
    case 'cab':
      return cabPdf(view, options.madeOn);
    case 'xlsx':
      return planXlsx(view, options.dealershipSide);
    case 'csv':
      return text(planCsv(view, options.dealershipSide));
    case 'shp':
      return planShapefile(view, options.madeOn);
    case 'geojson':
      return text(planGeojson(view));
    case 'isoxml':
      return planIsoxml(view);
    case 'ics':
      return text(planCalendar(view, options.madeOn));
  }
}
