import { Workbook, type Worksheet } from 'exceljs';
import { editBook, SET_UP } from '../testing/set-up';
import type { SetUpReading } from './document';
import { readSetUp } from './read-set-up';
import { isKnownUnit } from './units';
import { writeSetUp } from './write-set-up';

type Edit = (sheet: (name: string) => Worksheet, book: Workbook) => void;

let whole: Buffer;
beforeAll(async () => (whole = await writeSetUp(SET_UP)));

const readEdited = async (edit: Edit): Promise<SetUpReading> =>
  readSetUp(await editBook(whole, (book) => edit((name) => book.getWorksheet(name)!, book)), { timeZone: 'UTC' });

/** "Lines!A3 doubled: what is wrong. What to do." */
const told = (found: SetUpReading['problems']): string[] =>
  found.map(({ sheet, cell, code, what, whatToDo }) => `${sheet}!${cell ?? ''} ${code}: ${what} ${whatToDo}`);

describe('a broken set-up workbook is answered by its cells:', () => {
  const BROKEN: [string, Edit, string[]][] = [
    [
      'a reference to nothing, and one misspelt',
      (sheet) => {
        sheet('Channels').getCell('E2').value = 'OF-L9';
        sheet('People').getCell('D3').value = 'coater-1; Slitter 4';
      },
      [
        'Channels!E2 unknown-reference: The gauge "OF-L9" is not on the sheet Gauges. Add a row for it there, or name one that is there.',
        'People!D3 unknown-reference: The line "coater-1" is not on the sheet Lines. Write it as it stands there: "Coater 1".',
      ],
    ],
    [
      'a name doubled',
      (sheet) => sheet('Lines').addRow(['Coater 1']) && undefined,
      ['Lines!A4 doubled: The line "Coater 1" stands in row 2 already. Delete one of both rows, or change Name.'],
    ],
    [
      'shifts that overlap over midnight',
      (sheet) => (sheet('Shifts').getCell('C3').value = '07:30') && undefined,
      ['Shifts!B3 shifts-overlap: The shift "night" overlaps "day" of row 2. Change when one of both starts or ends.'],
    ],
    [
      'a zone that is unknown',
      (sheet) => (sheet('Plant').getCell('B2').value = 'Toronto time') && undefined,
      [
        'Plant!B2 unknown-zone: Time zone says "Toronto time", which is no time zone that is known. Write the zone by its IANA name, such as Europe/London.',
      ],
    ],
    [
      'limits the wrong way round, and none at all',
      (sheet) => {
        sheet('Specifications').getCell('D2').value = 21;
        sheet('Specifications').getCell('D3').value = null;
      },
      [
        'Specifications!D2 limits-reversed: The lower specification limit 21 is not below the upper one, 20.8. Change one of both.',
        'Specifications!D3 no-limit: Both specification limits are empty. Fill in one at least.',
      ],
    ],
    [
      'texts for numbers, and a number that could be two',
      (sheet) => {
        sheet('Characteristics').getCell('C2').value = 'a tenth';
        sheet('Products').getCell('C2').value = '10,125';
        sheet('Plant').getCell('E2').value = -8;
      },
      [
        'Plant!E2 not-positive: Reminder to quality managers holds -8, which is not above zero. Write a number above zero.',
        'Products!C2 not-a-number: Value per unit says "10,125", which could be read in two ways. Write a number without its unit.',
        'Characteristics!C2 not-a-number: Resolution says "a tenth", which is no number. Write a number without its unit.',
      ],
    ],
    [
      'a sheet that is missing, while what refers to it is let be',
      (_, book) => book.removeWorksheet('Gauges'),
      [
        'Gauges! sheet-missing: The sheet Gauges is missing. Add it with the columns Asset number, Kind, or begin from a fresh download.',
      ],
    ],
    [
      'a column that is missing, and one that stands twice',
      (sheet) => {
        sheet('Gauges').getCell('B1').value = 'Sort';
        sheet('Products').getCell('D1').value = 'CODE';
      },
      [
        'Products!D1 column-twice: The column Code stands here a second time. Delete one of both.',
        'Gauges! column-missing: The sheet Gauges has no column Kind. Write "Kind" into its first row.',
      ],
    ],
    [
      'a specification without its product',
      (sheet) => (sheet('Specifications').getCell('A3').value = null),
      ['Specifications!A3 missing: Product is empty. Fill it in. Code of a product on the sheet Products.'],
    ],
    [
      'bad mail addresses, an unknown role, a person without one',
      (sheet) => {
        sheet('People').getCell('A2').value = 'ines at overdale';
        sheet('People').getCell('C2').value = null;
        sheet('People').getCell('C3').value = 'chief';
      },
      [
        'People!A2 bad-address: Mail address says "ines at overdale", which is no mail address. Write one address, such as name@plant.example.',
        'People!C2 missing: Roles is empty. Fill it in. One or more of these, with a semicolon between: quality engineer; quality manager; metrology technician; line lead; plant director; administrator.',
        'People!C3 unknown-role: Roles says "chief", which is no role. Write one or more of these, with a semicolon between: quality engineer; quality manager; metrology technician; line lead; plant director; administrator.',
      ],
    ],
    [
      'times that clocks skip or show twice, and a gauge without its time',
      (sheet) => {
        sheet('Channels').getCell('F2').value = new Date('2026-03-08T02:30:00Z');
        sheet('Channels').getCell('F3').value = '2026-11-01 01:30';
        sheet('Channels').getCell('E4').value = 'OF-P2';
      },
      [
        'Channels!F2 time-skipped: Gauge since says 2026-03-08 02:30, which the clocks of the plant jump over. Write another time.',
        'Channels!F3 time-twice: Gauge since says 2026-11-01 01:30, which the clocks of the plant show twice. Write it as a text with its offset, such as 2026-11-01T05:30:00Z.',
        'Channels!F4 missing: Gauge since is empty. Write since when the gauge serves here.',
      ],
    ],
    [
      'two calendars, a time that is none, a day with a time',
      (sheet) => {
        sheet('Shifts').getCell('D3').value = new Date('2026-02-01T00:00:00Z');
        sheet('Shifts').getCell('C2').value = 'seven';
        sheet('Shifts').addRow(['third', '01:00', '02:00', new Date('2026-01-05T06:00:00Z')]);
      },
      [
        'Shifts!C2 not-a-time: Ends says "seven", which is no time of day. Write it as 06:00.',
        'Shifts!D3 other-calendar: Row 2 begins on 2026-01-05 and this one on 2026-02-01. Write the same first day into every row: the sheet holds one calendar.',
        'Shifts!D4 not-a-day: Valid from says "46027.25", which is no day. Write it as 2026-01-31.',
        'Shifts!B4 shifts-overlap: The shift "third" overlaps "night" of row 3. Change when one of both starts or ends.',
      ],
    ],
    [
      'two places that are one, a second plant, an Excel error',
      (sheet) => {
        sheet('Channels').getRow(5).values = [
          'Coater 1',
          'Second',
          'Thickness',
          'exit',
          'OF-P2',
          new Date('2026-01-05T06:00:00Z'),
        ];
        sheet('Plant').getCell('A3').value = 'Another';
        sheet('Gauges').getCell('B2').value = { error: '#REF!' };
      },
      [
        'Plant!A3 plant-twice: The sheet Plant has a second row, and a workbook sets up one plant. Delete it.',
        'Gauges!B2 error-cell: Kind shows the Excel error #REF!. Write the value itself.',
        'Channels!D5 place-doubled: Row 2 measures "Thickness" at "exit" of this line already. Name another position.',
      ],
    ],
  ];

  it.each(BROKEN)('%s', async (_, edit, expected) => {
    const reading = await readEdited(edit);
    expect(told(reading.problems)).toEqual(expected);
    expect(reading.document).toBeNull();
  });

  it('a file that is no workbook, one that is empty, one that is damaged', async () => {
    const readBytes = async (bytes: Buffer) => told((await readSetUp(bytes, { timeZone: 'UTC' })).problems);
    expect(await readBytes(Buffer.from('Line;Name\n1;Coater'))).toEqual([
      'null! not-excel: The file is not an Excel workbook. In Excel choose "Save as" and the type "Excel workbook (*.xlsx)", then upload that file.',
    ]);
    expect(await readBytes(Buffer.alloc(0))).toEqual([
      'null! empty-file: The file is empty (0 bytes). Save the workbook again and upload it.',
    ]);
    expect((await readBytes(whole.subarray(0, whole.length - 50)))[0]).toMatch(/^null! corrupt: The file is damaged/);
  });

  it('a workbook about something else misses every sheet', async () => {
    const book = new Workbook();
    book.addWorksheet('Readings').addRow(['Lot', 'Value']);
    const { problems, notices } = await readSetUp(Buffer.from(await book.xlsx.writeBuffer()), { timeZone: 'UTC' });
    expect(problems.map(({ sheet, code }) => `${sheet} ${code}`)).toEqual(
      ['Plant', 'Shifts', 'Lines', 'Products', 'Characteristics', 'Specifications', 'Gauges', 'Channels', 'People'].map(
        (name) => `${name} sheet-missing`,
      ),
    );
    expect(told(notices)).toEqual([
      `Readings! unknown-sheet: The sheet "Readings" is none of the set-up’s. It is not used.`,
    ]);
  });

  it('a sheet with very many problems lists fifty and counts the rest', async () => {
    const { problems } = await readEdited((sheet) => {
      for (let row = 0; row < 80; row += 1) sheet('Products').getCell(10 + row, 3).value = 'dear';
    });
    expect(problems).toHaveLength(51);
    expect(told(problems).at(-1)).toBe(
      'Products! more-problems: 190 more problems of this sheet are not listed. Mend those that are listed and drop the workbook again.',
    );
  });
});

describe('what stops nothing', () => {
  it('is said: other sheets, other columns, units that are not known', async () => {
    const reading = await readEdited((sheet, book) => {
      book.addWorksheet('Notes').addRow(['ask Ines']);
      sheet('Lines').getCell('B1').value = 'Remark';
      sheet('Lines').getCell('B2').value = 'old';
      sheet('Characteristics').getCell('B2').value = 'µn';
    });
    expect(reading.problems).toEqual([]);
    expect(reading.document?.characteristics[0].unit).toBe('µn');
    expect(told(reading.notices)).toEqual([
      'Notes! unknown-sheet: The sheet "Notes" is none of the set-up’s. It is not used.',
      'Lines!B1 unknown-column: The column "Remark" is none of this sheet’s. It is not used.',
      'Characteristics!B2 unknown-unit: The unit "µn" is none that is known. Check its spelling; it is taken as it stands.',
    ]);
  });

  it('is forgiven: sheets in another order, units left out of headers, case, numbers and times written as text', async () => {
    const reading = await readEdited((sheet) => {
      sheet('Plant').getCell('E1').value = 'reminder to quality managers';
      sheet('Plant').getCell('D2').value = true;
      sheet('Plant').getCell('G2').value = 0.1;
      sheet('Plant').getCell('G2').numFmt = '0 %';
      sheet('Plant').name = 'plant.';
      sheet('Specifications').getCell('C2').value = '20,0';
      sheet('Specifications').getCell('G2').value = '2026-01-05 07:00';
      sheet('Shifts').getCell('B2').value = '7:00';
      sheet('People').getCell('C3').value = 'Engineer, line_lead';
    });
    expect(reading.problems).toEqual([]);
    expect(reading.document).toEqual({
      ...SET_UP,
      people: [SET_UP.people[0], { ...SET_UP.people[1], roles: ['engineer', 'line_lead'] }],
    });
  });

  it('a gauge may serve two channels', () => {
    expect(SET_UP.channels.filter(({ gauge }) => gauge === 'OF-L1')).toHaveLength(2);
  });
});

describe('units', () => {
  it.each([
    '',
    'g/m²',
    'µm',
    'um',
    'mPa·s',
    'kg/m³',
    '°C',
    '1/min',
    'm/s²',
    'kN',
    '%',
    'N·m',
    'mm^2',
    'g/m2',
    'l/h',
    'µS/cm',
  ])('%j is known', (unit) => expect(isKnownUnit(unit)).toBe(true));
  it.each(['foo', 'g//m', 'grm', 'm/', 'kkg', '12'])('%j is not', (unit) => expect(isKnownUnit(unit)).toBe(false));
});
