import { bad, good, type Outcome } from '@/lib/errors';
import { type Column, squeezed } from './columns';

/** Cells of a line-up file or form: read into the column's own terms, and written so that they read back. */
export type Parsed = string | number | string[] | null;

/**
 * Relative maturity as a number: `2.4`, and the early groups as the trade writes them, `00.7` → −0.3, `000.5` → −1.5
 * (MG 00.x → x/10 − 1, MG 000.x → x/10 − 2).
 */
export function parseRelativeMaturity(text: string): number | null {
  const written = text.trim();
  const early = /^(0{2,3})\.?(\d)?$/.exec(written);
  if (early) return Number((Number(early[2] ?? 0) / 10 - (early[1] === '00' ? 1 : 2)).toFixed(1));
  if (!/^-?\d{1,2}([.,]\d{1,2})?$/.test(written)) return null;
  const value = Number(written.replace(',', '.'));
  return value >= -2 && value <= 10 ? value : null;
}

/** Maturity as the trade writes it: one decimal, early groups with their zeros (−0.3 → `00.7`). Reads back as the same number. */
export function formatRelativeMaturity(value: number): string {
  const tenths = Math.round(value * 10);
  if (Math.abs(value * 10 - tenths) > 1e-6) return String(value);
  if (tenths >= 0) return (tenths / 10).toFixed(1);
  return tenths >= -10 ? `00.${tenths + 10}` : `000.${tenths + 20}`;
}

const EMPTY = new Set(['', '-', '—', '–', 'n/a', 'na', 'nr', '.']);

/** A cell as text: trimmed, without the apostrophe that keeps spreadsheets from taking it for a formula. */
function textOf(raw: string): string {
  return raw.trim().replace(/^'(?=[=+\-@])/, '');
}

/** Does a cell say nothing? */
export function isEmptyCell(raw: string): boolean {
  return EMPTY.has(textOf(raw).toLowerCase());
}

/** One cell of a file or form in the column's own terms. An empty cell is unknown (`null`, or an empty list). */
export function parseCell(column: Column, raw: string): Outcome<Parsed> {
  const text = textOf(raw);
  const empty = isEmptyCell(raw);
  switch (column.kind) {
    case 'text':
      if (empty) return good(null);
      return text.length <= (column.longest ?? 200)
        ? good(text)
        : bad(`${column.header}: at most ${(column.longest ?? 200).toLocaleString('en-US')} characters.`);
    case 'maturity': {
      const value = parseRelativeMaturity(text);
      return value === null
        ? bad(`${column.header}: "${text}" is not a maturity. Write a number like 2.4 (or 00.7).`)
        : good(value);
    }
    case 'choice': {
      if (empty) return good(null);
      const found = column.words?.find((word) => squeezed(word) === squeezed(text));
      return found ? good(found) : bad(`${column.header}: "${text}" is not known. Known are: ${column.words?.join(', ')}.`);
    }
    case 'genes': {
      if (empty || /^none$/i.test(text)) return good([]);
      const genes = text
        .split(/[;,/+&\s]+/)
        .filter(Boolean)
        .map((gene) => gene.replace(/^rps-?/i, '').toLowerCase());
      const odd = genes.find((gene) => !/^\d{1,2}[a-z]?$/.test(gene));
      return odd === undefined
        ? good(genes)
        : bad(`${column.header}: "${odd}" is not a gene. Write genes like 1k or 3a, with ; between them.`);
    }
    case 'list': {
      if (empty || /^(none|conventional)$/i.test(text)) return good([]);
      const words: string[] = [];
      for (const part of text
        .split(/[;/|+]|,(?!4)(?!\s*4)/)
        .map((one) => one.trim())
        .filter(Boolean)) {
        const found = column.words?.find((word) => squeezed(word) === squeezed(part));
        if (!found) return bad(`${column.header}: "${part}" is not known. Known are: ${column.words?.join(', ')}.`);
        if (!words.includes(found)) words.push(found);
      }
      return good(words);
    }
    default:
      return empty ? good(null) : parseNumber(column, text);
  }
}

function parseNumber(column: Column, text: string): Outcome<Parsed> {
  const value = Number(text.replace(/[%$\s]/g, '').replace(/,(?=\d{3}\b)/g, ''));
  const [low, high] = column.range ?? [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
  if (!Number.isFinite(value)) return bad(`${column.header}: "${text}" is not a number.`);
  if (value < low || value > high) {
    const best = column.kind === 'rating' ? ' (9 is best)' : '';
    return bad(`${column.header}: ${text} is outside ${low}–${high.toLocaleString('en-US')}${best}.`);
  }
  return good(value);
}

/** A value as the screen and a file write it; lists with ; between. Unknown is empty. */
export function formatCell(column: Column, value: unknown): string {
  if (value === null || value === undefined) return '';
  if (Array.isArray(value)) return value.join(';');
  if (column.kind === 'maturity') return formatRelativeMaturity(Number(value));
  return String(value);
}
