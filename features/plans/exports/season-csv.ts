import { csvLines } from '@/lib/csv';
import type { SeasonBook } from '../season-book';

/** The season's book by variety: one head line, one line a variety. Pure. */
export function seasonCsv(book: SeasonBook): string {
  return csvLines([
    ['variety', 'relativeMaturity', 'release', 'acres', 'unitsDraft', 'unitsProposed', 'unitsAgreed', 'unitsOnHand', 'unitsFree'],
    ...book.varieties.map((one) => [
      one.code,
      one.relativeMaturity,
      one.release,
      Number(one.acres.toFixed(1)),
      one.unitsDraft,
      one.unitsProposed,
      one.unitsAgreed,
      one.unitsOnHand,
      one.unitsFree,
    ]),
  ]);
}
