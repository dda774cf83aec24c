import type { ReadLimits } from '../limits';
import { WorkbookRefusedError } from '../refused';
import type { Archive } from './archive';
import { parseWholeXml } from './xml';

/** Characters of all shared texts together: they are the only part of a file that stays in memory. */
const MAX_SHARED_CHARACTERS = 64 * 1024 * 1024;

/** Undoes `_x000D_`, the way in which sheets write characters that XML cannot (ECMA-376 part 1, 22.4.2.4). */
export const decodeText = (text: string): string =>
  text.includes('_x')
    ? text.replace(/_x([0-9A-Fa-f]{4})_/g, (_, hex: string) => String.fromCharCode(parseInt(hex, 16)))
    : text;

/** @throws WorkbookRefusedError too-large */
export function assertShort(text: string, limits: ReadLimits): void {
  if (text.length <= limits.maxStringLength) return;
  throw new WorkbookRefusedError(
    'too-large',
    `A cell holds more than ${limits.maxStringLength.toLocaleString('en')} characters. Delete the long text and upload the workbook again.`,
  );
}

/** The workbook's shared texts in their order, rich text joined, phonetic hints left out. */
export async function readSharedTexts(archive: Archive, part: string, limits: ReadLimits): Promise<string[]> {
  const texts: string[] = [];
  let current = '';
  let characters = 0;
  let isText = false;
  let isPhonetic = false;
  await parseWholeXml(archive.read(part), {
    open: (name) => {
      if (name === 'si') current = '';
      else if (name === 't') isText = !isPhonetic;
      else if (name === 'rPh') isPhonetic = true;
    },
    text: (text) => {
      if (!isText) return;
      current += text;
      assertShort(current, limits);
    },
    close: (name) => {
      if (name === 't') isText = false;
      else if (name === 'rPh') isPhonetic = false;
      else if (name === 'si') {
        characters += current.length;
        texts.push(decodeText(current));
        assertRoom(texts.length, characters, limits);
      }
    },
  });
  return texts;
}

function assertRoom(count: number, characters: number, limits: ReadLimits): void {
  if (count > limits.maxCells) {
    throw new WorkbookRefusedError('too-many-cells', 'The workbook holds more texts than cells can be read. Split it.');
  }
  if (characters > MAX_SHARED_CHARACTERS) {
    throw new WorkbookRefusedError(
      'too-large',
      'The workbook holds more than 64 million characters of text. Split it.',
    );
  }
}
