import { inflateRawSync } from 'node:zlib';
import { Archive } from '../container/archive';
import { DEFAULT_LIMITS } from '../limits';
import { pack, writeZip, type PackedData, type ZipPart } from './zip-writer';

type Part = ZipPart & { data: Buffer };

/** A small good file, its parts unpacked where it is a workbook. */
export interface SeedFile {
  name: string;
  bytes: Buffer;
  parts: Part[] | null;
}

export async function seedFile(name: string, bytes: Buffer): Promise<SeedFile> {
  if (bytes.readUInt16BE(0) !== 0x504b) return { name, bytes, parts: null };
  const archive = await Archive.open(bytes, DEFAULT_LIMITS);
  const parts = await archive.packedParts();
  return {
    name,
    bytes,
    parts: parts.map(({ name: part, method, packed }) => ({
      name: part,
      data: method === 0 ? packed : inflateRawSync(packed),
    })),
  };
}

/** Draws by their seed (xorshift, Marsaglia 2003), so that each mutant can be made again. */
export class Draws {
  private state: number;

  constructor(seed: number) {
    this.state = Math.imul(seed + 1, 0x9e3779b1) >>> 0 || 1;
    for (let turn = 0; turn < 8; turn += 1) this.below(2);
  }

  below(bound: number): number {
    this.state ^= this.state << 13;
    this.state ^= this.state >>> 17;
    this.state ^= this.state << 5;
    this.state >>>= 0;
    return this.state % Math.max(1, bound);
  }

  of<T>(list: readonly T[]): T {
    return list[this.below(list.length)];
  }
}

const splice = (bytes: Buffer, at: number, removed: number, added: Buffer | string): Buffer =>
  Buffer.concat([bytes.subarray(0, at), Buffer.from(added as string), bytes.subarray(at + removed)]);

function flipBits(bytes: Buffer, draws: Draws): Buffer {
  const flipped = Buffer.from(bytes);
  for (let count = 1 + draws.below(8); count > 0; count -= 1) flipped[draws.below(bytes.length)] ^= 1 << draws.below(8);
  return flipped;
}

const cut = (bytes: Buffer, draws: Draws): Buffer => bytes.subarray(0, draws.below(bytes.length));

function repeatPiece(bytes: Buffer, draws: Draws): Buffer {
  const [from, length] = [draws.below(bytes.length), draws.below(200)];
  const piece = bytes.subarray(from, from + length);
  return splice(bytes, draws.below(bytes.length), draws.below(2) * length, piece);
}

/** What stands in the place of a number: rows and columns beyond the last, serials beyond any date, no number at all. */
const NUMBERS =
  '0 -1 1048576 1048577 4294967296 1e9 1e308 1e999 NaN Infinity 0x10 99999999999999999999 A XFE1 2958466 60 0.5 -657435'.split(
    ' ',
  );

function changeNumber(bytes: Buffer, draws: Draws): Buffer {
  const found = [...bytes.toString('latin1').matchAll(/\d+/g)];
  if (found.length === 0) return cut(bytes, draws);
  const { index, 0: digits } = draws.of(found);
  return splice(bytes, index, digits.length, draws.of(NUMBERS));
}

const ENTITIES = `<!DOCTYPE x [<!ENTITY a "${'ha'.repeat(50)}">${'bcdefgh'
  .split('')
  .map((name, at) => `<!ENTITY ${name} "${`&${'abcdefg'[at]};`.repeat(10)}">`)
  .join('')}]>`;

/** Things that no writer writes, put before a tag or into a text. */
const ODDITIES: readonly ((draws: Draws) => string)[] = [
  () => ENTITIES,
  () => '&h;',
  () => '<a>'.repeat(5_000),
  () => '</a>'.repeat(100),
  (draws) => `<c r="A1"><v>${'9'.repeat(draws.below(100_000))}</v></c>`,
  (draws) => `<c t="inlineStr"><is><t>${'long '.repeat(draws.below(20_000))}</t></is></c>`,
  (draws) => `<row r="${draws.of(NUMBERS)}" hidden="maybe"><c r="${draws.of(NUMBERS)}"/></row>`,
  () => '<row r="1048576"><c r="XFD1048576"><v>1</v></c></row>',
  (draws) =>
    `<c t="${draws.of(['s', 'd', 'b', 'e', 'str', 'n', 'inlineStr', 'zz'])}" s="${draws.of(NUMBERS)}"><v>${draws.of(NUMBERS)}</v></c>`,
  () => '<dimension ref="A1:XFD1048576"/>',
  () => '<mergeCell ref="A1:XFD1048576"/><mergeCell/><mergeCell ref="zz"/>',
  () => '<f t="shared" si="0" ref="A1:A9"/><f>A1</f>',
  () => `<x ${Array.from({ length: 3_000 }, (_, at) => `a${at}="1"`).join(' ')}/>`,
  () => '<![CDATA[ ]]> <!-- - --> <?pi ?>',
  () => '\u0000\uffff\u0001',
  () => '_x0000__xD800__x0041_',
  () => '"\n"";,\t|\r\r\n"',
  () => ';'.repeat(20_000),
  () => '\n'.repeat(20_000),
  () => '"'.repeat(4_001),
];

function addOddity(bytes: Buffer, draws: Draws): Buffer {
  const tags = [...bytes.toString('latin1').matchAll(/[<>\n]/g)].map(
    ({ index, 0: sign }) => index + Number(sign !== '<'),
  );
  const at = tags.length > 0 ? draws.of(tags) : draws.below(bytes.length);
  return splice(bytes, at, 0, draws.of(ODDITIES)(draws));
}

const OF_BYTES = [flipBits, cut, repeatPiece];
const OF_CONTENT = [flipBits, cut, repeatPiece, changeNumber, changeNumber, addOddity, addOddity];

/** Changes of a workbook's parts as a whole. */
const OF_PARTS: readonly ((parts: Part[], draws: Draws) => ZipPart[])[] = [
  (parts, draws) => parts.toSpliced(draws.below(parts.length), 1),
  (parts, draws) => [...parts, draws.of(parts)],
  (parts, draws) => [...parts, { ...draws.of(parts), data: draws.of(parts).data }],
  (parts, draws) => {
    const [one, other] = [draws.below(parts.length), draws.below(parts.length)];
    return parts
      .with(one, { ...parts[one], data: parts[other].data })
      .with(other, { ...parts[other], data: parts[one].data });
  },
  (parts, draws) => parts.with(draws.below(parts.length), { name: '../../x', data: Buffer.from('x') }),
  (parts, draws) => parts.map((part) => ({ ...part, flags: draws.below(65_536) })),
  (parts, draws) => lieAbout(parts, draws, (packed) => ({ ...packed, sum: draws.below(2 ** 31) })),
  (parts, draws) => lieAbout(parts, draws, (packed) => ({ ...packed, size: draws.below(2 ** 31) })),
  (parts, draws) => lieAbout(parts, draws, (packed) => ({ ...packed, packed: flipBits(packed.packed, draws) })),
  (parts, draws) => {
    const at = draws.below(parts.length);
    return parts.with(at, { ...parts[at], data: Buffer.from(`\ufeff${parts[at].data.toString()}`, 'utf16le') });
  },
];

function lieAbout(parts: Part[], draws: Draws, lie: (honest: PackedData) => PackedData): ZipPart[] {
  const at = draws.below(parts.length);
  return (parts as ZipPart[]).with(at, { ...parts[at], data: lie(pack(parts[at].data)) });
}

/** A changed file, the same for the same seed. */
export function mutant(seed: number, files: readonly SeedFile[]): { from: string; bytes: Buffer } {
  const draws = new Draws(seed);
  const { name, bytes, parts } = draws.of(files);
  if (parts === null) return { from: name, bytes: draws.of(OF_CONTENT)(bytes, draws) };
  const kind = draws.below(8);
  if (kind === 0) return { from: name, bytes: draws.of(OF_BYTES)(bytes, draws) };
  if (kind < 3) return { from: name, bytes: writeZip(draws.of(OF_PARTS)(parts, draws)) };
  const at = draws.below(parts.length);
  let changed = parts[at].data;
  for (let count = 1 + draws.below(3); count > 0; count -= 1) changed = draws.of(OF_CONTENT)(changed, draws);
  return { from: `${name}, ${parts[at].name}`, bytes: writeZip(parts.with(at, { ...parts[at], data: changed })) };
}
