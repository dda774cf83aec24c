import type { Client } from 'pg';
import { insertIntake } from '../../../test/support/factories/lots';
import type { Transaction } from './database';
import { stageIntake } from './stage-intake';
import { type StagedReading, StagedReadingWriter } from './staged-readings';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';

describe('staging readings by COPY', () => {
  let place: PlantDatabase;
  let intake: { id: number; plantId: number };
  let sample: StagedReading;
  beforeAll(async () => {
    place = await openPlantDatabase();
    intake = { id: await insertIntake(place.db, place.plant, { state: 'received' }), plantId: place.plant.id };
    sample = {
      sheet: 'Sheet 1',
      row: 2,
      column: 'E',
      lot: '24117',
      product: null,
      quantity: null,
      quantityUnit: null,
      channelId: place.plant.channels[0].id,
      at: Date.parse('2026-03-11T06:00:00.123Z'),
      value: 60.125,
      censoring: null,
      serial: null,
      position: null,
    };
  });
  afterAll(() => place.close());

  const staged = () => place.db('staged_readings').where({ intake_id: intake.id }).orderBy('ordinal');
  const takes = () => Promise.resolve(true);
  const records = () => Promise.resolve();

  it('writes text with tabs, line ends, backslashes, quotes and null marks as it is', async () => {
    const odd = 'a\tb\nc\rd\\N "e" \\. ß µ';
    await stageIntake(place.db, intake, {
      take: takes,
      read: (write) => write([{ ...sample, lot: odd, serial: '\\N', product: '', sheet: 'x\0y' }]),
      record: records,
    });
    expect(await staged()).toMatchObject([
      {
        ordinal: 1,
        lot: odd,
        serial: '\\N',
        product: '',
        sheet: 'xy',
        position: null,
        value: 60.125,
        measured_at: new Date(sample.at),
      },
    ]);
  });

  it('replaces what was staged before', async () => {
    await stageIntake(place.db, intake, {
      take: takes,
      read: async (write) => {
        await write([sample]);
        await write([]);
        await write([{ ...sample, value: null, censoring: 'below' }]);
      },
      record: records,
    });
    expect((await staged()).map(({ ordinal, censoring }) => [ordinal, censoring])).toEqual([
      [1, null],
      [2, 'below'],
    ]);
  });

  it('answers false and touches nothing when the work is not there to take', async () => {
    const before = await staged();
    const answer = await stageIntake(place.db, intake, {
      take: () => Promise.resolve(false),
      read: () => Promise.reject(new Error('must not be read')),
      record: records,
    });
    expect(answer).toBe(false);
    expect(await staged()).toEqual(before);
  });

  it.each([
    ['the reading fails', () => Promise.reject(new Error('broken file')), records],
    ['the recording fails', undefined, () => Promise.reject(new Error('broken file'))],
  ])('stages nothing when %s, and the connection is good afterwards', async (_what, fails, record) => {
    const before = await staged();
    const staging = stageIntake(place.db, intake, {
      take: takes,
      read: async (write) => {
        await write([{ ...sample, lot: 'half' }]);
        await fails?.();
      },
      record,
    });
    await expect(staging).rejects.toThrow('broken file');
    expect(await staged()).toEqual(before);
  });

  it('says so soon when PostgreSQL refuses a row, and does not wait for it to drain', async () => {
    const many = Array.from({ length: 5_000 }, () => ({ ...sample, lot: 'x'.repeat(100) }));
    let written = 0;
    const staging = stageIntake(place.db, intake, {
      take: takes,
      read: async (write) => {
        await write([{ ...sample, channelId: NaN }]);
        for (; written < 50; written++) await write(many);
      },
      record: records,
    });
    await expect(staging).rejects.toThrow('invalid input syntax for type bigint');
    expect(written).toBeLessThan(40);
    expect(await place.db.raw('select 1')).toBeDefined();
  });

  it('says so when the refusal comes with the end', async () => {
    const staging = stageIntake(place.db, intake, {
      take: takes,
      read: (write) => write([{ ...sample, row: 1.5 }]),
      record: records,
    });
    await expect(staging).rejects.toThrow('invalid input syntax for type integer');
  });

  it('gives up quietly what was begun', async () => {
    const working = place.db.transaction(async (tx: Transaction) => {
      const client = await (tx.client as { acquireConnection(): Promise<Client> }).acquireConnection();
      const writer = new StagedReadingWriter(client, intake.plantId, intake.id);
      await writer.write([sample]);
      await writer.abort();
      await writer.abort();
      throw new Error('given up');
    });
    await expect(working).rejects.toThrow('given up');
  });
});
