import type { PlanParameters } from '@app/scoring';
import { findRow, type Queryable } from './database';

export interface ChannelPlace {
  id: number;
  plantId: number;
  lineId: number;
  name: string;
  lineName: string;
}

/** Where a channel is, for access checks and sentences. */
export async function findChannelPlace(db: Queryable, id: number): Promise<ChannelPlace | undefined> {
  return findRow<ChannelPlace>(
    db,
    `select c.id, c.plant_id as "plantId", c.line_id as "lineId", c.name, l.name as "lineName"
     from channels c join lines l on l.id = c.line_id where c.id = :id`,
    { id },
  );
}

export async function findPlanInForce(
  db: Queryable,
  channelId: number,
): Promise<{ id: number; parameters: PlanParameters } | undefined> {
  return findRow<{ id: number; parameters: PlanParameters }>(
    db,
    `select id, parameters from plan_revisions where channel_id = :channelId and state = 'in_force'`,
    { channelId },
  );
}
