import { type Disposition, holdReason, MOST_LISTED, type SummaryOpenHold } from '@app/contracts';
import { type Queryable, rows } from './database';
import type { PlantWeek } from './summary-week';

interface OpenHoldRow {
  total: number;
  holdId: number;
  lotId: number;
  lotNumber: string;
  lineId: number;
  lineName: string;
  product: string;
  quantity: number | null;
  quantityUnit: string | null;
  value: number | null;
  openedAt: Date;
  ageHours: number;
  phrases: string[];
  isSetAside: boolean;
  decidedSince: Disposition | null;
}

/** Holds that were open at the week's end, oldest first, with what was decided of them since. */
export async function listSummaryOpenHolds(
  db: Queryable,
  plantId: number,
  week: PlantWeek,
): Promise<{ count: number; holds: SummaryOpenHold[] }> {
  const found = await rows<OpenHoldRow>(
    db,
    `select (count(*) over ())::int as total, h.id as "holdId", l.id as "lotId", l.number as "lotNumber", n.id as "lineId", n.name as "lineName",
       p.code as product, l.quantity, l.quantity_unit as "quantityUnit",
       case when a.currency is null then null else l.quantity * p.value_per_unit end as value, h.opened_at as "openedAt",
       cast(extract(epoch from cast(:to as timestamptz) - h.opened_at) / 3600 as float8) as "ageHours",
       array(select k.sentence from hold_causes k where k.hold_id = h.id order by k.id) as phrases, s.hold_id is not null as "isSetAside",
       (select t.disposition from decision_parts t where t.hold_id = h.id order by t.id limit 1) as "decidedSince"
     from holds h join plants a on a.id = h.plant_id join lots l on l.id = h.lot_id join lines n on n.id = h.line_id
     join products p on p.id = l.product_id left join set_asides s on s.hold_id = h.id
     left join decision_holds dh on dh.hold_id = h.id left join decisions d on d.id = dh.decision_id
     where h.plant_id = :plantId and h.opened_at < :to and h.state <> 'withdrawn' and (d.id is null or d.decided_at >= :to)
     order by h.opened_at, h.id limit :most`,
    { plantId, to: week.to, most: MOST_LISTED },
  );
  return {
    count: found[0]?.total ?? 0,
    holds: found.map(({ lotId, lotNumber, lineId, lineName, openedAt, phrases, ...row }) => ({
      holdId: row.holdId,
      lot: { id: lotId, number: lotNumber },
      line: { id: lineId, name: lineName },
      product: row.product,
      quantity: row.quantity,
      quantityUnit: row.quantityUnit,
      value: row.value,
      openedAt: openedAt.toISOString(),
      ageHours: row.ageHours,
      sentence: holdReason(lotNumber, phrases),
      isSetAside: row.isSetAside,
      decidedSince: row.decidedSince,
    })),
  };
}
