/** What every sub-command of `hilum` shares: its shape, its way to refuse, its options and files. */
import { readFile } from 'node:fs/promises';
import { basename } from 'node:path';
import { type ParseArgsConfig, parseArgs } from 'node:util';
import { parse } from 'csv-parse/sync';

/** Bad input: each line goes to stderr, and the command ends with exit code 2. */
export class BadInput extends Error {
  override name = 'BadInput';
  constructor(readonly lines: string[]) {
    super(lines.join('\n'));
  }
}

export function refuse(...lines: string[]): never {
  throw new BadInput(lines);
}

/** What a command answers: a value for stdout, and lines for stderr that do not stop it. */
export interface Answer {
  value: unknown;
  notes?: string[];
  /** The value is printed, but the input was bad. */
  bad?: boolean;
}

export interface Command {
  summary: string;
  /** Lines of `hilum NAME --help`. */
  usage: string;
  run(argv: string[]): Promise<Answer>;
}

export interface InputFile {
  name: string;
  bytes: Uint8Array;
}

/** Node's parser takes `--lon -93.6` for two options; joined by "=" it is one. */
function joinNegativeValues(argv: string[]): string[] {
  const joined: string[] = [];
  for (let i = 0; i < argv.length; i++) {
    const word = argv[i] as string;
    const next = argv[i + 1];
    if (word.startsWith('--') && !word.includes('=') && next !== undefined && /^-[\d.]/.test(next)) {
      joined.push(`${word}=${next}`);
      i++;
    } else joined.push(word);
  }
  return joined;
}

export interface Parsed {
  values: Record<string, string | boolean | undefined>;
  positionals: string[];
}

/** Options and files of a command line. Unknown options are refused with the list of known ones. */
export function parseOptions(argv: string[], options: NonNullable<ParseArgsConfig['options']>): Parsed {
  try {
    const { values, positionals } = parseArgs({ args: joinNegativeValues(argv), options, allowPositionals: true, strict: true });
    return { values: values as Parsed['values'], positionals };
  } catch (error) {
    const known = Object.keys(options).map((name) => `--${name}`);
    return refuse(`${(error as Error).message.split('. To specify')[0]}. Known options: ${known.join(', ')}.`);
  }
}

/** A required text option. */
export function needed(parsed: Parsed, name: string): string {
  const value = parsed.values[name];
  if (typeof value !== 'string' || value === '') return refuse(`--${name} is missing.`);
  return value;
}

export function optional(parsed: Parsed, name: string): string | null {
  const value = parsed.values[name];
  return typeof value === 'string' && value !== '' ? value : null;
}

/** A number between bounds; `null` when the option is not given. */
export function optionalNumber(parsed: Parsed, name: string, low: number, high: number): number | null {
  const text = optional(parsed, name);
  if (text === null) return null;
  const value = Number(text);
  if (!Number.isFinite(value) || value < low || value > high)
    return refuse(`--${name} must be a number from ${low} to ${high}, not "${text}".`);
  return value;
}

export function neededNumber(parsed: Parsed, name: string, low: number, high: number): number {
  return optionalNumber(parsed, name, low, high) ?? refuse(`--${name} is missing.`);
}

/** One of a list of words; `null` when the option is not given. */
export function optionalWord<Word extends string>(parsed: Parsed, name: string, words: readonly Word[]): Word | null {
  const text = optional(parsed, name);
  if (text === null) return null;
  if (!words.includes(text as Word)) return refuse(`--${name} "${text}" is not known. Known: ${words.join(', ')}.`);
  return text as Word;
}

/** A file's bytes, or a refusal that names it. */
export async function readInput(path: string): Promise<InputFile> {
  try {
    return { name: basename(path), bytes: await readFile(path) };
  } catch (error) {
    const code = (error as NodeJS.ErrnoException).code;
    const why =
      code === 'ENOENT'
        ? 'there is no such file'
        : code === 'EISDIR'
          ? 'it is a folder'
          : ((error as Error).message ?? 'unknown fault');
    return refuse(`${path} cannot be read: ${why}.`);
  }
}

export async function readText(path: string): Promise<string> {
  return new TextDecoder().decode((await readInput(path)).bytes);
}

/** Rows of a CSV as records by header, with their row numbers in the file (the header is row 1). */
export function readCsv(
  text: string,
  name: string,
): { header: string[]; rows: { row: number; cells: Record<string, string> }[] } {
  let header: string[] = [];
  try {
    const records = parse(text, {
      columns: (names: string[]) => {
        header = names.map((one) => one.trim());
        return header;
      },
      bom: true,
      trim: true,
      skip_empty_lines: true,
      relax_column_count: true,
      info: true,
    }) as unknown as { record: Record<string, string>; info: { lines: number } }[];
    return { header, rows: records.map(({ record, info }) => ({ row: info.lines, cells: record })) };
  } catch (error) {
    return refuse(`${name} is not a readable CSV: ${(error as Error).message}.`);
  }
}
