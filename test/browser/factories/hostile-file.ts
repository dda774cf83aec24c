import { readFileSync } from 'node:fs';
import { truncate, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { makeWorkbook, wrapSheets } from '../../../libs/workbook/src/testing/make-workbook';
import { packRepeated, writeZip } from '../../../libs/workbook/src/testing/zip-writer';

const FOLDER = join(__dirname, '../../../fixtures/workbooks/hostile');

export const hostileFixture = (name: string): Buffer => readFileSync(join(FOLDER, name));

/** Some 2 MB that unpack to more than 500 MB, and do not say so. */
export function bomb(): Buffer {
  const sheet = packRepeated('<worksheet><sheetData>', '<row r="1"></row>'.repeat(60_000), 500);
  return writeZip(wrapSheets([{ name: 'Readings', xml: { ...sheet, size: 1000 } }]));
}

/** 1,000 × 1,000 × 8 cells and one more, of numbers that do not pack as a bomb does. */
export function tooManyCells(): Buffer {
  const cell = (index: number): string => `<c><v>${(index * 7919) % 997}</v></c>`;
  const rows = Array.from(
    { length: 1_000 },
    (_, row) => `<row>${Array.from({ length: 8 }, (_, at) => cell(row * 8 + at)).join('')}</row>`,
  );
  const sheet = packRepeated('<worksheet><sheetData><row><c><v>1</v></c></row>', rows.join(''), 1_000);
  return writeZip(wrapSheets([{ name: 'Readings', xml: sheet }]));
}

/** A good workbook with so much nothing behind it that it is over 30 MB; on the disk, at `path`. */
export async function writeTooLarge(path: string): Promise<void> {
  await writeFile(path, makeWorkbook({ sheets: [{ name: 'Readings', rows: [['Time', 'Lot']] }] }));
  await truncate(path, 30 * 1024 * 1024 + 1);
}
