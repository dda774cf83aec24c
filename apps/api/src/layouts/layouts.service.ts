import { Inject, Injectable } from '@nestjs/common';
import { layoutSentences, type LayoutView, type Permission } from '@app/contracts';
import {
  type Database,
  deleteLayout,
  findLine,
  getLineContext,
  insertAuditEntry,
  listLayouts,
  type Person,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { writeTemplate } from '@app/workbook';
import { AccessService } from '../access/access.service';

/** What a line's workbooks look like: the layouts that were confirmed, and a blank workbook to fill in. */
@Injectable()
export class LayoutsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
  ) {}

  async list(person: Person, lineId: number): Promise<LayoutView[]> {
    await this.requireLine(person, lineId, 'read');
    const { channels } = await getLineContext(this.database, lineId, { isWithRetired: true });
    const nameOf = (id: number): string => channels.find((channel) => channel.id === id)?.name ?? 'a former channel';
    return (await listLayouts(this.database, lineId)).map((layout) => ({
      id: layout.id,
      sheetName: layout.sheetName,
      rememberedAt: layout.rememberedAt.toISOString(),
      rememberedBy: layout.rememberedBy,
      answers: layoutSentences(layout.answers, nameOf),
    }));
  }

  /** Of one that is not there, or not there any more, there is nothing to forget. */
  async forget(person: Person, lineId: number, layoutId: number): Promise<void> {
    const line = await this.requireLine(person, lineId, 'upload_intake');
    const layout = (await listLayouts(this.database, lineId)).find(({ id }) => id === layoutId);
    if (!layout) return;
    await this.database.transaction(async (tx) => {
      if (!(await deleteLayout(tx, lineId, layoutId))) return;
      await insertAuditEntry(tx, {
        plantId: line.plantId,
        at: this.clock.now(),
        actor: person,
        action: 'forget-layout',
        thingKind: 'line',
        thingId: lineId,
        sentence: `${person.name} had the layout of the sheet "${layout.sheetName}" of ${line.name} forgotten.`,
        before: { sheetName: layout.sheetName, answers: layout.answers },
      });
    });
  }

  /** A blank workbook with the line's channels. */
  async template(person: Person, lineId: number): Promise<{ fileName: string; bytes: Buffer }> {
    const line = await this.requireLine(person, lineId, 'read');
    const context = await getLineContext(this.database, lineId);
    const bytes = await writeTemplate({ lineName: line.name, ...context });
    return { fileName: `${line.name} readings.xlsx`, bytes };
  }

  private async requireLine(person: Person, lineId: number, permission: Permission) {
    return (await this.access.requireThing(person, await findLine(this.database, lineId), permission)).thing;
  }
}
