import { TextDecoder } from 'node:util';
import { SaxesParser } from 'saxes';
import { WorkbookRefusedError } from '../refused';
import { corrupt } from './archive';

export type Attributes = Record<string, string>;

export interface XmlHandlers {
  /** Local name, without the namespace's prefix. */
  open?: (name: string, attributes: Attributes) => void;
  close?: (name: string) => void;
  text?: (text: string) => void;
}

/** The deepest part of a workbook that is read (a rich text in a sheet) is 7 deep. */
const MAX_DEPTH = 64;
/**
 * Characters without a tag. Excel's longest text, every character written as a long entity, is 0.3 million; above the
 * size from which the compression ratio counts, so that a bomb is called one.
 */
const MAX_QUIET = 10 * 1024 * 1024;

const localName = (name: string): string => {
  const colon = name.indexOf(':');
  return colon < 0 ? name : name.slice(colon + 1);
};

/** UTF-8, or UTF-16 by its mark or by the `<` without one (XML 1.0, appendix F). */
function encodingOf([first, second]: Buffer): string {
  if ((first === 0xff && second === 0xfe) || (first === 0x3c && second === 0)) return 'utf-16le';
  return (first === 0xfe && second === 0xff) || (first === 0 && second === 0x3c) ? 'utf-16be' : 'utf-8';
}

/**
 * Parses XML piece by piece; after each piece the generator stops, so that the caller may take what has come.
 * Entities other than XML's own five are errors, nesting and the length of one text are bounded.
 *
 * @throws WorkbookRefusedError corrupt, or whatever the pieces or handlers throw of that class
 */
export async function* parseXml(pieces: AsyncIterable<Buffer>, handlers: XmlHandlers): AsyncGenerator<void> {
  const parser = new SaxesParser<{ xmlns: false; position: false }>({ xmlns: false, position: false });
  let depth = 0;
  let quiet = 0;
  parser.on('opentag', (tag) => {
    quiet = 0;
    depth += 1;
    if (depth > MAX_DEPTH) throw corrupt(new Error('nested too deep'));
    handlers.open?.(localName(tag.name), tag.attributes);
  });
  parser.on('closetag', (tag) => {
    depth -= 1;
    handlers.close?.(localName(tag.name));
  });
  if (handlers.text) parser.on('text', handlers.text);
  if (handlers.text) parser.on('cdata', handlers.text);
  let decoder: TextDecoder | undefined;
  try {
    for await (const piece of pieces) {
      decoder ??= new TextDecoder(encodingOf(piece), { fatal: true });
      const text = decoder.decode(piece, { stream: true });
      quiet += text.length;
      if (quiet > MAX_QUIET + piece.length) throw corrupt(new Error('text without end'));
      parser.write(text);
      yield;
    }
    if (decoder) parser.write(decoder.decode());
    parser.close();
  } catch (error) {
    throw error instanceof WorkbookRefusedError ? error : corrupt(error);
  }
  yield;
}

/** Parses a small part to its end. */
export async function parseWholeXml(pieces: AsyncIterable<Buffer>, handlers: XmlHandlers): Promise<void> {
  for await (const _ of parseXml(pieces, handlers));
}

/** XML's two ways to write a true flag. */
export const isTrue = (attribute: string | undefined): boolean => attribute === '1' || attribute === 'true';
