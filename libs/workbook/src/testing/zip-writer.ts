import { constants, crc32, deflateRawSync } from 'node:zlib';

/** A part deflated beforehand, for one too large to be held whole. */
export interface PackedData {
  packed: Buffer;
  size: number;
  sum: number;
}

export interface ZipPart {
  name: string;
  data: Buffer | string | PackedData;
  /** General purpose flags; bit 0 marks an encrypted part. */
  flags?: number;
}

/** Writes a zip archive (APPNOTE 6.3.3: local headers, central directory, end record), independent of the reader. */
export function writeZip(parts: readonly ZipPart[]): Buffer {
  const pieces: Buffer[] = [];
  const directory: Buffer[] = [];
  let offset = 0;
  for (const { name, data, flags = 0 } of parts) {
    const { packed, size, sum } = typeof data === 'string' || Buffer.isBuffer(data) ? pack(data) : data;
    const nameBytes = Buffer.from(name);
    const common = Buffer.alloc(26);
    common.writeUInt16LE(20, 0);
    common.writeUInt16LE(flags, 2);
    common.writeUInt16LE(8, 4);
    common.writeUInt16LE(0, 6);
    common.writeUInt16LE(0x5a21, 8);
    common.writeUInt32LE(sum, 10);
    common.writeUInt32LE(packed.length, 14);
    common.writeUInt32LE(size, 18);
    common.writeUInt16LE(nameBytes.length, 22);
    const tail = Buffer.alloc(14);
    tail.writeUInt32LE(offset, 10);
    pieces.push(Buffer.from([0x50, 0x4b, 3, 4]), common, nameBytes, packed);
    directory.push(Buffer.from([0x50, 0x4b, 1, 2, 20, 0]), common, tail, nameBytes);
    offset += 4 + 26 + nameBytes.length + packed.length;
  }
  const central = Buffer.concat(directory);
  const end = Buffer.alloc(22);
  end.writeUInt32LE(0x06054b50, 0);
  end.writeUInt16LE(parts.length, 8);
  end.writeUInt16LE(parts.length, 10);
  end.writeUInt32LE(central.length, 12);
  end.writeUInt32LE(offset, 16);
  return Buffer.concat([...pieces, central, end]);
}

export function pack(data: Buffer | string): PackedData {
  const raw = Buffer.isBuffer(data) ? data : Buffer.from(data);
  return { packed: deflateRawSync(raw), size: raw.length, sum: crc32(raw) };
}

/**
 * One piece over and over between a head and a tail, without ever holding it all: blocks that end in a full flush may
 * follow one another (RFC 1951, 3.2.4; zlib's Z_FULL_FLUSH). The CRC-32 is left at zero, for files that are refused
 * before it is compared.
 */
export function packRepeated(head: string, piece: string, count: number): PackedData {
  const flushed = (text: string): Buffer => deflateRawSync(text, { finishFlush: constants.Z_FULL_FLUSH });
  const size = Buffer.byteLength(head) + Buffer.byteLength(piece) * count;
  return { packed: Buffer.concat([flushed(head), ...Array<Buffer>(count).fill(flushed(piece))]), size, sum: 0 };
}
