import type { IntakeProblem, IntakeView } from '@app/contracts';
import { accountingWords, cellName, counted, groupProblems, sizeWords } from './intake-words';

const problem = (code: string, severity: IntakeProblem['severity'], row: number | null = 1): IntakeProblem => ({
  sheet: 'Readings',
  row,
  column: 'E',
  code,
  detail: '',
  severity,
});

describe('groupProblems', () => {
  it('puts the gravest first, then the most frequent, and keeps the full count', () => {
    const groups = groupProblems({
      problems: [
        problem('a', 'notice'),
        problem('b', 'row_not_used'),
        problem('c', 'blocking'),
        problem('d', 'notice'),
      ],
      problemCounts: [
        { code: 'a', severity: 'notice', count: 1 },
        { code: 'b', severity: 'row_not_used', count: 240 },
        { code: 'c', severity: 'blocking', count: 1 },
        { code: 'd', severity: 'notice', count: 7 },
      ],
    });
    expect(groups.map((group) => group.code)).toEqual(['c', 'b', 'd', 'a']);
    expect(groups[1]).toMatchObject({ count: 240, problems: [{ code: 'b' }] });
  });
});

describe('cellName', () => {
  it('names the cell, the row, the column or the sheet', () => {
    expect(cellName({ sheet: 'Readings', row: 210, column: 'E' })).toBe('Readings!E210');
    expect(cellName({ sheet: 'Readings', row: 210, column: null })).toBe('Readings, row 210');
    expect(cellName({ sheet: 'Readings', row: null, column: 'F' })).toBe('Readings, column F');
    expect(cellName({ sheet: 'Summary', row: null, column: null })).toBe('Summary');
  });
});

describe('counted', () => {
  it('groups thousands and knows one from many', () => {
    expect(counted(1, 'row')).toBe('1 row');
    expect(counted(12_240, 'row')).toBe('12,240 rows');
  });
});

describe('sizeWords', () => {
  it('uses bytes, kB and MB', () => {
    expect(sizeWords(999)).toBe('999 bytes');
    expect(sizeWords(84_213)).toBe('84\u202fkB');
    expect(sizeWords(2_310_000)).toBe('2.3\u202fMB');
  });
});

describe('the accounting of rows', () => {
  const rows = {
    rowsRead: 2240,
    rowsUsed: 2196,
    rowsAlreadyThere: 32,
    rowsSuperseding: 0,
    rowsNotUsed: 12,
    comparison: null,
  } as IntakeView;

  it('adds up before and after the readings are stored', () => {
    expect(accountingWords({ ...rows, state: 'scored' })).toBe(
      '2,240 rows read = 2,196 used + 32 already there + 12 not used',
    );
    expect(accountingWords({ ...rows, state: 'needs_attention', rowsUsed: 0, rowsAlreadyThere: 0 })).toBe(
      '2,240 rows read = 2,228 to be stored or there already + 12 not used',
    );
  });
  it('names the rows whose readings supersede stored ones, and before storing those that differ', () => {
    expect(accountingWords({ ...rows, state: 'scored', rowsUsed: 2_190, rowsSuperseding: 6 })).toBe(
      '2,240 rows read = 2,190 used + 6 superseding + 32 already there + 12 not used',
    );
    const comparison = { rowsNew: 2_190, rowsDiffering: 6, rowsAlreadyThere: 30, rowsNotUsed: 14 };
    expect(accountingWords({ ...rows, state: 'needs_attention', comparison } as IntakeView)).toBe(
      '2,240 rows read = 2,190 new + 6 with another value than stored + 30 already there + 14 not used',
    );
  });
});
