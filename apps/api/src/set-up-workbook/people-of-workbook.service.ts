import { Injectable } from '@nestjs/common';
import { findPlant, type PlantRow, type Transaction } from '@app/data';
import type { RowComparison, SetUpDocument } from '@app/workbook';
import { InvitationsService } from '../people/invitations.service';
import { PeopleService } from '../people/people.service';
import { type Applying, idOf } from './applying';

type Row = SetUpDocument['people'][number];

/** Invites who is new in a workbook, and gives roles and lines as it says. */
@Injectable()
export class PeopleOfWorkbook {
  constructor(
    private readonly invitations: InvitationsService,
    private readonly people: PeopleService,
  ) {}

  async apply(applying: Applying, comparisons: RowComparison[]): Promise<void> {
    const { present, rows, wanted } = applying;
    for (const comparison of comparisons) {
      keepName(applying, comparison);
      if (comparison.kind === 'unchanged') continue;
      const row = wanted.people[comparison.index];
      const lineIds = row.lines.map((name) => idOf(applying, 'lines', { name }));
      if (lineIds.includes(undefined)) continue;
      const request = { ...row, lineIds: lineIds as number[] };
      const personId = idOf(applying, 'people', row);
      if (personId === undefined) {
        await rows.attempt('people', comparison.index, 'email', (tx) => this.invite(tx, applying, request));
        continue;
      }
      request.lineIds.push(...(present.retiredLineIds.get(row.email) ?? []));
      const { plantId, person: administrator, at } = applying.change;
      await rows.attempt('people', comparison.index, 'roles', (tx) =>
        this.people.changeWithin(tx, { administrator, plantId, at }, personId, request),
      );
    }
  }

  private async invite(tx: Transaction, applying: Applying, request: Row & { lineIds: number[] }): Promise<void> {
    const { plantId, person: administrator, at } = applying.change;
    const plant = (await findPlant(tx, plantId)) as PlantRow;
    const { mailIds } = await this.invitations.inviteWithin(tx, { administrator, plant, at }, request);
    applying.mailIds.push(...mailIds);
  }
}

/** Names are people's own: another one in the workbook is said and not used. */
function keepName({ wanted, present, rows }: Applying, comparison: RowComparison): void {
  if (!comparison.fields.includes('name')) return;
  comparison.fields = comparison.fields.filter((field) => field !== 'name');
  if (comparison.fields.length === 0) comparison.kind = 'unchanged';
  const name = present.document.people[comparison.presentIndex!].name;
  rows.notice('people', comparison.index, 'name', 'name-kept', {
    what: `${name} is here already under that name, and "${wanted.people[comparison.index].name}" is not used.`,
    whatToDo: 'People change their names on their own page.',
  });
}
