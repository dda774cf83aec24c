import { Inject, Injectable } from '@nestjs/common';
import type { LotListItem, LotView, Page } from '@app/contracts';
import {
  type Database,
  findLot,
  getLotCount,
  listHistory,
  listHoldsOfLot,
  listLots,
  listVerdicts,
  type LotFilter,
  mapLotMarks,
  type Person,
} from '@app/data';
import { DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { ScopeService } from '../access/scope.service';
import { limitsOf } from '../platform/paging';
import type { LotsQuery } from './dto/lots-query.dto';
import { toHistory, toLotListItem, toLotView } from './lot-view';
import { toVerdictView } from './verdict-view';

@Injectable()
export class LotsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly access: AccessService,
    private readonly scope: ScopeService,
  ) {}

  async list(person: Person, query: LotsQuery): Promise<Page<LotListItem>> {
    const { plantIds } = await this.scope.of(person.id, query, 'read');
    const filter = filterOf(query, plantIds);
    const [total, items] = await Promise.all([
      getLotCount(this.database, filter),
      this.listItems(filter, { sort: query.sort, ...limitsOf(query) }),
    ]);
    return { items, total, page: query.page, pageSize: query.pageSize };
  }

  async listItems(filter: LotFilter, page: Parameters<typeof listLots>[2]): Promise<LotListItem[]> {
    const lots = await listLots(this.database, filter, page);
    const marks = await mapLotMarks(
      this.database,
      lots.map((lot) => lot.id),
    );
    return lots.map((lot) => toLotListItem(lot, marks.get(lot.id)!));
  }

  async find(person: Person, id: number): Promise<LotView> {
    const { thing: lot } = await this.access.requireThing(person.id, await findLot(this.database, id), 'read');
    const [marks, verdicts, holds] = await Promise.all([
      mapLotMarks(this.database, [id]),
      listVerdicts(this.database, id),
      listHoldsOfLot(this.database, id),
    ]);
    const history = await listHistory(this.database, [
      { kind: 'lot', id },
      ...holds.map((hold) => ({ kind: 'hold', id: hold.id })),
    ]);
    return toLotView(lot, marks.get(id)!, verdicts.map(toVerdictView), holds, toHistory(history));
  }
}

export function filterOf(query: LotsQuery, plantIds: number[]): LotFilter {
  const { lineId, state, held, by, disposition, notScoredOn, notScoredFor, text, from, to } = query;
  return {
    plantIds,
    lineId,
    state,
    held,
    by,
    disposition,
    notScoredOn,
    notScoredFor,
    text,
    from: from ? new Date(from) : undefined,
    to: to ? new Date(to) : undefined,
  };
}
