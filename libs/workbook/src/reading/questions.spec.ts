import { Findings } from './findings';
import { Questions } from './questions';

const CHOICES = [{ label: 'Yes', answers: { date: '2026-03-02' } }];

describe('Questions', () => {
  it('ask once for each column, and add up the rows', () => {
    const findings = new Findings();
    const questions = new Questions(findings);
    questions.ask('date-missing', { sheet: 'S', row: 3, column: 1 }, 'has no date: which day is it?', 4, CHOICES);
    questions.ask('date-missing', { sheet: 'S', row: 9, column: 1 }, 'has no date: which day is it?', 6, CHOICES);
    questions.ask('date-missing', { sheet: 'S', row: 9, column: 2 }, 'has no date: which day is it?', 1, CHOICES);
    questions.ask('date-missing', { sheet: 'S', row: 9, column: 2 }, 'has no date: which day is it?', 1, []);
    expect(questions.asked.map(({ column, rows, detail }) => [column, rows, detail])).toEqual([
      ['A', 10, 'Sheet "S", cell A3 has no date: which day is it?'],
      ['B', 1, 'Sheet "S", cell B9 has no date: which day is it?'],
      ['B', 1, 'Sheet "S", cell B9 has no date: which day is it?'],
    ]);
    expect(findings.countOf('blocking')).toBe(3);
  });
});
