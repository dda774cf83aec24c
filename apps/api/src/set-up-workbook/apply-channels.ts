import type { Transaction } from '@app/data';
import type { RowComparison, SetUpDocument } from '@app/workbook';
import { badField, refusal } from '../set-up/change';
import { addChannel, changeChannel } from '../set-up/channels';
import { changeGaugeOfChannel } from '../set-up/served-since';
import { type Applying, eachRow, idOf } from './applying';

type Row = SetUpDocument['channels'][number];
const MISSING = 'A new channel needs a gauge. Name the gauge that serves it, and since when.';

/** Adds channels with their gauges, moves them, lets other gauges serve them. */
export function applyChannels(applying: Applying, comparisons: RowComparison[]): Promise<void> {
  return eachRow(applying, 'channels', comparisons, 'name', {
    add: (tx, row) => add(tx, applying, row),
    change: (tx, id, row, comparison) => change(tx, applying, id, row, comparison),
  });
}

async function add(tx: Transaction, applying: Applying, row: Row): Promise<number | undefined> {
  if (row.gauge === null || row.gaugeSince === null) throw badField('gauge-missing', '/gauge', MISSING);
  const lineId = idOf(applying, 'lines', { name: row.line });
  const characteristicId = idOf(applying, 'characteristics', { name: row.characteristic });
  const gaugeId = idOf(applying, 'gauges', { assetNumber: row.gauge });
  if (lineId === undefined || characteristicId === undefined || gaugeId === undefined) return undefined;
  const { name, position, gaugeSince } = row;
  const since = new Date(gaugeSince).toISOString();
  return addChannel(tx, applying.change, { lineId, characteristicId, position, name, gaugeId, since });
}

async function change(
  tx: Transaction,
  applying: Applying,
  id: number,
  row: Row,
  { fields, presentIndex }: RowComparison,
): Promise<void> {
  const there = applying.present.document.channels[presentIndex!];
  if (fields.includes('characteristic'))
    throw refusal(
      'characteristic-kept',
      '/characteristic',
      `This channel measures ${there.characteristic}, and keeps it. Add another channel for ${row.characteristic}.`,
    );
  if (fields.includes('position')) await changeChannel(tx, applying.change, id, { position: row.position });
  if (fields.includes('gauge')) await changeGauge(tx, applying, id, row, there.gauge);
  else if (fields.includes('gaugeSince'))
    throw refusal(
      'since-kept',
      '/gaugeSince',
      `When ${row.gauge} began to serve here is on record and stays. Write the time that was there, or download the workbook anew.`,
    );
}

async function changeGauge(
  tx: Transaction,
  applying: Applying,
  channelId: number,
  row: Row,
  former: string | null,
): Promise<void> {
  if (row.gauge === null || row.gaugeSince === null)
    throw refusal(
      'gauge-kept',
      '/gauge',
      `${former} serves here until another gauge does. Name a gauge and since when it serves.`,
    );
  const gaugeId = idOf(applying, 'gauges', { assetNumber: row.gauge });
  if (gaugeId === undefined) return;
  const body = { gaugeId, since: new Date(row.gaugeSince).toISOString() };
  applying.owedJobIds.push(...(await changeGaugeOfChannel(tx, applying.change, channelId, body)));
}
