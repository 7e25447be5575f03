import { parseDbf } from 'shpjs';

/** Most characters that one row of a dBASE table can have (its fields hold at most 255 each, 255 fields). */
const LONGEST_ROW = 65_000;

/**
 * Rows of a .dbf file (dBASE III). The header's count of rows is what a parser trusts, so it is held to the bytes that are there
 * first; `null` when the header makes no table at all.
 */
export function dbfRows(file: Uint8Array, encoding?: string): Record<string, unknown>[] | null {
  if (file.byteLength < 65) return null;
  const header = new DataView(file.buffer, file.byteOffset, file.byteLength);
  const [rows, headerLength, rowLength] = [header.getUint32(4, true), header.getUint16(8, true), header.getUint16(10, true)];
  if (rowLength < 2 || rowLength > LONGEST_ROW || headerLength < 65 || headerLength >= file.byteLength) return null;
  const whole = Math.min(rows, Math.floor((file.byteLength - headerLength) / rowLength));
  // A Buffer's slice shares its memory with the pool; this is a copy of its own.
  const copy = new Uint8Array(file);
  new DataView(copy.buffer).setUint32(4, whole, true);
  try {
    return parseDbf(new DataView(copy.buffer), encoding);
  } catch {
    return null;
  }
}
