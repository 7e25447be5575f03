/** The plan as CSV. Pure. */
import { csvLines } from '@/lib/csv';
import { CAUTIONS } from '@/lib/ui/cautions';
import { columnsFor } from '../columns';
import { figuresOf, type PlanView } from '../model';

/** One head line, one line a field, then the cautions as lines of one cell. */
export function planCsv(view: PlanView, dealershipSide: boolean): string {
  const columns = columnsFor('csv', dealershipSide);
  return csvLines([
    columns.map((column) => column.fileLabel),
    ...view.lines.map((line) => {
      const figures = figuresOf(line);
      return columns.map((column) => column.value(line, figures));
    }),
    ...[CAUTIONS.yield, CAUTIONS.treatedSeed, CAUTIONS.herbicide].map((words) => [words]),
  ]);
}
