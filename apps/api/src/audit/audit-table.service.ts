import { Inject, Injectable } from '@nestjs/common';
import { type AuditChange, DomainError, nameInWords } from '@app/contracts';
import {
  type AuditFilter,
  type AuditRow,
  type Database,
  getAuditCount,
  insertAuditEntry,
  listAuditEntries,
  type Person,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { type TableColumn, writeTable } from '@app/workbook';
import { auditEntryView } from './audit-view';
import { AuditService, filterOf } from './audit.service';
import type { AuditQuery } from './dto/audit-query.dto';

const MOST_ROWS = 100_000;
const AT_A_TIME = 2_000;

const COLUMNS: TableColumn[] = [
  { header: 'Entry', type: 'number', width: 10 },
  { header: 'Time', type: 'datetime', width: 20 },
  { header: 'Who', type: 'text', width: 22 },
  { header: 'What', type: 'text', width: 70 },
  { header: 'Action', type: 'text', width: 16 },
  { header: 'Kind of thing', type: 'text', width: 16 },
  { header: 'Thing', type: 'text', width: 26 },
  { header: 'Before', type: 'text', width: 40 },
  { header: 'After', type: 'text', width: 40 },
  { header: 'From where', type: 'text', width: 18 },
];

/** The entries that a filter finds, as a workbook. Taking the trail out of the house is an entry itself. */
@Injectable()
export class AuditTableService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly audit: AuditService,
  ) {}

  async write(person: Person, plantId: number, query: AuditQuery): Promise<Buffer> {
    const scope = await this.audit.scope(person, plantId);
    const filter = filterOf(scope, query);
    const total = await getAuditCount(this.database, filter);
    if (total > MOST_ROWS)
      throw new DomainError(
        'unprocessable',
        'too-many-rows',
        `The filter finds ${total} entries; a workbook takes up to ${MOST_ROWS}. Choose a shorter time.`,
      );
    const rows = this.rows(filter, scope.timeZone);
    const bytes = await writeTable({ sheetName: 'Audit', columns: COLUMNS, timeZone: scope.timeZone, rows });
    await this.database.transaction((tx) =>
      insertAuditEntry(tx, {
        plantId,
        at: this.clock.now(),
        actor: person,
        action: 'export',
        thingKind: 'plant',
        thingId: plantId,
        sentence: `${person.name} exported ${total} audit ${total === 1 ? 'entry' : 'entries'} of ${scope.plantName}.`,
        after: { entries: total, filter: { ...query, page: undefined, pageSize: undefined } },
      }),
    );
    return bytes;
  }

  private async *rows(filter: AuditFilter, timeZone: string): AsyncIterable<unknown[]> {
    let olderThanId: number | undefined;
    do {
      const entries = await listAuditEntries(this.database, filter, { limit: AT_A_TIME, olderThanId });
      for (const entry of entries) yield toCells(entry, timeZone);
      olderThanId = entries.length === AT_A_TIME ? entries[AT_A_TIME - 1].id : undefined;
    } while (olderThanId !== undefined);
  }
}

function toCells(entry: AuditRow, timeZone: string): unknown[] {
  const view = auditEntryView(entry, timeZone);
  return [
    view.id,
    entry.at,
    view.actor.name,
    view.sentence,
    nameInWords(view.action),
    nameInWords(view.thing.kind),
    view.thing.name ?? String(view.thing.id),
    listed(view.changes, 'before'),
    listed(view.changes, 'after'),
    view.address,
  ];
}

/** A cell takes 32,767 characters. */
const MOST_CHARACTERS = 32_000;

function listed(changes: AuditChange[], side: 'before' | 'after'): string | null {
  const lines = changes.filter((change) => change[side] !== null).map((change) => `${change.field}: ${change[side]}`);
  return lines.length === 0 ? null : lines.join('\n').slice(0, MOST_CHARACTERS);
}
