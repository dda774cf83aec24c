import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { COATER, problemList, read, readBook, readRows } from './testing/coater';
import type { ParsedReading } from './types';

const FOLDER = join(__dirname, '../../../fixtures/workbooks/hostile');
const fixture = (name: string) => read(readFileSync(join(FOLDER, name)));
/** Excel's serial of 5 January 2026, from 2026-01-05 being 20,458 days after 1970-01-01 (serial 25569). */
const DAY = 46027;
const at = (clock: string): { date: number } => {
  const [hours, minutes] = clock.split(':').map(Number);
  return { date: DAY + (hours * 60 + minutes) / 1440 };
};
const HEADER = ['Time', 'Lot', 'Product', 'Characteristic', 'Value'];
const values = (readings: ParsedReading[]) => readings.map(({ channelId, value }) => [channelId, value]);

describe('the long layout', () => {
  it('gives a reading a row', async () => {
    const { report, readings } = await fixture('good-long.xlsx');
    expect(report).toMatchObject({
      layout: 'long',
      rowsRead: 24,
      rowsNotUsed: 0,
      readingsParsed: 24,
      isBlocked: false,
    });
    expect(report.problems).toEqual([]);
    expect(readings[0]).toEqual({
      sheet: 'Readings',
      row: 2,
      column: 'E',
      lot: '24101',
      product: 'SEP-12',
      quantity: null,
      quantityUnit: null,
      channelId: 11,
      at: Date.parse('2026-01-05T06:00:00+01:00'),
      value: 12.1,
      censoring: null,
      serial: 'P1',
      position: null,
    });
    expect(report.lots).toEqual([
      {
        number: '24101',
        product: 'SEP-12',
        readings: 12,
        firstAt: Date.parse('2026-01-05T05:00Z'),
        lastAt: Date.parse('2026-01-05T05:30Z'),
      },
      {
        number: '24102',
        product: 'SEP-12',
        readings: 12,
        firstAt: Date.parse('2026-01-05T05:40Z'),
        lastAt: Date.parse('2026-01-05T06:10Z'),
      },
    ]);
    expect(report.channels).toEqual([11, 12, 13].map((channelId) => ({ channelId, readings: 8 })));
    expect(report.firstRows).toEqual(readings.slice(0, 12));
  });
  it('reads the same from the 1904 date system and below title rows', async () => {
    const plain = await fixture('good-long.xlsx');
    const from1904 = await fixture('dates-1904.xlsx');
    const titled = await fixture('header-in-row-12.xlsx');
    expect([plain.report.dateSystem, from1904.report.dateSystem]).toEqual([1900, 1904]);
    expect(from1904.readings).toEqual(plain.readings);
    expect(titled.report.sheets).toEqual([{ name: 'Coater 2', headerRow: 12, rows: 24 }]);
    expect(titled.readings.map(({ at: instant }) => instant)).toEqual(plain.readings.map(({ at: instant }) => instant));
  });
  it('finds a channel by characteristic, by gauge, or by both', async () => {
    const shared = { ...COATER, channels: COATER.channels.map((one) => ({ ...one, aliases: ['BG-201'] })) };
    const rows = [
      ['Time', 'Lot', 'Gauge', 'Characteristic', 'Value'],
      [at('6:00'), 1, 'BG-201', 'coat WEIGHT', 1],
      [at('6:01'), 1, 'BG-201', null, 2],
      [at('6:02'), 1, 'unheard-of', 'Web thickness', 3],
      [at('6:03'), 1, null, 'Gloss', 4],
      [at('6:04'), 1, null, null, 5],
    ];
    const result = await readBook({ sheets: [{ name: 'S', rows }] }, shared);
    expect(values(result.readings)).toEqual([
      [11, 1],
      [12, 3],
    ]);
    expect(problemList(result)).toEqual([
      'notice no-product-column 1',
      'row_not_used channel-ambiguous C3',
      'notice unknown-gauge C4',
      'row_not_used unknown-channel D5',
      'row_not_used channel-missing C6',
    ]);
  });
  it('takes the channel from the sheet’s name where no column names it', async () => {
    const rows = [
      ['Timestamp', 'Lot', 'Product', 'Reading 1', 'Reading 2'],
      [at('6:00'), 'A', 'SEP-12', 12.1, 12.2],
    ];
    const named = await readRows(rows, 'BG-201');
    expect(named.readings.map(({ column, value }) => [column, value])).toEqual([
      ['D', 12.1],
      ['E', 12.2],
    ]);
    const unnamed = await readRows(rows, 'Sheet1');
    expect(unnamed.report).toMatchObject({ isBlocked: true, rowsRead: 1, rowsNotUsed: 1 });
    expect(problemList(unnamed)[0]).toBe('blocking no-channel-column 1');
  });
  it('reads serial, position and quantity', async () => {
    const { readings } = await readRows([
      ['Zeit', 'Charge', 'Artikel', 'Merkmal', 'Messwert', 'Seriennummer', 'Position', 'Menge [m]'],
      [at('6:00'), 'A', 'SEP-16', 'CW', 12.1, 17, 'left', '1.200,5'],
    ]);
    expect(readings[0]).toMatchObject({
      serial: '17',
      position: 'left',
      quantity: 1200.5,
      quantityUnit: 'm',
      product: 'SEP-16',
    });
  });
  it('converts the rows whose unit column names another unit of the quantity, and refuses those of another', async () => {
    const result = await readRows([
      [...HEADER, 'Unit'],
      [at('6:00'), 'A', 'SEP-12', 'Web thickness', 16, 'um'],
      [at('6:01'), 'A', 'SEP-12', 'Web thickness', 0.6, 'mil'],
      [at('6:02'), 'A', 'SEP-12', 'Web thickness', 16, 'g'],
      [at('6:03'), 'A', 'SEP-12', 'Web thickness', 16, 'scale marks'],
    ]);
    expect(values(result.readings)).toEqual([
      [12, 16],
      [12, 15.24],
    ]);
    expect(problemList(result)).toEqual([
      'notice unit-converted E',
      'row_not_used unit-differs E4',
      'row_not_used unit-differs E5',
    ]);
    expect(result.report.problems[1].detail).toContain(
      'is in g, but the channel "Web thickness" is in µm, a unit of another quantity',
    );
  });
});

describe('the wide layout', () => {
  it('gives a reading a filled cell, from German headers and a date beside a time', async () => {
    const { report, readings } = await fixture('good-wide.xlsx');
    expect(report).toMatchObject({ layout: 'wide', rowsRead: 8, rowsNotUsed: 0, readingsParsed: 24, problems: [] });
    expect(report.columns.map(({ column, role, channelId, unit }) => [column, role, channelId, unit])).toEqual([
      ['A', 'date', null, null],
      ['B', 'time_of_day', null, null],
      ['C', 'lot', null, null],
      ['D', 'product', null, null],
      ['E', 'channel_values', 11, 'g/m²'],
      ['F', 'channel_values', 12, 'µm'],
      ['G', 'channel_values', 13, '°C'],
    ]);
    expect(readings[4]).toMatchObject({
      row: 3,
      column: 'F',
      channelId: 12,
      value: 16.4,
      at: Date.parse('2026-01-05T06:10:00+01:00'),
    });
  });
  it('converts from the unit that the header states, and says so', async () => {
    const result = await readRows([
      ['Time', 'Lot', 'Product', 'Coat weight [g/m2]', 'Web thickness [mil]'],
      [at('6:00'), 'A', 'SEP-12', 12, 0.6],
    ]);
    expect(problemList(result)).toEqual(['notice unit-converted E']);
    // 1 mil is 25.4 µm.
    expect(values(result.readings)).toEqual([
      [11, 12],
      [12, 15.24],
    ]);
  });
  it('stops at one channel in two columns', async () => {
    const result = await readRows([
      ['Time', 'Lot', 'Product', 'Coat weight', 'BG-201'],
      [at('6:00'), 'A', 'SEP-12', 12, 13],
    ]);
    expect(problemList(result)).toEqual(['blocking channel-in-two-columns E1']);
  });
  it('takes units from a row of their own', async () => {
    const result = await readRows([
      ['Time', 'Lot', 'Product', 'Coat weight', 'Web thickness'],
      [null, null, null, 'g/m²', '[mil]'],
      [at('6:00'), 'A', 'SEP-12', 12, 0.6],
    ]);
    expect(problemList(result)).toEqual(['notice unit-converted E']);
    expect(result.report.rowsRead).toBe(1);
  });
});

describe('a messy workbook', () => {
  it('is read as far as it goes, and every row and cell left out is named', async () => {
    const result = await fixture('messy.xlsx');
    // Counted by hand in fixtures/workbooks/make-hostile.mjs.
    expect(result.report).toMatchObject({ rowsRead: 17, rowsNotUsed: 9, readingsParsed: 14, isBlocked: true });
    expect(problemList(result)).toEqual([
      'notice column-not-used G3',
      'notice number-stored-as-text F5',
      'cell_not_used ambiguous-number E6',
      'notice value-missing E7',
      'notice value-missing F7',
      'row_not_used no-value 7',
      'notice censored-reading E8',
      'notice censored-reading F8',
      'cell_not_used error-cell E9',
      'cell_not_used formula-without-result F9',
      'row_not_used no-value 9',
      'row_not_used lot-missing B12',
      'row_not_used unknown-product C13',
      'row_not_used stamp-ahead A14',
      'row_not_used stamp-before-2000 A15',
      'row_not_used check-standard-row B16',
      'row_not_used repeated-header 18',
      'row_not_used summary-row 21',
      'blocking decimal-sign E6',
      'blocking code-or-value E10',
      'notice hidden-rows-read',
      'notice hidden-sheet-read',
      'notice no-header',
    ]);
    expect(values(result.readings)).toEqual([
      [11, 12.1],
      [12, 16.4],
      [12, 16.5],
      [11, null],
      [12, null],
      [11, 0],
      [12, 16.6],
      [11, 12.3],
      [12, 16.6],
      [11, 12.3],
      [12, 16.6],
      [11, 12.4],
      [12, 16.7],
      [12, 16.1],
    ]);
    expect(result.readings.map((reading) => reading.censoring).filter(Boolean)).toEqual(['below', 'above']);
    expect(result.readings[7]).toMatchObject({
      lot: 'L-24102',
      product: 'SEP-12',
      at: Date.parse('2026-01-05T07:00:00+01:00'),
    });
    expect(result.report.problems[2].detail).toBe(
      'Sheet "Shift", cell E6 holds the text "10,125", which could be read in two ways; say which sign is the decimal sign.',
    );
  });
});

describe('times', () => {
  const stamps = async (...texts: string[]) =>
    readRows([HEADER, ...texts.map((text, index) => [text, 'A', 'SEP-12', 'CW', index])]);

  it('tells the passes through the repeated hour apart by the order of the rows, and says so', async () => {
    const result = await stamps(
      '2025-10-26 01:45',
      '2025-10-26 02:15',
      '2025-10-26 02:45',
      '2025-10-26 02:15',
      '2025-10-26 02:45',
      '2025-10-26 03:15',
    );
    expect(result.readings.map((reading) => new Date(reading.at).toISOString().slice(11, 16))).toEqual([
      '23:45',
      '00:15',
      '00:45',
      '01:15',
      '01:45',
      '02:15',
    ]);
    expect(result.report.problemCounts).toEqual([
      { code: 'repeated-hour-by-order', severity: 'notice', count: 4, firstSheet: 'Readings', firstRow: 3 },
    ]);
  });
  it('does not guess the pass when no row tells, but takes an offset', async () => {
    const result = await stamps('2025-10-26 02:15', '2025-10-26T02:30+02:00');
    expect(problemList(result)).toEqual(['row_not_used repeated-hour A2', 'blocking repeated-hour A2']);
    expect(result.readings[0].at).toBe(Date.parse('2025-10-26T00:30Z'));
  });
  it('refuses a time that the clocks jumped over', async () => {
    const result = await readBook(
      { sheets: [{ name: 'S', rows: [HEADER, ['2026-03-29 02:30', 'A', 'SEP-12', 'CW', 1]] }] },
      { ...COATER, now: Date.parse('2026-06-01') },
    );
    expect(problemList(result)).toEqual(['row_not_used time-does-not-exist A2', 'blocking no-readings']);
  });
  it('bears ten minutes ahead of now and no more', async () => {
    const result = await stamps('2026-03-01T12:10:00Z', '2026-03-01T12:10:01Z');
    expect(problemList(result)).toEqual(['row_not_used stamp-ahead A3']);
  });
  it('asks when a night shift keeps its first date after midnight', async () => {
    const rows = [
      ['Date', 'Time', 'Lot', 'Product', 'Channel', 'Value'],
      [{ day: DAY }, '23:55', 'A', 'SEP-12', 'CW', 1],
      [{ day: DAY }, { clock: 5 / 1440 }, 'A', 'SEP-12', 'CW', 2],
      [{ day: DAY }, null, 'A', 'SEP-12', 'CW', 3],
    ];
    expect(problemList(await readRows(rows))).toEqual(['row_not_used time-missing B4', 'blocking shift-date B3']);
  });
  it('says when no row has a time of day', async () => {
    expect(problemList(await stamps('2026-01-05', '2026-01-06'))).toEqual(['notice no-time-of-day']);
  });
  it('takes a column headed in UTC as UTC', async () => {
    const { readings } = await readRows([
      ['Time (UTC)', ...HEADER.slice(1)],
      [at('6:00'), 'A', 'SEP-12', 'CW', 1],
    ]);
    expect(readings[0].at).toBe(Date.parse('2026-01-05T06:00Z'));
  });
});

describe('lots and products', () => {
  it('keeps lot numbers as written, and refuses what Excel has spoilt', async () => {
    const rows = [
      HEADER,
      ...[' L 001 ', 24101, 1.5, { day: DAY }, 1.2345678901234567e17].map((lot) => [
        at('6:00'),
        lot,
        'SEP-12',
        'CW',
        1,
      ]),
    ];
    const result = await readRows(rows);
    expect(result.readings.map((reading) => reading.lot)).toEqual(['L 001', '24101']);
    expect(problemList(result)).toEqual([
      'row_not_used lot-not-whole B4',
      'row_not_used lot-is-a-date B5',
      'row_not_used lot-too-long B6',
    ]);
  });
  it('refuses a second product for a lot, and lets a row without one follow the lot', async () => {
    const result = await readRows([
      HEADER,
      [at('6:00'), 'A', 'SEP-12', 'CW', 1],
      [at('6:01'), 'A', 'SEP-16', 'CW', 2],
      [at('6:02'), 'A', null, 'CW', 3],
    ]);
    expect(problemList(result)).toEqual(['row_not_used lot-with-two-products C3', 'notice product-missing C4']);
    expect(result.readings.map((reading) => reading.product)).toEqual(['SEP-12', 'SEP-12']);
  });
});

describe('what is not there', () => {
  it('stops at a sheet without lots, times or values, and says which', async () => {
    const result = await readRows([
      ['Time', 'Product', 'Coat weight'],
      [at('6:00'), 'SEP-12', 12],
    ]);
    expect(problemList(result)).toEqual(['blocking no-lot-column 1', 'row_not_used lot-missing 2']);
    expect(problemList(await readRows([['Time', 'Lot', 'Product', 'Gloss']]))).toEqual([
      'blocking no-value-column 1',
      'notice column-not-used D1',
    ]);
    expect(
      problemList(
        await readRows([
          ['Lot', 'Coat weight'],
          ['A', 12],
        ]),
      ),
    ).toContain('blocking no-time-column 1');
  });
  it('stops at a workbook without any header', async () => {
    const result = await readRows([['hello'], [1, 2, 3]]);
    expect(problemList(result)).toEqual(['blocking no-header']);
    expect(result.report).toMatchObject({ layout: null, rowsRead: 0, isBlocked: true });
  });
  it('finds a header in row 40 and none in row 41', async () => {
    const below = (blank: number) => [
      ...Array.from({ length: blank }, () => ['title']),
      HEADER,
      [at('6:00'), 'A', 'SEP-12', 'CW', 1],
    ];
    expect((await readRows(below(39))).readings).toHaveLength(1);
    expect(problemList(await readRows(below(40)))).toEqual(['blocking no-header']);
  });
  it('stops at a workbook whose rows all fall away', async () => {
    expect(problemList(await readRows([HEADER]))).toEqual(['blocking no-readings']);
  });
});
