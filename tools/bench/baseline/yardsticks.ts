import { execFileSync } from 'node:child_process';
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Observations } from '@app/baseline';

/** Largest series that R with a knot at every point, and SciPy, are asked for: they take long, and answer wrongly anyway. */
export const SLOW_LIMIT = 100_000;

export interface YardstickRoute {
  seconds: number[];
  edf?: number;
  fitted: Float64Array;
}

export interface Yardstick {
  name: string;
  /** @returns what it measured; undefined where it is not installed */
  run(series: Observations, lambda: number, repeats: number): Map<string, YardstickRoute> | undefined;
  /** Name and version, once it has run. */
  program?: string;
}

const PROBE = 'from scipy.interpolate import make_smoothing_spline';

/** The programs that can be asked here, and the names of those that are missing. */
export function findYardsticks(scripts: string, folder: string): { found: Yardstick[]; missing: string[] } {
  const found: Yardstick[] = [];
  const missing: string[] = [];
  if (answers('Rscript', ['--version'])) found.push(yardstick('R', 'Rscript', join(scripts, 'yardstick.R'), folder));
  else missing.push('Rscript');
  const python = ['/usr/bin/python3', 'python3'].find((command) => answers(command, ['-c', PROBE]));
  if (python) found.push(yardstick('SciPy', python, join(scripts, 'yardstick.py'), folder));
  else missing.push('python3 with SciPy 1.10 or newer');
  return { found, missing };
}

function answers(command: string, args: string[]): boolean {
  try {
    execFileSync(command, args, { stdio: 'ignore' });
    return true;
  } catch {
    return false;
  }
}

function yardstick(name: string, command: string, script: string, folder: string): Yardstick {
  return {
    name,
    run(series, lambda, repeats) {
      const n = series.t.length;
      if (name === 'SciPy' && n > SLOW_LIMIT) return undefined;
      writeFileSync(join(folder, 'series.bin'), bytesOf([series.t, series.y, series.weight]));
      const args = [script, folder, String(n), String(lambda), String(repeats)];
      if (name === 'R' && n <= SLOW_LIMIT) args.push('all-knots');
      const answer = JSON.parse(
        execFileSync(command, args, { encoding: 'utf8', stdio: ['ignore', 'pipe', 'inherit'] }),
      ) as { program: string; routes: Record<string, { seconds: number[]; edf?: number }> };
      this.program = answer.program;
      return new Map(
        Object.entries(answer.routes).map(([route, figures]) => [
          route,
          { ...figures, fitted: doublesOf(readFileSync(join(folder, `${route}.bin`))) },
        ]),
      );
    },
  };
}

const bytesOf = (arrays: Float64Array[]) =>
  Buffer.concat(arrays.map((array) => Buffer.from(array.buffer, array.byteOffset, array.byteLength)));

const doublesOf = (bytes: Buffer) =>
  new Float64Array(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength));
