import { outcomeHeading, placeWords } from './workbook-words';

const VIEW = { isApplied: false, problems: [], notices: [], summary: [], changes: [], changeCount: 0 };
const PROBLEM = { sheet: 'Lines', cell: 'A3', code: 'doubled', what: 'It is.', whatToDo: 'Mend it.' };

describe('what became of a set-up workbook', () => {
  it('is said in a sentence', () => {
    expect(outcomeHeading('a.xlsx', VIEW)).toBe('a.xlsx says what is there already: nothing changes.');
    expect(outcomeHeading('a.xlsx', { ...VIEW, changeCount: 1 })).toBe('a.xlsx would add or change 1 row.');
    expect(outcomeHeading('a.xlsx', { ...VIEW, changeCount: 1200, isApplied: true })).toBe(
      'a.xlsx was applied: 1,200 rows added or changed.',
    );
    expect(outcomeHeading('a.xlsx', { ...VIEW, changeCount: 3, problems: [PROBLEM] })).toBe(
      'a.xlsx cannot be applied yet: 1 problem is to be put right. Mend the cells, save it and drop it again.',
    );
  });
  it('names the cell, the sheet or the file', () => {
    expect(placeWords(PROBLEM)).toBe('Lines, A3');
    expect(placeWords({ sheet: 'Lines', cell: null })).toBe('Lines');
    expect(placeWords({ sheet: null, cell: null })).toBe('The file');
  });
});
