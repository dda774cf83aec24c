import { Readable, Writable } from 'node:stream';
import type { Answer } from '../answer/answer';
import { runCompute } from '../run-compute';

type Plain<T> = { [K in keyof T]: T[K] extends Float64Array ? (number | null)[] : T[K] };

/** The answer as JSON reads it. */
export type PlainAnswer = Plain<Answer>;

class Collected extends Writable {
  text = '';

  override _write(piece: Buffer | string, _encoding: string, done: () => void): void {
    this.text += piece.toString();
    done();
  }
}

/** Runs the command on a file's text: exit status and what it wrote. */
export async function run(args: string[], csv: string): Promise<{ code: number; stdout: string; stderr: string }> {
  const stdout = new Collected();
  const stderr = new Collected();
  const stdin = Readable.from([Buffer.from(csv)], { objectMode: false });
  const code = await runCompute(args, { stdin, stdout, stderr });
  return { code, stdout: stdout.text, stderr: stderr.text };
}

/** Fits a file's text; an error is thrown with what the command says. */
export async function fit(args: string[], csv: string): Promise<PlainAnswer> {
  const { code, stdout, stderr } = await run(['fit', ...args], csv);
  if (code !== 0) throw new Error(stderr);
  return JSON.parse(stdout) as PlainAnswer;
}

/** Columns of equal length as the text of a file. */
export function csvOf(columns: Record<string, readonly (number | string)[]>): string {
  const names = Object.keys(columns);
  const rows = columns[names[0]].map((_, i) => names.map((name) => columns[name][i]).join(','));
  return [names.join(','), ...rows, ''].join('\n');
}
