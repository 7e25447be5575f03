import { deflateRawSync } from 'node:zlib';

/** Files in a zip archive (deflated, UTF-8 names), dated 1 January 1980 so that the same plan makes the same bytes. */
export function zipOf(files: readonly { name: string; bytes: Uint8Array }[]): Uint8Array {
  const parts: Buffer[] = [];
  const directory: Buffer[] = [];
  let offset = 0;
  for (const { name, bytes } of files) {
    const packed = deflateRawSync(bytes);
    const nameBytes = Buffer.from(name, 'utf8');
    // Version 2.0, UTF-8 names, deflate, then time, date, CRC-32 and the two sizes (PKWARE APPNOTE 4.3.7).
    const common = Buffer.alloc(26);
    common.writeUInt16LE(20, 0);
    common.writeUInt16LE(0x0800, 2);
    common.writeUInt16LE(8, 4);
    common.writeUInt16LE(0, 6);
    common.writeUInt16LE(0x21, 8);
    common.writeUInt32LE(crc32(bytes), 10);
    common.writeUInt32LE(packed.length, 14);
    common.writeUInt32LE(bytes.length, 18);
    common.writeUInt16LE(nameBytes.length, 22);
    common.writeUInt16LE(0, 24);
    parts.push(signature(0x04034b50), common, nameBytes, packed);
    const rest = Buffer.alloc(14);
    rest.writeUInt32LE(offset, 10);
    directory.push(signature(0x02014b50), Buffer.from([20, 0]), common, rest, nameBytes);
    offset += 4 + common.length + nameBytes.length + packed.length;
  }
  const directoryBytes = Buffer.concat(directory);
  const end = Buffer.alloc(18);
  end.writeUInt16LE(files.length, 4);
  end.writeUInt16LE(files.length, 6);
  end.writeUInt32LE(directoryBytes.length, 8);
  end.writeUInt32LE(offset, 12);
  return Buffer.concat([...parts, directoryBytes, signature(0x06054b50), end]);
}

function signature(value: number): Buffer {
  const bytes = Buffer.alloc(4);
  bytes.writeUInt32LE(value);
  return bytes;
}

const CRC_TABLE = Uint32Array.from({ length: 256 }, (_, byte) => {
  let value = byte;
  for (let bit = 0; bit < 8; bit++) value = value & 1 ? 0xedb88320 ^ (value >>> 1) : value >>> 1;
  return value;
});

/** CRC-32 as zip archives use it (IEEE 802.3, reflected). */
function crc32(bytes: Uint8Array): number {
  let crc = 0xffffffff;
  for (const byte of bytes) crc = (CRC_TABLE[(crc ^ byte) & 0xff] as number) ^ (crc >>> 8);
  return (crc ^ 0xffffffff) >>> 0;
}
