import type { ChannelBody, ChannelSetUpView, NewChannelBody } from '@app/contracts';
import {
  type ChannelSetUpRow,
  findChannelSetUpForUpdate,
  findCharacteristicSetUpForUpdate,
  findGaugeSetUpForUpdate,
  findLineSetUpForUpdate,
  type GaugeSetUpRow,
  insertChannel,
  insertGaugeService,
  type Transaction,
  updateChannel,
} from '@app/data';
import { notFound } from '../access/not-found';
import { auditAdded, auditChanged, badField, type Change, differences, refusal, retiredAt, usable } from './change';

const WORDS = { name: 'name', position: 'position' };

export const channelView = (row: ChannelSetUpRow): ChannelSetUpView => ({
  id: row.id,
  name: row.name,
  line: { id: row.lineId, name: row.lineName },
  characteristic: {
    id: row.characteristicId,
    name: row.characteristicName,
    unit: row.unit,
    resolution: row.resolution,
  },
  position: row.position,
  gauges: row.gauges.map(({ gaugeId, assetNumber, since, until }) => ({
    gaugeId,
    assetNumber,
    since: new Date(since).toISOString(),
    until: until === null ? null : new Date(until).toISOString(),
  })),
  hasReadings: row.hasReadings,
  isRetired: row.isRetired,
});

/** Adds a channel with the gauge that serves it; returns its id. */
export async function addChannel(tx: Transaction, change: Change, body: NewChannelBody): Promise<number> {
  const line = usable(await findLineSetUpForUpdate(tx, body.lineId), change, 'line', '/lineId');
  const characteristic = usable(
    await findCharacteristicSetUpForUpdate(tx, body.characteristicId),
    change,
    'characteristic',
    '/characteristicId',
  );
  const gauge = await usableGauge(tx, change, body.gaugeId);
  const since = pastInstant(body.since, change);
  const { name, position } = body;
  const id = await insertChannel(tx, {
    plantId: change.plantId,
    lineId: line.id,
    characteristicId: characteristic.id,
    position,
    name,
  });
  await insertGaugeService(tx, { plantId: change.plantId, channelId: id, gaugeId: gauge.id, since });
  const title = `channel ${name} on ${line.name}: ${characteristic.name} by ${gauge.assetNumber}`;
  await auditAdded(tx, change, { kind: 'channel', id, title }, { ...body, since: since.toISOString() });
  return id;
}

/** Renames a channel, retires it or brings it back. */
export async function changeChannel(tx: Transaction, change: Change, id: number, body: ChannelBody): Promise<void> {
  const channel = await findChannelSetUpForUpdate(tx, id);
  if (channel?.plantId !== change.plantId) throw notFound();
  const { name, position, isRetired } = channel;
  const differing = differences({ name, position, isRetired }, body);
  if (!differing) return;
  const { after } = differing;
  if (after.isRetired === false) refuseBringingBack(channel);
  await updateChannel(tx, id, {
    name: after.name,
    position: after.position,
    retiredAt: retiredAt(after.isRetired, change.at),
  });
  const thing = { kind: 'channel', id, title: `channel ${name} of ${channel.lineName}`, words: WORDS };
  await auditChanged(tx, change, thing, differing);
}

function refuseBringingBack(channel: ChannelSetUpRow): void {
  const missing = [
    channel.isLineRetired && `line ${channel.lineName}`,
    channel.isCharacteristicRetired && `characteristic ${channel.characteristicName}`,
    channel.gauges[0]?.isRetired && `gauge ${channel.gauges[0].assetNumber}`,
  ].filter(Boolean);
  if (missing.length > 0)
    throw refusal(
      'retired-parts',
      '/isRetired',
      `${channel.name} cannot be used without ${missing.join(' and ')}, retired as well. Bring that back into use first.`,
    );
}

/** A gauge of the plant that is not retired. */
export async function usableGauge(tx: Transaction, change: Change, gaugeId: number): Promise<GaugeSetUpRow> {
  return usable(await findGaugeSetUpForUpdate(tx, gaugeId), change, 'gauge', '/gaugeId');
}

/** The instant, which does not lie ahead of now. */
export function pastInstant(since: string, change: Change): Date {
  const at = new Date(since);
  if (at > change.at) throw badField('in-future', '/since', 'A gauge cannot have begun to serve ahead of now.');
  return at;
}
