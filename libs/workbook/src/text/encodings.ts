import { isUtf8 } from 'node:buffer';
import type { Encoding } from './text-facts';

const CHUNK = 64 * 1024;
/** Bytes at the beginning in which NULs tell UTF-16 without a mark. */
const LOOKED_AT = 4 * 1024;
/** Of the bytes on one side of each pair: ASCII texts have nearly all of them 0, binary files do not. */
const MOSTLY = 0.7;
const SELDOM = 0.02;

/**
 * The encoding of a text file: by its byte order mark, by where NUL bytes stand, by being valid UTF-8, otherwise
 * Windows-1252.
 *
 * @returns null when the bytes are no text
 */
export function recogniseEncoding(bytes: Buffer): Encoding | null {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return 'utf-16le';
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return 'utf-16be';
  const head = bytes.subarray(0, LOOKED_AT);
  if (head.includes(0)) return wideEncoding(head);
  if (hasControls(head)) return null;
  return isUtf8(bytes) ? 'utf-8' : 'windows-1252';
}

function wideEncoding(head: Buffer): Encoding | null {
  const nuls = [0, 0];
  for (let at = 0; at < head.length; at += 1) if (head[at] === 0) nuls[at % 2] += 1;
  const [even, odd] = nuls.map((count) => (2 * count) / head.length);
  if (odd > MOSTLY && even < SELDOM) return 'utf-16le';
  return even > MOSTLY && odd < SELDOM ? 'utf-16be' : null;
}

/** Control characters other than tabs, line ends, form feeds and the old end-of-file mark. */
const hasControls = (head: Buffer): boolean =>
  head.some((byte) => byte < 0x20 && byte !== 9 && byte !== 10 && byte !== 12 && byte !== 13 && byte !== 0x1a);

/** Windows-1252 from 0x80 to 0x9f (its five free places as they are): some versions of Node decode it as Latin-1. */
const BEYOND_LATIN = '€\u0081‚ƒ„…†‡ˆ‰Š‹Œ\u008dŽ\u008f\u0090‘’“”•–—˜™š›œ\u009džŸ';
const asWindows = (text: string): string =>
  text.replace(/[\u0080-\u009f]/g, (character) => BEYOND_LATIN[character.charCodeAt(0) - 0x80]);

/** The file's characters in pieces, without its mark; bytes that make none become U+FFFD. */
export function* decodePieces(bytes: Buffer, encoding: Encoding): Generator<string> {
  const decoder = new TextDecoder(encoding);
  for (let at = 0; at < bytes.length; at += CHUNK) {
    const text = decoder.decode(bytes.subarray(at, at + CHUNK), { stream: at + CHUNK < bytes.length });
    yield encoding === 'windows-1252' ? asWindows(text) : text;
  }
}
