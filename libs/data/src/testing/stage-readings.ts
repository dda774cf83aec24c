import type { StagedReading } from '../staged-readings';
import { StagedReadingWriter } from '../staged-readings';
import type { Transaction } from '../database';
import type { Client } from 'pg';

/** A reading as a sheet's row says it; rows number themselves unless told. */
export type SheetReading = Pick<StagedReading, 'lot' | 'channelId' | 'value'> & { at: string | number } & Partial<
    Omit<StagedReading, 'at'>
  >;

/** Stages readings for an intake as reading its workbook would. */
export async function stageReadings(
  tx: Transaction,
  intake: { id: number; plantId: number },
  readings: SheetReading[],
): Promise<void> {
  const client = await (tx.client as { acquireConnection(): Promise<Client> }).acquireConnection();
  const writer = new StagedReadingWriter(client, intake.plantId, intake.id);
  await writer.write(
    readings.map((reading, index) => ({
      sheet: 'Readings',
      row: index + 2,
      column: 'E',
      product: 'SEP-16',
      quantity: null,
      quantityUnit: null,
      censoring: null,
      serial: null,
      position: null,
      ...reading,
      at: new Date(reading.at).getTime(),
    })),
  );
  await writer.end();
}
