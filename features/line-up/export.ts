import 'server-only';
import ExcelJS from 'exceljs';
import { csvLines } from '@/lib/csv';
import { formatCell } from './cells';
import { COLUMNS, type Column } from './columns';
import type { LineUpVariety, SeedLot } from './model';

export interface ExportRow {
  variety: LineUpVariety;
  lot: SeedLot | null;
}

function value({ variety, lot }: ExportRow, column: Column): unknown {
  if (!column.ofLot) return variety[column.key as keyof LineUpVariety];
  if (!lot) return null;
  if (column.key === 'germination') return lot.germinationPercent;
  if (column.key === 'priceDollarsPerUnit') return lot.priceCentsPerUnit === null ? null : lot.priceCentsPerUnit / 100;
  return lot[column.key as keyof SeedLot];
}

function columnsFor(seesSupply: boolean): Column[] {
  return COLUMNS.filter((column) => seesSupply || !column.private);
}

/** The line-up as CSV, a row a seed lot (or a variety without one); it reads back in through the import. */
export function lineUpCsv(rows: ExportRow[], seesSupply: boolean): string {
  const columns = columnsFor(seesSupply);
  const lines = rows.map((row) => columns.map((column) => formatCell(column, value(row, column))));
  return `\uFEFF${csvLines([columns.map((column) => column.header), ...lines])}`;
}

/** The same as a workbook, numbers as numbers. */
export async function lineUpXlsx(rows: ExportRow[], seesSupply: boolean): Promise<Buffer> {
  const columns = columnsFor(seesSupply);
  const workbook = new ExcelJS.Workbook();
  const sheet = workbook.addWorksheet('Line-up', { views: [{ state: 'frozen', xSplit: 1, ySplit: 1 }] });
  sheet.addRow(columns.map((column) => column.header)).font = { bold: true };
  for (const row of rows) {
    sheet.addRow(
      columns.map((column) => {
        const cell = value(row, column);
        return typeof cell === 'number' ? cell : formatCell(column, cell);
      }),
    );
  }
  for (const column of sheet.columns) column.width = 16;
  return Buffer.from(await workbook.xlsx.writeBuffer());
}
