import { readFileSync } from 'node:fs';
import path from 'node:path';
import { Failure } from './failure.mjs';

const parts = (text) => text.split('.').map(Number);

function compare(a, b) {
  for (let i = 0; i < 3; i += 1) {
    const difference = (a[i] ?? 0) - (b[i] ?? 0);
    if (difference !== 0) return difference;
  }
  return 0;
}

const OPERATORS = {
  '>=': (order) => order >= 0,
  '<=': (order) => order <= 0,
  '>': (order) => order > 0,
  '<': (order) => order < 0,
};

/** Whether `version` (20.19.1) lies in `range`, a list of ">=a <b" alternatives joined by "||". */
export function isInRange(version, range) {
  return range.split('||').some((alternative) =>
    alternative
      .trim()
      .split(/\s+/)
      .every((condition) => {
        const match = /^(>=|<=|>|<)(\d+(?:\.\d+)*)$/.exec(condition);
        if (!match) throw new Error(`Cannot read the Node range "${range}".`);
        return OPERATORS[match[1]](compare(parts(version), parts(match[2])));
      }),
  );
}

/** Stops with a sentence when this Node is not one that package.json names. */
export function checkNode(root, version = process.versions.node) {
  const { engines } = JSON.parse(readFileSync(path.join(root, 'package.json'), 'utf8'));
  if (isInRange(version, engines.node)) return;
  throw new Failure(
    `Ebbline needs Node ${engines.node.replace('||', 'or')}; this is Node ${version}. Install Node 20 LTS and start again.`,
  );
}
