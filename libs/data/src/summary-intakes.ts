import { MOST_LISTED, type SummaryIntake } from '@app/contracts';
import { type Queryable, rows } from './database';
import type { PlantWeek } from './summary-week';

interface IntakeRow {
  total: number;
  id: number;
  lineId: number;
  lineName: string;
  fileName: string;
  state: SummaryIntake['state'];
  receivedAt: Date;
  receivedBy: string;
  failure: string | null;
  blockingCount: number;
}

/** Workbooks that still need attention, whenever they came, and those of the week that were refused; oldest first. */
export async function listSummaryIntakes(
  db: Queryable,
  plantId: number,
  week: PlantWeek,
): Promise<{ count: number; intakes: SummaryIntake[] }> {
  const found = await rows<IntakeRow>(
    db,
    `select (count(*) over ())::int as total, i.id, n.id as "lineId", n.name as "lineName", i.file_name as "fileName", i.state,
       i.received_at as "receivedAt", p.name as "receivedBy", i.failure,
       (select count(*)::int from intake_problems q where q.intake_id = i.id and q.severity = 'blocking') as "blockingCount"
     from intakes i join lines n on n.id = i.line_id join people p on p.id = i.received_by
     where i.plant_id = :plantId and i.received_at < :to
       and (i.state = 'needs_attention' or (i.state = 'refused' and i.received_at >= :from))
     order by i.received_at, i.id limit :most`,
    { plantId, from: week.from, to: week.to, most: MOST_LISTED },
  );
  return {
    count: found[0]?.total ?? 0,
    intakes: found.map((row) => ({
      id: row.id,
      line: { id: row.lineId, name: row.lineName },
      fileName: row.fileName,
      state: row.state,
      receivedAt: row.receivedAt.toISOString(),
      receivedBy: row.receivedBy,
      sentence: sentenceOf(row),
    })),
  };
}

function sentenceOf({ state, failure, blockingCount }: IntakeRow): string {
  if (failure) return failure;
  if (state === 'refused') return 'It was refused.';
  if (blockingCount === 0) return 'It waits for somebody to confirm what was recognised.';
  return blockingCount === 1
    ? 'One problem must be put right before it can be confirmed.'
    : `${blockingCount} problems must be put right before it can be confirmed.`;
}
