import { Inject, Injectable } from '@nestjs/common';
import { DomainError, type RecordView } from '@app/contracts';
import {
  type Database,
  findChannel,
  findRecordExtent,
  listBaselinePoints,
  listBreaks,
  listReadingColumns,
  listRecordLots,
  mapLotMarks,
  type Person,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { toChannelView } from './channel-view';
import type { RecordQuery } from './dto/record-query.dto';
import { baselineSeries, readingSeries, toBreakView, toRecordLot } from './record-series';

const FOURTEEN_DAYS = 14 * 86_400_000;

/** A record, with the count of the lots in its stretch: of very many lots only a part is shown. */
export interface RecordAnswer extends RecordView {
  lotCount: number;
}

/** What a gauge and a process did over a stretch of time; the answer and its cost are bounded whatever the stretch. */
@Injectable()
export class ChannelRecordService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
  ) {}

  async read(person: Person, channelId: number, query: RecordQuery): Promise<RecordAnswer> {
    const found = await findChannel(this.database, channelId, this.clock.now());
    const { thing: channel } = await this.access.requireThing(person.id, found, 'read');
    const extent = await findRecordExtent(this.database, channelId);
    const { from, to } = stretchOf(query, extent, this.clock.now());
    const span = { channelId, from, to, columnCount: query.width };
    const nominal = channel.fallbackNominal ?? 0;
    const breaks = await listBreaks(this.database, channelId, from, to);
    const [readings, baseline, lots] = await Promise.all([
      listReadingColumns(this.database, span, nominal),
      listBaselinePoints(
        this.database,
        span,
        breaks.map((own) => own.at),
      ),
      listRecordLots(this.database, span, nominal),
    ]);
    const lotIds = lots.map((lot) => lot.id);
    const marks = await mapLotMarks(this.database, lotIds, channelId);
    return {
      channel: toChannelView(channel),
      from: from.getTime(),
      to: to.getTime(),
      readings: readingSeries(readings, span),
      baseline: baselineSeries(
        baseline,
        breaks.map((own) => own.at.getTime()),
      ),
      lots: lots.map((lot) => toRecordLot(lot, marks.get(lot.id)!)),
      lotCount: lots[0]?.total ?? 0,
      limit: channel.limit,
      breaks: breaks.map(toBreakView),
      extent: extent ? { from: extent.first.getTime(), to: extent.last.getTime() } : null,
    };
  }
}

function stretchOf(query: RecordQuery, extent: { first: Date; last: Date } | undefined, now: Date) {
  const to = query.to ?? (extent?.last ?? now).getTime();
  const from = query.from ?? to - FOURTEEN_DAYS;
  if (from < to) return { from: new Date(from), to: new Date(to) };
  const detail = 'The stretch must begin before it ends.';
  throw new DomainError('invalid', 'invalid-input', detail, [{ pointer: '/from', code: 'not-before-to', detail }]);
}
