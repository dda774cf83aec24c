import type { ChannelGaugeBody } from '@app/contracts';
import {
  findChannelSetUp,
  findChannelSetUpForUpdate,
  insertAuditEntry,
  insertGaugeService,
  lockStoring,
  type Transaction,
} from '@app/data';
import { notFound } from '../access/not-found';
import { declareBreak } from '../breaks/declare-break';
import { type Change, refusal } from './change';
import { pastInstant, usableGauge } from './channels';

/**
 * Lets another gauge serve a channel from an instant on. With readings there the baseline starts afresh at that instant: returns the
 * jobs that are owed for it.
 */
export async function changeGaugeOfChannel(
  tx: Transaction,
  change: Change,
  channelId: number,
  body: ChannelGaugeBody,
): Promise<number[]> {
  const place = await findChannelSetUp(tx, channelId);
  if (place?.plantId !== change.plantId) throw notFound();
  await lockStoring(tx, [place.lineId]);
  const channel = (await findChannelSetUpForUpdate(tx, channelId)) ?? place;
  if (channel.isRetired)
    throw refusal('channel-retired', '/gaugeId', `${channel.name} is retired. Bring it back into use first.`);
  const gauge = await usableGauge(tx, change, body.gaugeId);
  const since = pastInstant(body.since, change);
  const former = channel.gauges.at(0);
  if (former && former.until === null && former.gaugeId === gauge.id)
    throw refusal('same-gauge', '/gaugeId', `${gauge.assetNumber} serves ${channel.name} already.`);
  if (former && since <= new Date(former.until ?? former.since))
    throw refusal(
      'before-former-gauge',
      '/since',
      `${former.assetNumber} served ${channel.name} then. The next gauge serves from a later time on.`,
    );
  await insertGaugeService(tx, { plantId: change.plantId, channelId, gaugeId: gauge.id, since });
  await insertAuditEntry(tx, {
    plantId: change.plantId,
    at: change.at,
    actor: change.person,
    action: 'change-gauge',
    thingKind: 'channel',
    thingId: channelId,
    sentence: `${change.person.name} let gauge ${gauge.assetNumber} serve ${channel.name} of ${channel.lineName}${former ? ` after ${former.assetNumber}` : ''}.`,
    before: { gauge: former?.assetNumber ?? null },
    after: { gauge: gauge.assetNumber, since: since.toISOString() },
  });
  if (!channel.hasReadings) return [];
  const reason = former ? `${gauge.assetNumber} replaced ${former.assetNumber}.` : `${gauge.assetNumber} serves.`;
  const { owedJobId } = await declareBreak(tx, {
    channel: { id: channelId, plantId: change.plantId, name: channel.name, lineName: channel.lineName },
    break: { at: since, kind: 'gauge_change', reason },
    person: change.person,
    now: change.at,
  });
  return [owedJobId];
}
