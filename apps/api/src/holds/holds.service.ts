import { Inject, Injectable } from '@nestjs/common';
import type { HoldListItem, HoldView, Page } from '@app/contracts';
import {
  type Database,
  findHold,
  findHoldForDecision,
  getHoldCount,
  listHistory,
  listHolds,
  listSimilarHolds,
  listVerdicts,
  type Person,
} from '@app/data';
import { DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { notFound } from '../access/not-found';
import { ScopeService } from '../access/scope.service';
import { toHistory } from '../lots/lot-view';
import { toVerdictView } from '../lots/verdict-view';
import { limitsOf } from '../platform/paging';
import type { HoldsQuery } from './dto/holds-query.dto';
import { toHoldListItem, toHoldView } from './hold-view';
import { mayDecide } from './may-decide';

const MOST_SIMILAR = 5;

@Injectable()
export class HoldsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly access: AccessService,
    private readonly scope: ScopeService,
  ) {}

  async list(person: Person, query: HoldsQuery): Promise<Page<HoldListItem>> {
    const { plantIds } = await this.scope.of(person.id, query, 'read');
    const filter = { plantIds, lineId: query.lineId, state: query.status };
    const [total, holds] = await Promise.all([
      getHoldCount(this.database, filter),
      listHolds(this.database, filter, limitsOf(query)),
    ]);
    return { items: holds.map(toHoldListItem), total, page: query.page, pageSize: query.pageSize };
  }

  async find(person: Person, id: number): Promise<HoldView> {
    const { thing: hold, roles } = await this.access.requireThing(person.id, await findHold(this.database, id), 'read');
    const [authority, verdicts, similar, history] = await Promise.all([
      findHoldForDecision(this.database, id),
      listVerdicts(this.database, hold.lotId),
      listSimilarHolds(this.database, id, MOST_SIMILAR),
      listHistory(this.database, [
        { kind: 'hold', id },
        { kind: 'lot', id: hold.lotId },
      ]),
    ]);
    if (!authority) throw notFound();
    return toHoldView(hold, {
      roles,
      mayDecide: mayDecide(person.id, roles, authority),
      verdicts: verdicts.map(toVerdictView),
      similar,
      history: toHistory(history),
    });
  }
}
