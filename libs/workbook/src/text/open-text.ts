import type { WorkbookAnswers } from '../answers';
import { assertSize } from '../container/archive';
import type { Source } from '../container/open-source';
import type { ReadLimits } from '../limits';
import { recogniseDecimalSign } from './decimal-signs';
import { decodePieces } from './encodings';
import { namedSeparator, recogniseSeparator, splitSample } from './separators';
import { TEXT_SHEET, type Encoding } from './text-facts';
import { readTextRows } from './text-rows';

const SAMPLE_CHARACTERS = 64 * 1024;

/**
 * Opens a text file (.csv, .txt, .tsv) as a workbook of one sheet whose cells are all texts. A row's number is that of
 * its record: a line break within quotes begins no new row, an empty line and a first line `sep=;` count.
 *
 * @param encoding as `recogniseEncoding` found it
 * @throws WorkbookRefusedError too-large
 */
export function openText(
  bytes: Buffer,
  encoding: Encoding,
  limits: ReadLimits,
  answers: Pick<WorkbookAnswers, 'separator' | 'encoding'>,
): Source {
  assertSize(bytes, limits);
  const how = answers.encoding ?? encoding;
  const sample = sampleOf(bytes, how);
  const named = namedSeparator(sample);
  const separator = answers.separator ?? named ?? recogniseSeparator(sample);
  const decimalSign = recogniseDecimalSign(splitSample(sample, separator));
  return {
    sheets: [{ name: TEXT_SHEET, isHidden: false }],
    dateSystem: 1900,
    text: { encoding: how, separator, decimalSign },
    rows: () => readTextRows(decodePieces(bytes, how), { separator, isFirstLeftOut: /^"?sep=./i.test(sample) }, limits),
  };
}

function sampleOf(bytes: Buffer, encoding: Encoding): string {
  let sample = '';
  for (const piece of decodePieces(bytes, encoding)) {
    sample += piece;
    if (sample.length >= SAMPLE_CHARACTERS) break;
  }
  return sample;
}
