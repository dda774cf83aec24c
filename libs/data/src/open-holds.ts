import { type SignalName, signalPhrase } from '@app/contracts';
import { rows, type Transaction } from './database';

/** One signal that holds a lot, as it came out of judging. */
export interface HoldCandidate {
  lotId: number;
  channelId: number;
  verdictId: number;
  signal: SignalName;
  facts: Record<string, number | string | null>;
  score: number | null;
  limit: number | null;
  lotMean: number | null;
  /** The lot's former verdict was within its control limits: the hold is late. */
  wasWithin: boolean;
  /** Set: only lots that end after this instant are held. */
  onlyAfter: Date | null;
}

/** A hold that was opened or got a new cause now. */
export interface HeldLot {
  holdId: number;
  lotId: number;
  lotNumber: string;
  lineId: number;
  plantId: number;
  isNew: boolean;
  isLate: boolean;
  causes: { channelId: number; signal: SignalName; sentence: string; verdictId: number }[];
}

interface Place {
  lotId: number;
  lotNumber: string;
  lineId: number;
  plantId: number;
  endsAt: Date;
  channelId: number;
  channelName: string;
  unit: string;
  resolution: number;
  lower: number | null;
  upper: number | null;
  isKnownCause: boolean;
  signal: SignalName;
}

/**
 * Opens one hold a lot with all its causes, adds new causes to open holds, and counts up the evidence of open holds whose verdicts
 * changed. A cause that led to a hold once, open or decided, does not lead to another: people decided on it; unless readings that they
 * decided on were superseded since.
 */
export async function holdLots(
  tx: Transaction,
  candidates: HoldCandidate[],
  changedLotIds: number[],
  context: { intakeId: number | null; at: Date },
): Promise<HeldLot[]> {
  const places = await findPlaces(tx, candidates);
  const fresh = candidates.flatMap((candidate) => {
    const place = places.get(keyOf(candidate));
    if (!place || place.isKnownCause) return [];
    if (candidate.onlyAfter !== null && place.endsAt <= candidate.onlyAfter) return [];
    return [{ ...candidate, place }];
  });
  // Channels are judged side by side and end in any order; people read the lots in theirs.
  fresh.sort(
    (a, b) => a.place.endsAt.getTime() - b.place.endsAt.getTime() || a.lotId - b.lotId || a.channelId - b.channelId,
  );
  const before = await openHolds(tx, [...new Set([...changedLotIds, ...fresh.map((cause) => cause.lotId)])]);
  await tx.raw('update holds set evidence_version = evidence_version + 1 where id = any(:ids)', {
    ids: [...before.values()],
  });
  if (fresh.length === 0) return [];
  const newLots = [
    ...new Map(fresh.filter((cause) => !before.has(cause.lotId)).map((cause) => [cause.lotId, cause])).values(),
  ];
  await tx.raw(
    `insert into holds (plant_id, line_id, lot_id, state, opened_at, is_late)
     select n.plant_id, n.line_id, n.lot_id, 'open', :at, n.is_late
     from jsonb_to_recordset(:lots) as n(plant_id bigint, line_id bigint, lot_id bigint, is_late boolean)`,
    {
      at: context.at,
      lots: JSON.stringify(
        newLots.map(({ place, lotId }) => ({
          plant_id: place.plantId,
          line_id: place.lineId,
          lot_id: lotId,
          is_late: fresh.filter((cause) => cause.lotId === lotId).every((cause) => cause.wasWithin),
        })),
      ),
    },
  );
  const holds = await openHolds(
    tx,
    fresh.map((cause) => cause.lotId),
  );
  const causes = fresh.map((cause) => ({
    ...cause,
    holdId: holds.get(cause.lotId) as number,
    sentence: sentenceOf(cause),
  }));
  await tx.batchInsert(
    'hold_causes',
    causes.map((cause) => ({
      plant_id: cause.place.plantId,
      hold_id: cause.holdId,
      channel_id: cause.channelId,
      verdict_id: cause.verdictId,
      intake_id: context.intakeId,
      signal: cause.signal,
      sentence: cause.sentence,
      added_at: context.at,
    })),
    500,
  );
  // A held lot stops pulling, so what was judged with it is looked at again with the next intake.
  return [...new Set(causes.map((cause) => cause.holdId))].map((holdId) => {
    const own = causes.filter((cause) => cause.holdId === holdId);
    const [{ place, lotId }] = own;
    return {
      holdId,
      lotId,
      lotNumber: place.lotNumber,
      lineId: place.lineId,
      plantId: place.plantId,
      isNew: !before.has(lotId),
      isLate: own.every((cause) => cause.wasWithin),
      causes: own.map(({ channelId, signal, sentence, verdictId }) => ({ channelId, signal, sentence, verdictId })),
    };
  });
}

const keyOf = ({ lotId, channelId, signal }: { lotId: number; channelId: number; signal: string }) =>
  `${lotId} ${channelId} ${signal}`;

function sentenceOf(cause: HoldCandidate & { place: Place }): string {
  const { place } = cause;
  return signalPhrase({
    signal: cause.signal,
    channelName: place.channelName,
    unit: place.unit,
    resolution: place.resolution,
    score: cause.score,
    limit: cause.limit,
    lotMean: cause.lotMean,
    lowerSpecification: place.lower,
    upperSpecification: place.upper,
    facts: cause.facts,
  });
}

async function findPlaces(tx: Transaction, candidates: HoldCandidate[]): Promise<Map<string, Place>> {
  if (candidates.length === 0) return new Map();
  const found = await rows<Place>(
    tx,
    `select k.lot_id as "lotId", l.number as "lotNumber", l.line_id as "lineId", l.plant_id as "plantId", l.ends_at as "endsAt",
       c.id as "channelId", c.name as "channelName", x.unit, x.resolution, s.lower, s.upper, k.signal,
       exists (select 1 from hold_causes h join holds o on o.id = h.hold_id
         where o.lot_id = k.lot_id and h.channel_id = k.channel_id and h.signal = k.signal and (o.state = 'open' or (o.state = 'decided'
           and not exists (select 1 from lots_to_rejudge j where j.channel_id = k.channel_id and j.lot_id = k.lot_id and j.because = 'superseded')))) as "isKnownCause"
     from jsonb_to_recordset(:keys) as k(lot_id bigint, channel_id bigint, signal text)
     join lots l on l.id = k.lot_id join channels c on c.id = k.channel_id join characteristics x on x.id = c.characteristic_id
     join lot_channels lc on lc.channel_id = k.channel_id and lc.lot_id = k.lot_id left join specifications s on s.id = lc.specification_id`,
    {
      keys: JSON.stringify(
        candidates.map(({ lotId, channelId, signal }) => ({ lot_id: lotId, channel_id: channelId, signal })),
      ),
    },
  );
  return new Map(found.map((place) => [keyOf(place), place]));
}

/** Open holds by lot. */
async function openHolds(tx: Transaction, lotIds: number[]): Promise<Map<number, number>> {
  if (lotIds.length === 0) return new Map();
  const found = await rows<{ id: number; lotId: number }>(
    tx,
    `select id, lot_id as "lotId" from holds where lot_id = any(:lotIds) and state = 'open' order by id for update`,
    { lotIds },
  );
  return new Map(found.map((row) => [row.lotId, row.id]));
}
