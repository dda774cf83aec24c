import type { GaugeBody, GaugeSetUpView, NewGaugeBody } from '@app/contracts';
import { findGaugeSetUpForUpdate, type GaugeSetUpRow, insertGauge, type Transaction, updateGauge } from '@app/data';
import { notFound } from '../access/not-found';
import { auditAdded, auditChanged, type Change, differences, refusal, retiredAt } from './change';

const WORDS = { assetNumber: 'asset number', kind: 'kind' };

export const gaugeView = ({ id, assetNumber, kind, serves, isRetired }: GaugeSetUpRow): GaugeSetUpView => ({
  id,
  assetNumber,
  kind,
  serves: serves.map((served) => ({ ...served, since: new Date(served.since).toISOString() })),
  isRetired,
});

/** Adds a gauge; returns its id. */
export async function addGauge(tx: Transaction, change: Change, body: NewGaugeBody): Promise<number> {
  const gauge = { assetNumber: body.assetNumber, kind: body.kind };
  const id = await insertGauge(tx, { plantId: change.plantId, ...gauge });
  await auditAdded(tx, change, { kind: 'gauge', id, title: `gauge ${gauge.assetNumber}` }, gauge);
  return id;
}

/** Changes a gauge, retires it or brings it back. One that serves a channel cannot be retired. */
export async function changeGauge(tx: Transaction, change: Change, id: number, body: GaugeBody): Promise<void> {
  const gauge = await findGaugeSetUpForUpdate(tx, id);
  if (gauge?.plantId !== change.plantId) throw notFound();
  const { assetNumber, kind, isRetired } = gauge;
  const differing = differences({ assetNumber, kind, isRetired }, body);
  if (!differing) return;
  const { after } = differing;
  if (after.isRetired && gauge.serves.length > 0) {
    const places = gauge.serves.map((served) => `${served.channelName} of ${served.lineName}`).join(', ');
    throw refusal(
      'gauge-in-use',
      '/isRetired',
      `${assetNumber} serves ${places}. Let another gauge serve there, or retire the channel, first.`,
    );
  }
  await updateGauge(tx, id, {
    assetNumber: after.assetNumber,
    kind: after.kind,
    retiredAt: retiredAt(after.isRetired, change.at),
  });
  await auditChanged(tx, change, { kind: 'gauge', id, title: `gauge ${assetNumber}`, words: WORDS }, differing);
}
