import { crc32, createInflateRaw } from 'node:zlib';
import { fromBufferPromise, type Entry, type ZipFile } from 'yauzl';
import type { ReadLimits } from '../limits';
import { WorkbookRefusedError } from '../refused';
import { PASSWORD } from './identify';

const CHUNK = 64 * 1024;
/** Below this a part may be as compressible as it likes. */
const RATIO_COUNTS_FROM = 8 * 1024 * 1024;
const MAX_ENTRIES = 10_000;
const mebibytes = (bytes: number): string =>
  bytes < 1024 * 1024 ? 'less than 1 MB' : `${Math.round(bytes / 1024 / 1024)} MB`;

export const corrupt = (cause?: unknown): WorkbookRefusedError =>
  new WorkbookRefusedError(
    'corrupt',
    'The file is damaged: it begins like an Excel workbook but cannot be read to its end. Open it in Excel, save it under a new name and upload that.',
    { cause },
  );

/** @throws WorkbookRefusedError too-large */
export function assertSize(bytes: Buffer, limits: ReadLimits): void {
  if (bytes.length <= limits.maxBytes) return;
  throw new WorkbookRefusedError(
    'too-large',
    `The file has ${mebibytes(bytes.length)}; at most ${mebibytes(limits.maxBytes)} can be read. Split it, for example into a workbook a week.`,
  );
}

/** A zip archive in memory whose parts are inflated in pieces, each part at most once, all of them counted. */
export class Archive {
  private inflated = 0;

  private constructor(
    private readonly bytes: Buffer,
    private readonly zip: ZipFile,
    private readonly entries: Map<string, Entry>,
    private readonly limits: ReadLimits,
  ) {}

  /** @throws WorkbookRefusedError too-large, corrupt, password-protected */
  static async open(bytes: Buffer, limits: ReadLimits): Promise<Archive> {
    assertSize(bytes, limits);
    const entries = new Map<string, Entry>();
    let zip: ZipFile;
    try {
      zip = await fromBufferPromise(bytes);
      for await (const entry of zip.eachEntry()) {
        if (entries.size >= MAX_ENTRIES) throw new Error('too many entries');
        entries.set(entry.fileName.toLowerCase(), entry);
      }
    } catch (error) {
      throw corrupt(error);
    }
    if ([...entries.values()].some((entry) => entry.isEncrypted())) {
      throw new WorkbookRefusedError('password-protected', PASSWORD);
    }
    const archive = new Archive(bytes, zip, entries, limits);
    archive.assertDeclaredSizes();
    return archive;
  }

  has(name: string): boolean {
    return this.entries.has(name.toLowerCase());
  }

  names(): string[] {
    return [...this.entries.keys()];
  }

  /**
   * The part's bytes, inflated piece by piece as they are asked for.
   *
   * @throws WorkbookRefusedError corrupt (missing, broken, wrong CRC-32), decompression-bomb
   */
  async *read(name: string): AsyncGenerator<Buffer> {
    const entry = this.entries.get(name.toLowerCase());
    if (!entry) throw corrupt(new Error(`part ${name} is missing`));
    let size = 0;
    let sum = 0;
    try {
      for await (const piece of this.pieces(entry)) {
        size += piece.length;
        this.count(size, piece.length, entry);
        sum = crc32(piece, sum);
        yield piece;
      }
    } catch (error) {
      throw error instanceof WorkbookRefusedError ? error : corrupt(error);
    }
    if (sum !== entry.crc32 || size !== entry.uncompressedSize) throw corrupt(new Error(`part ${name} is damaged`));
  }

  private async packed(entry: Entry): Promise<Buffer> {
    const { fileDataStart } = await this.zip.readLocalFileHeaderPromise(entry, { minimal: true });
    return this.bytes.subarray(fileDataStart, fileDataStart + entry.compressedSize);
  }

  private async *pieces(entry: Entry): AsyncGenerator<Buffer> {
    const packed = await this.packed(entry);
    if (entry.compressionMethod === 0) {
      for (let at = 0; at < packed.length; at += CHUNK) yield packed.subarray(at, at + CHUNK);
    } else if (entry.compressionMethod === 8) {
      const inflate = createInflateRaw({ chunkSize: CHUNK });
      inflate.end(packed);
      yield* inflate as AsyncIterable<Buffer>;
    } else {
      throw new Error(`compression method ${entry.compressionMethod}`);
    }
  }

  /** All parts as they lie in the file, still compressed. */
  async packedParts(): Promise<{ name: string; method: number; packed: Buffer; size: number; sum: number }[]> {
    const parts = [];
    for (const entry of this.entries.values()) {
      const { fileName: name, compressionMethod: method, uncompressedSize: size, crc32: sum } = entry;
      parts.push({ name, method, packed: await this.packed(entry), size, sum });
    }
    return parts;
  }

  /** Turns away at once what admits its size; what lies about it is caught while inflating. */
  private assertDeclaredSizes(): void {
    let total = 0;
    for (const [name, entry] of this.entries) {
      if (!/\.(xml|rels)$/.test(name)) continue;
      total += entry.uncompressedSize;
      if (this.isBomb(entry.uncompressedSize, entry) || total > this.limits.maxInflatedBytes) throw this.bomb(total);
    }
  }

  private count(size: number, added: number, entry: Entry): void {
    this.inflated += added;
    if (this.isBomb(size, entry) || this.inflated > this.limits.maxInflatedBytes) throw this.bomb(this.inflated);
  }

  private isBomb(size: number, { compressedSize, uncompressedSize }: Entry): boolean {
    const isTooDense = size > RATIO_COUNTS_FROM && size / Math.max(1, compressedSize) > this.limits.maxCompressionRatio;
    return isTooDense || size > uncompressedSize + CHUNK;
  }

  private bomb(size: number): WorkbookRefusedError {
    return new WorkbookRefusedError(
      'decompression-bomb',
      `The file has ${mebibytes(this.bytes.length)} but unpacks to at least ${mebibytes(size)}, which no ordinary workbook does, so it is not read. Delete unused rows and columns, save it and upload it again.`,
    );
  }
}
