import type { Readable, Writable } from 'node:stream';
import { BaselineError } from '@app/baseline';
import { answerFit } from './answer/answer-fit';
import { writeJson } from './answer/write-json';
import { explainRefusal } from './explain-refusal';
import { HELP } from './help';
import { InputError } from './input-error';
import { parseOptions } from './options/parse-options';
import { readSeries } from './series/read-series';

export interface Streams {
  stdin: Readable & { isTTY?: boolean };
  stdout: Writable;
  stderr: Writable;
}

/** Exit status: the answer is written; something unexpected; the input cannot be computed. */
const DONE = 0;
const UNEXPECTED = 1;
const BAD_INPUT = 2;

/** Runs the command and answers with its exit status; nothing is written to stdout unless all of it is known. */
export async function runCompute(args: readonly string[], { stdin, stdout, stderr }: Streams): Promise<number> {
  try {
    const request = parseOptions(args);
    if (request.command === 'help') {
      stdout.write(HELP);
      return DONE;
    }
    if (stdin.isTTY) throw new InputError('there is no series on standard input: … fit < series.csv');
    await writeJson(answerFit(await readSeries(stdin), request.options), stdout);
    return DONE;
  } catch (error) {
    if (error instanceof InputError || error instanceof BaselineError) {
      stderr.write(`compute: ${error instanceof BaselineError ? explainRefusal(error) : error.message}\n`);
      return BAD_INPUT;
    }
    stderr.write(
      `compute: unexpected failure: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`,
    );
    return UNEXPECTED;
  }
}
