import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { basename, join } from 'node:path';
import { Workbook, type Worksheet } from 'exceljs';
import { DateTime } from 'luxon';
import {
  DEMO_SEED,
  lineNamed,
  makeWorld,
  shiftReadings,
  writeLongWorkbook,
  writeNewcomerWorkbooks,
  writeWideWorkbook,
} from '.';
import { ENDS_AT } from './testing/lot-deviations';

const FIXTURES = join(__dirname, '..', '..', '..', 'fixtures', 'workbooks');
const HEADER_ROW = 5;
const world = makeWorld(DEMO_SEED, ENDS_AT);
const options = { line: lineNamed('Coater 2'), timeZone: 'Europe/London', heading: 'Early shift' };
const first = [...shiftReadings(world, 'Coater 2', world.truth.schedule.further[0])];

async function sheetOf(bytes: Buffer): Promise<Worksheet> {
  const workbook = new Workbook();
  await workbook.xlsx.load(bytes as unknown as ArrayBuffer);
  return workbook.worksheets[0];
}

const rowsOf = (sheet: Worksheet, from = HEADER_ROW + 1): unknown[][] =>
  Array.from({ length: sheet.rowCount - from + 1 }, (_, index) =>
    (sheet.getRow(from + index).values as unknown[]).slice(1),
  );

/** The wall clock of the plant, written as if it were UTC. */
const wallClock = (at: number): Date =>
  DateTime.fromSeconds(at, { zone: 'Europe/London' }).setZone('UTC', { keepLocalTime: true }).toJSDate();

describe('the long workbook', () => {
  it('has title rows, a header with units, and a row a reading', async () => {
    const sheet = await sheetOf(await writeLongWorkbook(first, options));
    expect(rowsOf(sheet, 1).slice(0, HEADER_ROW)).toEqual([
      ['Marrowby Works, Coater 2'],
      ['Early shift'],
      ['Times: Europe/London'],
      [],
      ['Time', 'Lot', 'Product', 'Quantity [m²]', 'Channel', 'Value'],
    ]);
    expect(rowsOf(sheet)).toEqual(
      first.map(({ at, lot, product, quantity, channel, value }) => [
        wallClock(at),
        lot,
        product,
        quantity,
        channel,
        value,
      ]),
    );
  });
});

describe('the wide workbook', () => {
  it('has a column a channel with its unit, and a cell a reading', async () => {
    const sheet = await sheetOf(await writeWideWorkbook(first, options));
    const [header] = rowsOf(sheet, HEADER_ROW);
    expect(header.slice(4)).toEqual(['Coat weight [g/m²]', 'Web thickness [µm]', 'Oven exit temperature [°C]']);
    const names = options.line.channels.map(({ name }) => name);
    const back = rowsOf(sheet).flatMap(([time, lot, product, quantity, ...values]) =>
      values.flatMap((value, index) => (value == null ? [] : [[time, lot, product, quantity, names[index], value]])),
    );
    expect(back).toEqual(
      first.map(({ at, lot, product, quantity, channel, value }) => [
        wallClock(at),
        lot,
        product,
        quantity,
        channel,
        value,
      ]),
    );
  });

  it('writes no brackets for a characteristic without a unit', async () => {
    const shift = world.truth.schedule.shifts[9];
    const bytes = await writeWideWorkbook(shiftReadings(world, 'Slurry 3', shift), {
      ...options,
      line: lineNamed('Slurry 3'),
    });
    expect(rowsOf(await sheetOf(bytes), HEADER_ROW)[0]).toEqual([
      'Time',
      'Lot',
      'Product',
      'Quantity [kg]',
      'Viscosity [mPa·s]',
      'pH',
      'Density [kg/m³]',
    ]);
  });
});

describe('stamps over the change of the clocks', () => {
  const nightOf = (end: string, hours: number) => {
    const other = makeWorld(DEMO_SEED, DateTime.fromISO(end, { zone: 'Europe/London' }).toSeconds());
    const night = other.truth.schedule.shifts.find((shift) => shift.endsAt - shift.startsAt === hours * 3600)!;
    return [...shiftReadings(other, 'Calender 1', night)];
  };

  it('skip the hour that does not exist in spring', async () => {
    const readings = nightOf('2026-04-06T06:00', 7);
    const sheet = await sheetOf(await writeLongWorkbook(readings, { ...options, line: lineNamed('Calender 1') }));
    const hours = new Set(rowsOf(sheet).map(([time]) => (time as Date).getUTCHours()));
    expect(hours).toEqual(new Set([22, 23, 0, 2, 3, 4, 5]));
  });

  it('are ISO text with the offset where an hour occurs twice in autumn, so that every instant can be told', async () => {
    const readings = nightOf('2026-11-02T06:00', 9);
    const sheet = await sheetOf(await writeLongWorkbook(readings, { ...options, line: lineNamed('Calender 1') }));
    const stamps = rowsOf(sheet).map(([time]) => time as string);
    expect(stamps[0]).toBe('2026-10-24T22:00:00+01:00');
    expect(stamps[stamps.length - 1]).toBe('2026-10-25T05:48:00+00:00');
    expect(stamps.map((stamp) => Date.parse(stamp) / 1000)).toEqual(readings.map(({ at }) => at));
  });
});

describe('the two workbooks for a newcomer', () => {
  let directory: string;
  beforeAll(async () => {
    directory = await mkdtemp(join(tmpdir(), 'marrowby-'));
  });
  afterAll(() => rm(directory, { recursive: true }));

  it('hold the two shifts after the six weeks, and the committed copies hold the same', async () => {
    const written = await writeNewcomerWorkbooks(join(directory, 'workbooks'), DEMO_SEED, ENDS_AT);
    expect(written.map(({ path, layout }) => [basename(path), layout])).toEqual([
      ['coater-2-2026-03-02-early-long.xlsx', 'long'],
      ['coater-2-2026-03-02-late-wide.xlsx', 'wide'],
    ]);
    for (const { path } of written) {
      const committed = await sheetOf(await readFile(join(FIXTURES, basename(path))));
      expect(rowsOf(committed, 1)).toEqual(rowsOf(await sheetOf(await readFile(path)), 1));
    }
    const [long] = await Promise.all(written.map(async ({ path }) => sheetOf(await readFile(path))));
    expect(long.getCell('A2').value).toBe('Early shift, Monday 2 March 2026');
    expect(rowsOf(long)).toHaveLength(560);
  });
});
