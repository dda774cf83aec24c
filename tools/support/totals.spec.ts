interface Counts {
  passed: number;
  failed: number;
  remarks: string[];
}
const { countJest, sumCounts, totalsLine } = jest.requireActual<{
  countJest: (report: object | undefined, exitCode: number) => Counts;
  sumCounts: (counts: { passed: number; failed: number }[]) => { passed: number; failed: number };
  totalsLine: (counts: { passed: number; failed: number }) => string;
}>('./totals.mjs');

const report = (extra: object) => ({
  numPassedTests: 0,
  numFailedTests: 0,
  numPendingTests: 0,
  numTodoTests: 0,
  numRuntimeErrorTestSuites: 0,
  ...extra,
});

describe('countJest', () => {
  it('counts a run in which all went well', () => {
    expect(countJest(report({ numPassedTests: 12 }), 0)).toEqual({ passed: 12, failed: 0, remarks: [] });
  });

  it('counts failed tests, skipped ones and files that cannot run as failures', () => {
    const run = report({
      numPassedTests: 5,
      numFailedTests: 2,
      numPendingTests: 1,
      numTodoTests: 1,
      numRuntimeErrorTestSuites: 3,
    });
    expect(countJest(run, 1)).toMatchObject({ passed: 5, failed: 7 });
  });

  it('fails a run without tests', () => {
    expect(countJest(report({}), 0)).toMatchObject({ passed: 0, failed: 1, remarks: ['it has no tests'] });
    expect(countJest(report({}), 1)).toMatchObject({ failed: 1 });
  });

  it('fails a run that wrote no report', () => {
    expect(countJest(undefined, 0)).toMatchObject({ passed: 0, failed: 1 });
  });

  it('fails a run that ends badly though every test passed', () => {
    expect(countJest(report({ numPassedTests: 3 }), 1)).toMatchObject({ passed: 3, failed: 1 });
  });
});

describe('the last line', () => {
  it('is the sum over all stages', () => {
    expect(
      totalsLine(
        sumCounts([
          { passed: 1, failed: 0 },
          { passed: 40, failed: 2 },
        ]),
      ),
    ).toBe('41 passed, 2 failed');
    expect(totalsLine(sumCounts([]))).toBe('0 passed, 0 failed');
  });
});
