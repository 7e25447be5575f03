import 'server-only';
import type { PlanView } from '../model';
import { planCsv } from './csv';
import type { ExportFormat } from './formats';
import { planPdf } from './pdf';

export interface ExportOptions {
  /** Prices go only to the dealership's own people. */
  dealershipSide: boolean;
  /** ISO date. */
  madeOn: string;
}

/** The plan in one of the known forms, as bytes. */
export async function writeExport(format: ExportFormat, view: PlanView, options: ExportOptions): Promise<Uint8Array> {
  switch (format) {
    case 'pdf':
      return planPdf(view, options.madeOn);
    case 'csv':
      return new TextEncoder().encode(planCsv(view, options.dealershipSide));
  }
}
