import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';

const MOST_FAILURES = 20;
const LINES_EACH = 30;
// Colours in a terminal's codes, which jest writes into its messages.
const COLOURS = new RegExp(`${String.fromCharCode(27)}\\[[0-9;]*m`, 'g');

/** Frames outside our own code and the same error told again as its own cause say nothing more. */
const isTelling = (line) => !/^\s+at .*(node_modules|node:internal|<anonymous>)/.test(line);

const clip = (text, lines) =>
  text
    .replaceAll(COLOURS, '')
    .split(/^\[cause\]/m)[0]
    .split('\n')
    .filter(isTelling)
    .slice(0, lines)
    .join('\n')
    .trimEnd();

/** The failed tests of a jest report, each with the start of its message; an empty text when none failed. */
export function describeJestFailures(report) {
  const files = report?.testResults ?? [];
  const failures = files.flatMap((file) => {
    const tests = file.assertionResults.filter((test) => test.status === 'failed');
    const where = path.relative(process.cwd(), file.name);
    if (tests.length === 0 && file.status === 'failed') return [`${where}\n${clip(file.message, LINES_EACH)}`];
    return tests.map((test) => `${where}: ${test.fullName}\n${clip(test.failureMessages.join('\n'), LINES_EACH)}`);
  });
  const more = failures.length - MOST_FAILURES;
  const shown = failures.slice(0, MOST_FAILURES);
  return [...shown, ...(more > 0 ? [`and ${more} more`] : [])].join('\n\n');
}

/** The end of a stage's log. */
export function lastLines(log, lines = 80) {
  if (!log || !existsSync(log)) return '';
  return readFileSync(log, 'utf8').trimEnd().split('\n').slice(-lines).join('\n');
}
