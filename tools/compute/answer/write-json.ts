import { once } from 'node:events';
import type { Writable } from 'node:stream';

/** Numbers or records turned into text at a time. */
const CHUNK = 8192;

const text = (value: unknown): string =>
  typeof value === 'number' && !Number.isFinite(value) ? 'null' : JSON.stringify(value);

/**
 * Writes an object as one line of JSON, in the order of its keys, arrays piece by piece: a million rows need no text of a hundred megabytes in
 * memory. Numbers keep all their digits; those that are not finite are written as null.
 */
export async function writeJson(answer: object, output: Writable): Promise<void> {
  const put = async (piece: string): Promise<void> => {
    if (!output.write(piece)) await once(output, 'drain');
  };
  let separator = '{';
  for (const [key, value] of Object.entries(answer) as [string, unknown][]) {
    await put(`${separator}${JSON.stringify(key)}:`);
    separator = ',';
    if (value instanceof Float64Array || Array.isArray(value)) await writeArray(value, put);
    else await put(text(value));
  }
  await put('}\n');
}

async function writeArray(values: ArrayLike<unknown>, put: (piece: string) => Promise<void>): Promise<void> {
  await put('[');
  for (let from = 0; from < values.length; from += CHUNK) {
    const pieces: string[] = [];
    for (let i = from; i < Math.min(values.length, from + CHUNK); i++) pieces.push(text(values[i]));
    await put(`${from > 0 ? ',' : ''}${pieces.join(',')}`);
  }
  await put(']');
}
