import { Inject, Injectable } from '@nestjs/common';
import { AUDIT_BY_EBBLINE, type AuditFilterChoices, type AuditPage, DomainError } from '@app/contracts';
import {
  type AuditFilter,
  type Database,
  findPlant,
  getAuditCount,
  listAuditEntries,
  listAuditKinds,
  listAuditPeople,
  type Person,
} from '@app/data';
import { DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { limitsOf } from '../platform/paging';
import { auditEntryView } from './audit-view';
import type { AuditQuery } from './dto/audit-query.dto';

export interface AuditScope {
  plantId: number;
  plantName: string;
  timeZone: string;
  /** Entries of no plant, such as sign-ins, are for who looks after the people there. */
  withPlantless: boolean;
}

/** Who did what to what at a plant. Read only: nothing changes or removes an entry. */
@Injectable()
export class AuditService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly access: AccessService,
  ) {}

  async scope(person: Person, plantId: number): Promise<AuditScope> {
    const found = await findPlant(this.database, plantId);
    const { thing: plant, roles } = await this.access.requireThing(person.id, found, 'read_audit');
    return {
      plantId,
      plantName: plant.name,
      timeZone: plant.timeZone,
      withPlantless: roles.includes('administrator'),
    };
  }

  async list(person: Person, plantId: number, query: AuditQuery): Promise<AuditPage> {
    const scope = await this.scope(person, plantId);
    const filter = filterOf(scope, query);
    const [total, entries] = await Promise.all([
      getAuditCount(this.database, filter),
      listAuditEntries(this.database, filter, limitsOf(query)),
    ]);
    return {
      items: entries.map((entry) => auditEntryView(entry, scope.timeZone)),
      total,
      page: query.page,
      pageSize: query.pageSize,
    };
  }

  async filters(person: Person, plantId: number): Promise<AuditFilterChoices> {
    const scope = await this.scope(person, plantId);
    const [people, kinds] = await Promise.all([
      listAuditPeople(this.database, scope),
      listAuditKinds(this.database, scope),
    ]);
    return { people, kinds };
  }
}

export function filterOf({ plantId, withPlantless }: AuditScope, query: AuditQuery): AuditFilter {
  if (query.thing !== undefined && query.kind === undefined)
    throw new DomainError('invalid', 'kind-missing', 'The number of a thing says nothing without its kind.', [
      { pointer: '/kind', code: 'kind-missing', detail: 'Say of which kind the thing is.' },
    ]);
  return {
    plantId,
    withPlantless,
    actorId: query.person === AUDIT_BY_EBBLINE ? null : query.person,
    thingKind: query.kind,
    thingId: query.thing,
    action: query.action,
    from: query.from ? new Date(query.from) : undefined,
    to: query.to ? new Date(query.to) : undefined,
    text: query.text,
  };
}
