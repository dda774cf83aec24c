import type { Database } from '@app/data';
import { insertRow } from './insert';
import type { TestChannel, TestPlant } from './plant';

const HOUR = 3600;

/** Parameters of a plan by the lot mean at 3 σ, as approval freezes them. */
export const planParameters = (channel: TestChannel) => ({
  method: 'smoothing_spline',
  shortestPeriodSeconds: 72 * HOUR,
  effectivePeriodSeconds: 96 * HOUR,
  windowSeconds: 720 * HOUR,
  components: { betweenLots: 0.0016, betweenPoints: 0.0001, betweenReadings: 0.01 },
  centre: 0,
  scale: 1,
  limit: 3,
  referenceLotCount: 30,
  fallbackNominal: channel.nominal,
  allowanceNotice: null,
  allowanceCap: null,
  constant: { centre: 0, halfWidth: 1 },
  signals: {
    lot_mean: 'holds',
    outside_specification: 'holds',
    not_scored: 'holds',
    censored_readings: 'notice',
    baseline_moved: 'notice',
  },
});

/** A revision proposed by the engineer, and approved by the manager when it is in force. */
export async function insertPlan(
  db: Database,
  plant: TestPlant,
  channel: TestChannel,
  { state = 'in_force', revision = 1, proposedBy }: { state?: string; revision?: number; proposedBy?: number } = {},
): Promise<number> {
  const proposer = proposedBy ?? plant.people.engineer.id;
  const isApproved = state === 'in_force';
  return insertRow(db, 'plan_revisions', {
    plant_id: plant.id,
    channel_id: channel.id,
    revision,
    state,
    reason: 'first plan',
    parameters: JSON.stringify(planParameters(channel)),
    report: JSON.stringify({ cautions: [], leftOutLots: [] }),
    drafted_by: proposer,
    drafted_at: new Date('2026-03-01T08:00:00Z'),
    proposed_by: proposer,
    proposed_at: new Date('2026-03-01T09:00:00Z'),
    approved_by: isApproved ? plant.people.manager.id : null,
    approved_at: isApproved ? new Date('2026-03-01T10:00:00Z') : null,
  });
}
