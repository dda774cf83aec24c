import type { SheetRow } from '../container/sheet-rows';
import { findHeader, headerAt, weigh, type Header } from './header';
import { answersFor, type SheetAnswers } from './layout-answers';
import type { ReadingParts } from './sheet-reader';

export interface ChosenHeader extends SheetAnswers {
  header: Header | null;
}

/**
 * The header of a sheet: the row that a person said, else one whose fingerprint is remembered, else the one found; with
 * the answers that are in force for it.
 *
 * @param rows the sheet's first rows
 */
export function chooseHeader(sheet: string, rows: readonly SheetRow[], parts: ReadingParts): ChosenHeader {
  const { answers, remembered, channels } = parts;
  const said = answers.sheets?.[sheet]?.headerRow;
  const header =
    typeof said === 'number'
      ? saidHeader(sheet, rows, said, parts)
      : (rememberedHeader(rows, parts) ?? findHeader(rows, channels));
  return { header, ...answersFor(sheet, header?.fingerprint ?? null, answers, remembered) };
}

function saidHeader(
  sheet: string,
  rows: readonly SheetRow[],
  row: number,
  { channels, findings }: ReadingParts,
): Header | null {
  const index = rows.findIndex((one) => one.number === row);
  if (index < 0) {
    const say = (): string => `is said to have its header in row ${row}, which is empty; say another row`;
    findings.add('blocking', 'answers-do-not-fit', { sheet, row }, say);
    return null;
  }
  const header = headerAt(rows, index, channels);
  const next = index + 1 < rows.length ? headerAt(rows, index + 1, channels) : null;
  const isUpper = next?.lines[0].row === row && weigh(next.columns).score > weigh(header.columns).score;
  return isUpper ? next : header;
}

function rememberedHeader(rows: readonly SheetRow[], { channels, remembered }: ReadingParts): Header | null {
  if (remembered.length === 0) return null;
  const known = new Set(remembered.map((one) => one.fingerprint));
  for (let index = 0; index < rows.length; index += 1) {
    const header = headerAt(rows, index, channels);
    if (known.has(header.fingerprint)) return header;
  }
  return null;
}
