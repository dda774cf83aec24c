import type { Archive } from './archive';
import { parseWholeXml } from './xml';

/** What a cell's number format says about the number in it. */
export interface CellFormat {
  isDate: boolean;
  isPercent: boolean;
  /** Digits to which leading zeros fill up ("00000" is 5), 0 without. */
  zeroFill: number;
}

export const GENERAL: CellFormat = Object.freeze({ isDate: false, isPercent: false, zeroFill: 0 });

/** Built-in formats that show a date or a time (ECMA-376 part 1, 18.8.30, with the East Asian ones). */
const isBuiltInDate = (id: number): boolean =>
  (id >= 14 && id <= 22) || (id >= 27 && id <= 36) || (id >= 45 && id <= 47) || (id >= 50 && id <= 58);

/** Reads a format code such as `yyyy-mm-dd`, `0.0%` or `00000`. */
export function readFormatCode(code: string): CellFormat {
  const bare = code
    .replace(/"[^"]*"|\\.|_.|\*./g, '')
    .replace(/\[(?!h+\]|m+\]|s+\])[^\]]*\]/gi, '')
    .split(';')[0];
  return {
    isDate: !/general/i.test(bare) && /[ymdhs]/i.test(bare),
    isPercent: bare.includes('%'),
    zeroFill: /^0+$/.test(bare) ? bare.length : 0,
  };
}

/** The formats of the workbook's cell styles, by style index. */
export async function readFormats(archive: Archive, part: string): Promise<CellFormat[]> {
  const codes = new Map<number, string>();
  const formats: CellFormat[] = [];
  let isInCellFormats = false;
  await parseWholeXml(archive.read(part), {
    open: (name, attributes) => {
      if (name === 'numFmt') codes.set(Number(attributes.numFmtId), attributes.formatCode ?? '');
      else if (name === 'cellXfs') isInCellFormats = true;
      else if (name === 'xf' && isInCellFormats) formats.push(formatOf(Number(attributes.numFmtId ?? 0), codes));
    },
    close: (name) => {
      if (name === 'cellXfs') isInCellFormats = false;
    },
  });
  return formats;
}

function formatOf(id: number, codes: Map<number, string>): CellFormat {
  const code = codes.get(id);
  if (code !== undefined) return readFormatCode(code);
  if (isBuiltInDate(id)) return { ...GENERAL, isDate: true };
  return id === 9 || id === 10 ? { ...GENERAL, isPercent: true } : GENERAL;
}
