import type { HoldState } from '@app/contracts';
import { findRow, type Queryable, rows } from './database';

export interface LotRow {
  id: number;
  plantId: number;
  number: string;
  lineId: number;
  lineName: string;
  product: string;
  quantity: number | null;
  quantityUnit: string | null;
  startsAt: Date;
  endsAt: Date;
}

export interface LotHoldRow {
  id: number;
  state: HoldState;
  openedAt: Date;
}

export function findLot(db: Queryable, id: number): Promise<LotRow | undefined> {
  return findRow<LotRow>(
    db,
    `select l.id, l.plant_id as "plantId", l.number, n.id as "lineId", n.name as "lineName", p.code as product, l.quantity,
       l.quantity_unit as "quantityUnit", l.starts_at as "startsAt", l.ends_at as "endsAt"
     from lots l join lines n on n.id = l.line_id join products p on p.id = l.product_id where l.id = :id`,
    { id },
  );
}

/** The lot's holds, newest first. */
export function listHoldsOfLot(db: Queryable, lotId: number): Promise<LotHoldRow[]> {
  return rows<LotHoldRow>(
    db,
    `select id, state, opened_at as "openedAt" from holds where lot_id = :lotId order by state = 'open' desc, id desc`,
    { lotId },
  );
}
