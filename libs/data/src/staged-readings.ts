import { setImmediate } from 'node:timers/promises';
import type { Client } from 'pg';
import { from as copyFrom } from 'pg-copy-streams';

/** A reading as read from a workbook, before it is confirmed. */
export interface StagedReading {
  sheet: string;
  row: number;
  column: string;
  lot: string;
  product: string | null;
  quantity: number | null;
  quantityUnit: string | null;
  channelId: number;
  at: number;
  value: number | null;
  censoring: 'below' | 'above' | null;
  serial: string | null;
  position: string | null;
}

const SPECIAL = /[\\\t\n\r\0]/g;
const ESCAPES: Record<string, string> = { '\\': '\\\\', '\t': '\\t', '\n': '\\n', '\r': '\\r', '\0': '' };
const text = (value: string) => value.replace(SPECIAL, (character) => ESCAPES[character]);
const optional = (value: string | number | null) =>
  value === null ? '\\N' : typeof value === 'number' ? String(value) : text(value);

/** Writes readings to `staged_readings` by COPY, batch by batch, on a connection of its own inside the caller's transaction. */
export class StagedReadingWriter {
  private ordinal = 0;
  private failure?: Error;
  private readonly stream;

  constructor(
    client: Client,
    private readonly plantId: number,
    private readonly intakeId: number,
  ) {
    this.stream = client.query(
      copyFrom(
        `copy staged_readings (intake_id, plant_id, ordinal, sheet, "row", "column", lot, product, quantity, quantity_unit,
         channel_id, measured_at, value, censoring, serial, position) from stdin`,
      ),
    );
    this.stream.on('error', (error: Error) => {
      this.failure ??= error;
    });
  }

  async write(batch: StagedReading[]): Promise<void> {
    let lines = '';
    for (const reading of batch) {
      this.ordinal += 1;
      lines +=
        `${this.intakeId}\t${this.plantId}\t${this.ordinal}\t${text(reading.sheet)}\t${reading.row}\t${text(reading.column)}\t` +
        `${text(reading.lot)}\t${optional(reading.product)}\t${optional(reading.quantity)}\t${optional(reading.quantityUnit)}\t` +
        `${reading.channelId}\t${new Date(reading.at).toISOString()}\t${optional(reading.value)}\t${optional(reading.censoring)}\t` +
        `${optional(reading.serial)}\t${optional(reading.position)}\n`;
    }
    if (this.failure) throw this.failure;
    if (lines !== '' && !this.stream.write(lines)) await this.until('drain');
    else await setImmediate(); // so that a refusal is heard although the socket always takes more
  }

  /** Gives up what was written so far; after a failure there is nothing left to give up. */
  async abort(): Promise<void> {
    if (this.failure || this.stream.destroyed) return;
    await new Promise<void>((resolve) => {
      this.stream.once('close', resolve);
      this.stream.destroy(new Error('reading was given up'));
    });
  }

  async end(): Promise<void> {
    if (this.failure) throw this.failure;
    const finished = this.until('finish');
    this.stream.end();
    await finished;
  }

  /** PostgreSQL may refuse a row at any time: then nothing drains or finishes any more. */
  private until(event: 'drain' | 'finish'): Promise<void> {
    return new Promise((resolve, reject) => {
      const settle = (done: () => void) => {
        this.stream.off(event, succeed);
        this.stream.off('error', fail);
        done();
      };
      const succeed = () => settle(resolve);
      const fail = (error: Error) => settle(() => reject(error));
      this.stream.once(event, succeed);
      this.stream.once('error', fail);
    });
  }
}
