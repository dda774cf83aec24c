import { crc32, deflateRawSync } from 'node:zlib';

/** A part ready to be stored: deflated (method 8) or as it is (method 0). */
export interface PackedPart {
  name: string;
  method: number;
  packed: Buffer;
  size: number;
  sum: number;
}

export function packPart(name: string, text: string): PackedPart {
  const raw = Buffer.from(text);
  return { name, method: 8, packed: deflateRawSync(raw), size: raw.length, sum: crc32(raw) };
}

const UTF8_NAME = 0x0800;
/** 1 January 2000, 00:00, in DOS form: the same parts give the same bytes. */
const DOS_DATE = (20 << 9) | (1 << 5) | 1;

/** Writes a zip archive (APPNOTE 6.3.3): local headers with sizes, central directory, end record. */
export function writeArchive(parts: readonly PackedPart[]): Buffer {
  const local: Buffer[] = [];
  const central: Buffer[] = [];
  let offset = 0;
  for (const part of parts) {
    const name = Buffer.from(part.name);
    const facts = Buffer.alloc(26);
    facts.writeUInt16LE(20, 0);
    facts.writeUInt16LE(UTF8_NAME, 2);
    facts.writeUInt16LE(part.method, 4);
    facts.writeUInt16LE(DOS_DATE, 8);
    facts.writeUInt32LE(part.sum, 10);
    facts.writeUInt32LE(part.packed.length, 14);
    facts.writeUInt32LE(part.size, 18);
    facts.writeUInt16LE(name.length, 22);
    const place = Buffer.alloc(14);
    place.writeUInt32LE(offset, 10);
    local.push(Buffer.from([0x50, 0x4b, 3, 4]), facts, name, part.packed);
    central.push(Buffer.from([0x50, 0x4b, 1, 2, 20, 0]), facts, place, name);
    offset += 30 + name.length + part.packed.length;
  }
  const directory = Buffer.concat(central);
  const end = Buffer.alloc(22);
  end.writeUInt32LE(0x06054b50, 0);
  end.writeUInt16LE(parts.length, 8);
  end.writeUInt16LE(parts.length, 10);
  end.writeUInt32LE(directory.length, 12);
  end.writeUInt32LE(offset, 16);
  return Buffer.concat([...local, directory, end]);
}
