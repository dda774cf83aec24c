import { Inject, Injectable } from '@nestjs/common';
import { DomainError, type LotListItem } from '@app/contracts';
import { type Database, getLotCount, type Person } from '@app/data';
import { DATABASE } from '@app/platform';
import { type TableColumn, writeTable } from '@app/workbook';
import { ScopeService } from '../access/scope.service';
import type { LotsQuery } from './dto/lots-query.dto';
import { filterOf, LotsService } from './lots.service';

const MOST_ROWS = 50_000;
const AT_A_TIME = 2_000;

const COLUMNS: TableColumn[] = [
  { header: 'Lot', type: 'text', width: 14 },
  { header: 'Line', type: 'text', width: 16 },
  { header: 'Product', type: 'text', width: 14 },
  { header: 'Start', type: 'datetime', width: 20 },
  { header: 'End', type: 'datetime', width: 20 },
  { header: 'Quantity', type: 'number', width: 12 },
  { header: 'Quantity unit', type: 'text', width: 14 },
  { header: 'Control limits', type: 'text', width: 24 },
  { header: 'Provisional', type: 'text', width: 12 },
  { header: 'Specification', type: 'text', width: 28 },
  { header: 'Stands out most in', type: 'text', width: 22 },
  { header: 'Score', unit: 'σ', type: 'number', format: '0.00', width: 12 },
  { header: 'Hold', type: 'text', width: 10 },
  { header: 'Disposition', type: 'text', width: 14 },
];

/** The lots that a filter finds, as a workbook. */
@Injectable()
export class LotsTableService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly scope: ScopeService,
    private readonly lots: LotsService,
  ) {}

  async write(person: Person, query: LotsQuery): Promise<Buffer> {
    const { plantIds, timeZone } = await this.scope.of(person.id, query, 'read');
    const filter = filterOf(query, plantIds);
    const total = await getLotCount(this.database, filter);
    if (total > MOST_ROWS)
      throw new DomainError(
        'unprocessable',
        'too-many-rows',
        `The filter finds ${total} lots; a workbook takes up to ${MOST_ROWS}. Choose a shorter time.`,
      );
    return writeTable({ sheetName: 'Lots', columns: COLUMNS, timeZone, rows: this.rows(filter, query) });
  }

  private async *rows(filter: Parameters<LotsService['listItems']>[0], { sort }: LotsQuery): AsyncIterable<unknown[]> {
    for (let offset = 0; ; offset += AT_A_TIME) {
      const lots = await this.lots.listItems(filter, { sort, limit: AT_A_TIME, offset });
      yield* lots.map(toCells);
      if (lots.length < AT_A_TIME) return;
    }
  }
}

const words = (state: string | null) => state?.replaceAll('_', ' ') ?? null;

const toCells = (lot: LotListItem): unknown[] => [
  lot.number,
  lot.line.name,
  lot.product,
  new Date(lot.startsAt),
  new Date(lot.endsAt),
  lot.quantity,
  lot.quantityUnit,
  words(lot.mark.controlState),
  lot.mark.isProvisional ? 'provisional' : 'settled',
  words(lot.mark.specificationState),
  lot.farthest?.channelName ?? null,
  lot.farthest?.score ?? null,
  lot.hold?.state ?? null,
  lot.disposition,
];
