/** Which column of a table means what. Pure. */
import { numberCell } from './cells';
import { meaningOf } from './headers';
import type { Meaning } from './meanings';
import type { RawTable } from './table';

export interface SampleOptions {
  /** Header → meaning as the person chose; '' leaves the column out. Headers not named are guessed. */
  columns?: Record<string, string>;
  /** For headers that do not say. */
  bufferMethod?: string;
  phosphorusMethod?: string;
  nutrientUnit?: 'ppm' | 'lb/ac';
}

export interface MatchedColumn {
  header: string;
  index: number;
  meaning: Meaning | null;
  unit: string | null;
  samples: string[];
}

/** Several columns may hold one of these (two extractants, two buffers); the first with a value is taken. */
const SHARED = new Set<Meaning>(['phosphorusPpm', 'bufferPh']);

/** Which column means what: the person's choice, the format's own word, else the lexicon; the best name wins a meaning. */
export function matchColumns(table: RawTable, options: SampleOptions): MatchedColumn[] {
  const guesses = table.headers.map((header, index) => {
    const chosen = options.columns?.[header];
    const guess = meaningOf(header);
    if (chosen !== undefined) return { meaning: (chosen || null) as Meaning | null, unit: guess?.unit ?? null, rank: -1 };
    const own = table.meanings?.[index];
    if (own !== undefined && own !== null) return { meaning: own, unit: guess?.unit ?? null, rank: -1 };
    const plain = header.replace(/ \(\d+\)$/, '');
    return { meaning: guess?.meaning ?? meaningOf(plain)?.meaning ?? null, unit: guess?.unit ?? null, rank: guess?.rank ?? 1000 };
  });
  const empty = table.headers.map((_, index) => table.rows.every((row) => numberCell(row.cells[index] ?? '').kind === 'empty'));
  const winners = new Map<Meaning, number>();
  guesses.forEach(({ meaning, rank }, index) => {
    if (!meaning) return;
    const before = winners.get(meaning);
    if (before === undefined) winners.set(meaning, index);
    else if ((empty[before] && !empty[index]) || (rank < (guesses[before]?.rank ?? 0) && !empty[index]))
      winners.set(meaning, index);
  });
  return table.headers.map((header, index) => {
    const { meaning, unit } = guesses[index] as (typeof guesses)[number];
    const wins = meaning !== null && (winners.get(meaning) === index || SHARED.has(meaning));
    const samples = [...new Set(table.rows.slice(0, 200).map((row) => (row.cells[index] ?? '').trim()))]
      .filter(Boolean)
      .slice(0, 3);
    return { header, index, meaning: wins ? meaning : null, unit, samples };
  });
}
