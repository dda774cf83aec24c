import { Findings } from './findings';

describe('Findings', () => {
  it('counts everything and lists a thousand, and what blocks in any case', () => {
    const findings = new Findings();
    for (let row = 1; row <= 1_500; row += 1)
      findings.add('row_not_used', 'lot-missing', { sheet: 'S', row, column: 2 }, () => 'names no lot');
    findings.add('blocking', 'no-readings', { sheet: 'S' }, () => 'gives nothing');
    expect(findings.problems).toHaveLength(1_000);
    expect(findings.problems.at(-1)).toMatchObject({
      code: 'no-readings',
      row: null,
      column: null,
      detail: 'Sheet "S" gives nothing.',
    });
    expect(findings.problems[998]).toMatchObject({
      row: 999,
      column: 'B',
      detail: 'Sheet "S", cell B999 names no lot.',
    });
    expect(findings.list()).toEqual([
      { code: 'no-readings', severity: 'blocking', count: 1, firstSheet: 'S', firstRow: null },
      { code: 'lot-missing', severity: 'row_not_used', count: 1_500, firstSheet: 'S', firstRow: 1 },
    ]);
  });
  it('lists a hundred notices of one code', () => {
    const findings = new Findings();
    for (let row = 1; row <= 300; row += 1)
      findings.add('notice', 'value-missing', { sheet: 'S', row }, () => 'has no value');
    expect([findings.problems.length, findings.list()[0].count]).toEqual([100, 300]);
  });
});
