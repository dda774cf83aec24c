import type { HoldReminder, IntakeState } from '@app/contracts';
import { type Queryable, rows } from './database';
import { REMINDERS_OF_HOLD } from './hold-reminders';

export interface DeskHoldRow {
  id: number;
  lotNumber: string;
  lineId: number;
  lineName: string;
  openedAt: Date;
  reminders: HoldReminder[];
  sentences: string[];
  isSetAside: boolean;
  isForControlLimitsAlone: boolean;
  engineerMayRelease: boolean;
  confirmerIds: number[];
  /** The line is one of the person's own. */
  isOwnLine: boolean;
}

/** The plant's open holds with what says who may decide them, oldest first. */
export function listDeskHolds(db: Queryable, plantId: number, personId: number): Promise<DeskHoldRow[]> {
  return rows<DeskHoldRow>(
    db,
    `select h.id, l.number as "lotNumber", n.id as "lineId", n.name as "lineName", h.opened_at as "openedAt",
       ${REMINDERS_OF_HOLD} as reminders, coalesce(k.sentences, '[]') as sentences, s.hold_id is not null as "isSetAside",
       coalesce(k.is_mean_alone, true) as "isForControlLimitsAlone", p.engineer_may_release as "engineerMayRelease",
       coalesce(k.confirmers, '[]') as "confirmerIds", a.person_id is not null as "isOwnLine"
     from holds h join lots l on l.id = h.lot_id join lines n on n.id = h.line_id join plants p on p.id = h.plant_id
     left join set_asides s on s.hold_id = h.id
     left join line_assignments a on a.line_id = h.line_id and a.person_id = :personId
     left join (
       select c.hold_id, json_agg(c.sentence order by c.id) as sentences, bool_and(c.signal = 'lot_mean') as is_mean_alone,
         json_agg(i.confirmed_by) filter (where i.confirmed_by is not null) as confirmers
       from hold_causes c join holds o on o.id = c.hold_id left join intakes i on i.id = c.intake_id
       where o.plant_id = :plantId and o.state = 'open' group by c.hold_id
     ) k on k.hold_id = h.id
     where h.plant_id = :plantId and h.state = 'open' order by h.opened_at, h.id`,
    { plantId, personId },
  );
}

export interface DeskIntakeRow {
  id: number;
  fileName: string;
  lineId: number;
  lineName: string;
  state: IntakeState;
  receivedAt: Date;
  rowsRead: number;
  rowsNotUsed: number;
  blockingCount: number;
  failure: string | null;
}

/**
 * The person's own workbooks that wait for them: those to confirm or put right, and those lately refused, unless another
 * workbook of the line came after.
 */
export function listDeskIntakes(
  db: Queryable,
  plantId: number,
  personId: number,
  refusedSince: Date,
): Promise<DeskIntakeRow[]> {
  return rows<DeskIntakeRow>(
    db,
    `select i.id, i.file_name as "fileName", l.id as "lineId", l.name as "lineName", i.state, i.received_at as "receivedAt",
       i.rows_read as "rowsRead", i.rows_not_used as "rowsNotUsed", i.failure,
       (select count(*)::int from intake_problems p where p.intake_id = i.id and p.severity = 'blocking') as "blockingCount"
     from intakes i join lines l on l.id = i.line_id
     where i.plant_id = :plantId and i.received_by = :personId and (i.state = 'needs_attention' or (
       i.state = 'refused' and i.received_at >= :refusedSince and not exists (
         select 1 from intakes n where n.line_id = i.line_id and n.received_by = i.received_by and n.id > i.id)))
     order by i.received_at, i.id`,
    { plantId, personId, refusedSince },
  );
}

export interface DeskPlanRow {
  id: number;
  revision: number;
  channelName: string;
  lineId: number;
  lineName: string;
  proposedByName: string;
  proposedAt: Date;
}

/** Proposed plans of channels in use that the person did not propose. */
export function listDeskPlans(db: Queryable, plantId: number, personId: number): Promise<DeskPlanRow[]> {
  return rows<DeskPlanRow>(
    db,
    `select r.id, r.revision, c.name as "channelName", l.id as "lineId", l.name as "lineName", p.name as "proposedByName",
       r.proposed_at as "proposedAt"
     from plan_revisions r join channels c on c.id = r.channel_id join lines l on l.id = c.line_id join people p on p.id = r.proposed_by
     where r.plant_id = :plantId and r.state = 'proposed' and r.proposed_by <> :personId and c.retired_at is null
     order by r.proposed_at, r.id`,
    { plantId, personId },
  );
}

export interface DeskSpecificationRow {
  id: number;
  productCode: string;
  characteristicName: string;
  proposedByName: string;
  proposedAt: Date;
}

/** Proposed versions of specifications that the person did not propose. */
export function listDeskSpecifications(
  db: Queryable,
  plantId: number,
  personId: number,
): Promise<DeskSpecificationRow[]> {
  return rows<DeskSpecificationRow>(
    db,
    `select s.id, d.code as "productCode", c.name as "characteristicName", p.name as "proposedByName", s.proposed_at as "proposedAt"
     from specification_proposals s join products d on d.id = s.product_id join characteristics c on c.id = s.characteristic_id
     join people p on p.id = s.proposed_by
     where s.plant_id = :plantId and s.state = 'proposed' and s.proposed_by <> :personId order by s.proposed_at, s.id`,
    { plantId, personId },
  );
}

export interface DeskChannelRow {
  channelId: number;
  channelName: string;
  lineId: number;
  lineName: string;
  gaugeAssetNumber: string | null;
  lotNumber: string;
  lotStartsAt: Date;
}

/** Channels in use whose newest lot is not scored because the slow movement is beyond the plan's allowance. */
export function listDeskChannels(db: Queryable, plantId: number, now: Date): Promise<DeskChannelRow[]> {
  return rows<DeskChannelRow>(
    db,
    `select c.id as "channelId", c.name as "channelName", l.id as "lineId", l.name as "lineName",
       g.asset_number as "gaugeAssetNumber", newest.number as "lotNumber", newest.starts_at as "lotStartsAt"
     from channels c join lines l on l.id = c.line_id
     cross join lateral (
       select o.number, o.starts_at, o.id from lot_channels lc join lots o on o.id = lc.lot_id
       where lc.channel_id = c.id and lc.first_at is not null order by lc.first_at desc limit 1
     ) newest
     join verdicts v on v.channel_id = c.id and v.lot_id = newest.id and v.is_current and v.not_scored_reason = 'beyond_allowance'
     left join channel_gauges cg on cg.channel_id = c.id and cg.served @> cast(:now as timestamptz) left join gauges g on g.id = cg.gauge_id
     where c.plant_id = :plantId and c.retired_at is null order by newest.starts_at, c.id`,
    { plantId, now },
  );
}
