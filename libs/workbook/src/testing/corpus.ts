import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { WorkbookAnswers } from '../answers';
import type { ChannelContext, LineContext } from '../types';
import { read, type Read } from './coater';

const FOLDER = join(__dirname, '../../../../fixtures/workbooks/corpus');
const SUFFIX = '.expected.json';

/** A reading as the script that wrote the file put it in. A sheet `*` is whatever a text file's only sheet is called. */
export interface ExpectedReading {
  sheet: string;
  row: number;
  column: string;
  lot: string;
  product: string | null;
  channel: string;
  at: string;
  value: number | null;
  censoring: 'below' | 'above' | null;
  serial?: string;
  position?: string;
}

interface Written {
  context: Omit<LineContext, 'now'> & { now: string };
  answers?: WorkbookAnswers;
  expected: {
    refused?: string;
    isBlocked?: boolean;
    layout?: 'long' | 'wide';
    rowsRead: number;
    rowsNotUsed: number;
    readings: ExpectedReading[];
    problemCodes?: Record<string, number>;
    questions?: string[];
  };
}

export interface CorpusFile {
  name: string;
  context: LineContext;
  answers: WorkbookAnswers | undefined;
  expected: Written['expected'];
  read: (answers?: WorkbookAnswers) => Promise<Read>;
}

function open(name: string): CorpusFile {
  const { context: said, answers, expected } = JSON.parse(readFileSync(join(FOLDER, name + SUFFIX), 'utf8')) as Written;
  const context = { ...said, now: Date.parse(said.now) };
  const bytes = readFileSync(join(FOLDER, name));
  return { name, context, answers, expected, read: (given) => read(bytes, context, { answers: given }) };
}

export const CORPUS: readonly CorpusFile[] = readdirSync(FOLDER)
  .filter((name) => name.endsWith(SUFFIX))
  .map((name) => open(name.slice(0, -SUFFIX.length)));

export const nameOfChannel = ({ channels }: LineContext, id: number): string | undefined =>
  channels.find((channel: ChannelContext) => channel.id === id)?.name;
