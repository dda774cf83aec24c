import type { WorkbookAnswers } from './intake-answers';
import { mergeAnswers } from './merge-answers';

describe('merging answers', () => {
  const before: WorkbookAnswers = {
    date: '2026-03-02',
    lots: { 'L-1': 'L1' },
    sheets: {
      Readings: {
        headerRow: 3,
        missing: ['--'],
        columns: { D: { role: 'channel_values', channelId: 7, unit: 'mm', missing: ['0'] }, A: { role: 'time' } },
      },
    },
  };

  it('keeps what the new answers do not speak of, sheet by sheet and column by column', () => {
    const more: WorkbookAnswers = {
      repeatedHour: 'second',
      lots: { 'l 2': 'L2' },
      sheets: {
        Readings: { decimalSign: ',', columns: { D: { role: 'channel_values', isDeviation: true } } },
        Night: { headerRow: null },
      },
    };
    expect(mergeAnswers(before, more)).toEqual({
      date: '2026-03-02',
      repeatedHour: 'second',
      lots: { 'L-1': 'L1', 'l 2': 'L2' },
      sheets: {
        Readings: {
          headerRow: 3,
          decimalSign: ',',
          missing: ['--'],
          columns: {
            D: { role: 'channel_values', channelId: 7, unit: 'mm', missing: ['0'], isDeviation: true },
            A: { role: 'time' },
          },
        },
        Night: { headerRow: null },
      },
    });
  });

  it('lets the new answer stand where both say something, and joins lists', () => {
    const more: WorkbookAnswers = {
      date: '2026-03-03',
      sheets: {
        Readings: { headerRow: 4, missing: ['n/a', '--'], columns: { D: { role: 'ignored', missing: ['9999'] } } },
      },
    };
    const merged = mergeAnswers(before, more);
    expect(merged.date).toBe('2026-03-03');
    expect(merged.sheets?.Readings.headerRow).toBe(4);
    expect(merged.sheets?.Readings.missing).toEqual(['--', 'n/a']);
    expect(merged.sheets?.Readings.columns?.D).toMatchObject({ role: 'ignored', missing: ['0', '9999'] });
  });

  it('merges what is said of single channels by their ids', () => {
    const of = (channels: Record<string, object>): WorkbookAnswers => ({
      sheets: { S: { columns: { E: { role: 'value', channels } } } },
    });
    const merged = mergeAnswers(of({ 1: { unit: 'mm' } }), of({ 1: { isDeviation: true }, 2: { readings: ['0'] } }));
    expect(merged).toEqual(of({ 1: { unit: 'mm', isDeviation: true }, 2: { readings: ['0'] } }));
  });

  it('changes neither of the two', () => {
    const copy = structuredClone(before);
    mergeAnswers(before, { sheets: { Readings: { columns: { D: { role: 'ignored' } } } } });
    expect(before).toEqual(copy);
  });
});
