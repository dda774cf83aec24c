import { existsSync, readFileSync } from 'node:fs';

/**
 * Counts one jest run from the JSON that it wrote. A file that could not run counts as a failure, and so does a skipped
 * test, a run without tests and a run that crashed: none of them has shown anything.
 */
export function countJest(report, exitCode) {
  if (!report) return { passed: 0, failed: 1, remarks: ['it wrote no report'] };
  const skipped = (report.numPendingTests ?? 0) + (report.numTodoTests ?? 0);
  const broken = report.numRuntimeErrorTestSuites ?? 0;
  const failed = (report.numFailedTests ?? 0) + skipped + broken;
  const passed = report.numPassedTests ?? 0;
  const remarks = [
    skipped > 0 && `${skipped} skipped, counted as failed`,
    broken > 0 && `${broken} spec files could not run`,
    passed + failed === 0 && 'it has no tests',
    failed === 0 && passed > 0 && exitCode !== 0 && `every test passed, yet jest ended with code ${exitCode}`,
  ].filter(Boolean);
  const isUnexplained = failed === 0 && (passed === 0 || exitCode !== 0);
  return { passed, failed: isUnexplained ? 1 : failed, remarks };
}

export function readReport(file) {
  if (!existsSync(file)) return undefined;
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return undefined;
  }
}

/** The sum of the counts of all stages. */
export const sumCounts = (counts) =>
  counts.reduce((sum, one) => ({ passed: sum.passed + one.passed, failed: sum.failed + one.failed }), {
    passed: 0,
    failed: 0,
  });

/** The last line of `npm test`. */
export const totalsLine = ({ passed, failed }) => `${passed} passed, ${failed} failed`;
