import type { LayoutAnswers, RememberedLayout } from '@app/contracts';
import { rows, type Queryable, type Transaction } from './database';

/** How a header was understood on a line, kept by the header's fingerprint. */
export interface LayoutRow {
  id: number;
  plantId: number;
  fingerprint: string;
  sheetName: string;
  answers: LayoutAnswers;
  rememberedAt: Date;
  rememberedBy: string;
}

export function listLayouts(db: Queryable, lineId: number): Promise<LayoutRow[]> {
  return rows<LayoutRow>(
    db,
    `select y.id, y.plant_id as "plantId", encode(y.fingerprint, 'hex') as fingerprint, y.reading->>'sheetName' as "sheetName",
       y.reading->'answers' as answers, y.remembered_at as "rememberedAt", p.name as "rememberedBy"
     from layouts y join people p on p.id = y.remembered_by where y.line_id = :lineId order by y.remembered_at desc, y.id desc`,
    { lineId },
  );
}

/** Remembers layouts of a line, each in the place of what was remembered for its fingerprint before. */
export async function upsertLayouts(
  tx: Transaction,
  line: { plantId: number; lineId: number },
  layouts: readonly RememberedLayout[],
  by: { personId: number; at: Date },
): Promise<void> {
  const byFingerprint = new Map(layouts.map((layout) => [layout.fingerprint, layout]));
  if (byFingerprint.size === 0) return;
  await tx('layouts')
    .insert(
      [...byFingerprint.values()].map(({ fingerprint, sheetName, answers }) => ({
        plant_id: line.plantId,
        line_id: line.lineId,
        fingerprint: Buffer.from(fingerprint, 'hex'),
        reading: JSON.stringify({ sheetName, answers }),
        remembered_at: by.at,
        remembered_by: by.personId,
      })),
    )
    .onConflict(['line_id', 'fingerprint'])
    .merge(['reading', 'remembered_at', 'remembered_by']);
}

/** Forgets a layout of a line; intakes that were read by it no longer name it. Whether there was one. */
export async function deleteLayout(tx: Transaction, lineId: number, id: number): Promise<boolean> {
  await tx('intakes').where({ layout_id: id, line_id: lineId }).update({ layout_id: null });
  return (await tx('layouts').where({ id, line_id: lineId }).delete()) > 0;
}

/** Most numbers of lots that a spelling is compared with. */
const MOST_LOTS = 5000;

/** Numbers of the line's latest lots, newest first. */
export async function listLotNumbers(db: Queryable, lineId: number): Promise<string[]> {
  const found = await rows<{ number: string }>(
    db,
    `select number from (select distinct on (number) number, starts_at from lots where line_id = :lineId and withdrawn_at is null order by number, starts_at desc) l
     order by starts_at desc limit ${MOST_LOTS}`,
    { lineId },
  );
  return found.map(({ number }) => number);
}
