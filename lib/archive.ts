import { type Entry, fromBuffer, type ZipFile } from 'yauzl';
import { bad, good, type Outcome } from './errors';

/** A file of an upload, or out of an archive. */
export interface NamedBytes {
  name: string;
  bytes: Uint8Array;
}

export interface ArchiveLimits {
  entries: number;
  /** Total size after unpacking. */
  unpackedBytes: number;
  /** Unpacked ÷ packed of one entry, over 1 MB. */
  ratio: number;
}

export const ARCHIVE_LIMITS: ArchiveLimits = { entries: 2000, unpackedBytes: 1_500_000_000, ratio: 200 };

const megabytes = (bytes: number) => `${Math.round(bytes / 1_000_000).toLocaleString('en-US')} MB`;

/** Does this look like a zip archive? */
export function isZip(bytes: Uint8Array): boolean {
  return (
    bytes.length >= 4 &&
    bytes[0] === 0x50 &&
    bytes[1] === 0x4b &&
    (bytes[2] === 3 || bytes[2] === 5) &&
    (bytes[3] === 4 || bytes[3] === 6)
  );
}

/**
 * Unpacks a zip archive within limits, which are checked on the archive's own list before anything is unpacked and again
 * while unpacking. Refuses truncated and encrypted archives and paths that climb out; leaves out folders and the
 * operating system's own droppings. `wanted` chooses which entries are unpacked.
 */
export async function unpack(
  archive: NamedBytes,
  wanted: (name: string) => boolean = () => true,
  limits: ArchiveLimits = ARCHIVE_LIMITS,
): Promise<Outcome<NamedBytes[]>> {
  const { name } = archive;
  if (!isZip(archive.bytes))
    return bad(`"${name}" is not a zip archive. Nothing was kept. Export again as a zipped file and choose that.`);
  let zip: ZipFile;
  try {
    zip = await open(archive.bytes);
  } catch {
    return bad(`"${name}" is cut short or damaged: its list of files cannot be read. Nothing was kept. Export or copy it again.`);
  }
  try {
    const entries = await list(zip, limits);
    const refusal = refusalOf(name, entries, limits);
    if (refusal) return bad(refusal);
    const chosen = entries.filter((entry) => !isDropping(entry.fileName) && wanted(entry.fileName));
    const files: NamedBytes[] = [];
    for (const entry of chosen) files.push({ name: entry.fileName, bytes: await read(zip, entry) });
    return good(files);
  } catch (error) {
    const words = error instanceof Error ? error.message.slice(0, 120) : 'unknown fault';
    return bad(`"${name}" is damaged (${words}). Nothing was kept. Export or copy it again.`);
  } finally {
    zip.close();
  }
}

function isDropping(path: string): boolean {
  return path.endsWith('/') || path.includes('__MACOSX') || /(^|\/)\./.test(path);
}

function refusalOf(name: string, entries: Entry[], limits: ArchiveLimits): string | null {
  if (entries.length === 0) return `"${name}" is an empty archive. Nothing was kept.`;
  if (entries.length > limits.entries)
    return `"${name}" holds more than ${limits.entries.toLocaleString('en-US')} files. Nothing was kept. Zip only the layers you need.`;
  const total = entries.reduce((sum, entry) => sum + entry.uncompressedSize, 0);
  if (total > limits.unpackedBytes) {
    return `"${name}" unpacks to ${megabytes(total)}; the limit is ${megabytes(limits.unpackedBytes)}. Nothing was kept. Split it.`;
  }
  const bomb = entries.find(
    (entry) => entry.uncompressedSize > 1_000_000 && entry.uncompressedSize > limits.ratio * Math.max(1, entry.compressedSize),
  );
  if (bomb) {
    return `"${bomb.fileName}" in "${name}" unpacks to more than ${limits.ratio} times its size (${megabytes(bomb.uncompressedSize)}), which no boundary or soil file does. Nothing was kept.`;
  }
  if (entries.some((entry) => entry.isEncrypted()))
    return `"${name}" is locked with a password. Nothing was kept. Zip it without one.`;
  const seen = new Set<string>();
  for (const entry of entries) {
    if (seen.has(entry.fileName)) return `"${name}" holds "${entry.fileName}" twice. Nothing was kept. Zip it again.`;
    seen.add(entry.fileName);
  }
  return null;
}

function open(bytes: Uint8Array): Promise<ZipFile> {
  return new Promise((resolve, reject) => {
    // decodeStrings also refuses absolute paths and paths with "..".
    fromBuffer(
      Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength),
      { lazyEntries: true, validateEntrySizes: true },
      (error, zip) => (error || !zip ? reject(error) : resolve(zip)),
    );
  });
}

function list(zip: ZipFile, limits: ArchiveLimits): Promise<Entry[]> {
  return new Promise((resolve, reject) => {
    const entries: Entry[] = [];
    zip.on('entry', (entry: Entry) => {
      entries.push(entry);
      if (entries.length > limits.entries) resolve(entries);
      else zip.readEntry();
    });
    zip.on('end', () => resolve(entries));
    zip.on('error', reject);
    zip.readEntry();
  });
}

function read(zip: ZipFile, entry: Entry): Promise<Uint8Array> {
  return new Promise((resolve, reject) => {
    zip.openReadStream(entry, (error, stream) => {
      if (error || !stream) return reject(error ?? new Error('no data'));
      const parts: Buffer[] = [];
      stream.on('data', (part: Buffer) => parts.push(part));
      stream.on('end', () => resolve(Buffer.concat(parts)));
      stream.on('error', reject);
    });
  });
}
