import 'server-only';
import ExcelJS from 'exceljs';
import { CAUTIONS } from '@/lib/ui/cautions';
import { columnsFor } from '../columns';
import { figuresOf, type PlanView } from '../model';

/** The plan as a workbook: real numbers, a totals row of formulas, a sheet of lots, and the cautions under both. */
export async function planXlsx(view: PlanView, dealershipSide: boolean): Promise<Uint8Array> {
  const workbook = new ExcelJS.Workbook();
  workbook.creator = 'Hilum';
  workbook.calcProperties.fullCalcOnLoad = true;
  const columns = columnsFor('xlsx', dealershipSide);
  const sheet = workbook.addWorksheet('Plan', { views: [{ state: 'frozen', xSplit: 2, ySplit: 2 }] });
  sheet.addRow([`${view.season} planting plan of ${view.operationName} (${view.state}, revision ${view.revision})`]);
  sheet.getRow(1).font = { bold: true, size: 14 };
  sheet.addRow(columns.map((column) => column.label));
  sheet.getRow(2).font = { bold: true };
  const first = 3;
  for (const line of view.lines) {
    const figures = figuresOf(line);
    sheet.addRow(columns.map((column) => column.value(line, figures)));
  }
  const last = first + view.lines.length - 1;
  const letterOf = (id: string) => sheet.getColumn(columns.findIndex((column) => column.id === id) + 1).letter;
  const totals = sheet.addRow(
    columns.map((column) => {
      if (column.id === 'field') return 'All fields';
      if (column.summed) {
        // The result stands beside the formula for readers that do not calculate.
        const result = view.lines.reduce((total, line) => total + Number(column.value(line, figuresOf(line)) ?? 0), 0);
        return { formula: `SUM(${letterOf(column.id)}${first}:${letterOf(column.id)}${last})`, result };
      }
      if (column.id === 'expected') {
        const [acres, expected] = [letterOf('acres'), letterOf('expected')];
        const range = (letter: string) => `${letter}${first}:${letter}${last}`;
        // Weighted by acres, over the fields that have an expected yield.
        return {
          formula: `IFERROR(SUMPRODUCT(${range(acres)},${range(expected)})/SUMIF(${range(expected)},">0",${range(acres)}),"")`,
          result: view.totals.expectedPerAcre ?? '',
        };
      }
      return null;
    }),
  );
  totals.font = { bold: true };
  totals.eachCell((cell) => {
    cell.border = { top: { style: 'thin' } };
  });
  columns.forEach((column, index) => {
    const cells = sheet.getColumn(index + 1);
    cells.width = Math.max(9, Math.round(column.width * 6));
    if (column.digits !== undefined) cells.numFmt = column.digits === 0 ? '#,##0' : `#,##0.${'0'.repeat(column.digits)}`;
    if (column.numeric) cells.alignment = { horizontal: 'right' };
  });
  sheet.getRow(1).alignment = { horizontal: 'left' };
  addCautions(sheet);

  const lots = workbook.addWorksheet('Seed to load');
  lots.addRow(['Variety', 'Lot', 'Acres', 'Units, exact', 'Units, whole']);
  lots.getRow(1).font = { bold: true };
  for (const lot of view.totals.varieties.flatMap((one) => one.lots)) {
    const row = lots.addRow([
      lot.variety.code,
      lot.lot?.lotNumber ?? 'any',
      Number(lot.acres.toFixed(2)),
      Number(lot.exactUnits.toFixed(3)),
    ]);
    row.getCell(5).value = { formula: `ROUNDUP(D${row.number},0)`, result: lot.units };
  }
  const end = lots.rowCount;
  const { placedAcres, units, varieties } = view.totals;
  const exact = varieties.flatMap((one) => one.lots).reduce((total, lot) => total + lot.exactUnits, 0);
  const sum = lots.addRow([
    'All lots',
    null,
    { formula: `SUM(C2:C${end})`, result: placedAcres },
    { formula: `SUM(D2:D${end})`, result: exact },
    { formula: `SUM(E2:E${end})`, result: units },
  ]);
  sum.font = { bold: true };
  lots.columns.forEach((column) => {
    column.width = 16;
  });
  addCautions(lots);
  return new Uint8Array(await workbook.xlsx.writeBuffer());
}

function addCautions(sheet: ExcelJS.Worksheet): void {
  sheet.addRow([]);
  for (const words of [CAUTIONS.yield, CAUTIONS.treatedSeed, CAUTIONS.herbicide]) {
    const row = sheet.addRow([words]);
    row.font = { italic: true };
    row.getCell(1).alignment = { horizontal: 'left' };
  }
}
