import { Inject, Injectable } from '@nestjs/common';
import { DomainError, type FieldError, type SetUpWorkbookProblem, type SetUpWorkbookView } from '@app/contracts';
import { type Database, insertAuditEntry, lockPlants, type Person, type Transaction } from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher, ThreadPools } from '@app/platform';
import { type SetUpReading, sheetSentences, sheetSummary } from '@app/workbook';
import { AccessService } from '../access/access.service';
import type { Change } from '../set-up/change';
import { applySetUp } from './apply-set-up';
import type { Applying } from './applying';
import { PeopleOfWorkbook } from './people-of-workbook.service';
import { readPresentSetUp } from './present-set-up';
import { RowProblems } from './row-problems';

const SHOWN_CHANGES = 500;
const TOO_LARGE = {
  sheet: null,
  cell: null,
  code: 'too-large',
  what: 'Reading this workbook takes more memory than is given to it.',
  whatToDo: 'Delete what is not part of the set-up, save it and drop it again.',
};

type Read = Omit<SetUpReading, 'document'> & { document: NonNullable<SetUpReading['document']> };

/** Takes a transaction back that was only to show, or that has problems. */
class TakenBack extends Error {
  constructor(readonly view: SetUpWorkbookView) {
    super('taken back');
  }
}

/** A plant's whole set-up as one workbook, out and in. */
@Injectable()
export class SetUpWorkbookService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
    private readonly dispatcher: Dispatcher,
    private readonly threads: ThreadPools,
    private readonly people: PeopleOfWorkbook,
  ) {}

  async download(person: Person, plantId: number): Promise<{ fileName: string; bytes: Buffer }> {
    await this.access.require(person.id, plantId, 'set_up_plant');
    const { document } = await readPresentSetUp(this.database, plantId);
    const bytes = await this.threads.run<Uint8Array>('write-set-up-workbook.thread', document);
    return { fileName: `Set-up of ${document.plant[0].name}.xlsx`, bytes: Buffer.from(bytes) };
  }

  /** Says what the workbook would do or, confirmed, does it; as a whole or not at all. */
  async upload(
    person: Person,
    plantId: number,
    file: { name: string; bytes: Buffer },
    isConfirmed: boolean,
  ): Promise<SetUpWorkbookView> {
    await this.access.require(person.id, plantId, 'set_up_plant');
    const reading = await this.read(plantId, file.bytes);
    const view = isRead(reading)
      ? await this.apply({ plantId, person, at: this.clock.now() }, file.name, reading, isConfirmed)
      : { ...NOTHING, problems: reading.problems, notices: reading.notices };
    if (isConfirmed && view.problems.length > 0) throw refused(view.problems);
    return view;
  }

  private async read(plantId: number, bytes: Buffer): Promise<SetUpReading> {
    const { document, places } = { document: null, places: {} as SetUpReading['places'] };
    const { timeZone } = (await readPresentSetUp(this.database, plantId)).document.plant[0];
    try {
      return await this.threads.run<SetUpReading>('read-set-up-workbook.thread', { bytes, timeZone });
    } catch (error) {
      if ((error as { code?: string }).code !== 'ERR_WORKER_OUT_OF_MEMORY') throw error;
      return { document, places, problems: [TOO_LARGE], notices: [] };
    }
  }

  private async apply(
    change: Change,
    fileName: string,
    reading: Read,
    isConfirmed: boolean,
  ): Promise<SetUpWorkbookView> {
    const owed = { owedJobIds: [] as number[], mailIds: [] as number[] };
    try {
      const view = await this.database.transaction(async (tx) => {
        const done = await this.applyWithin(tx, change, fileName, reading, owed);
        if (!isConfirmed || done.problems.length > 0) throw new TakenBack(done);
        await auditApplied(tx, change, fileName, done);
        return { ...done, isApplied: true };
      });
      await this.dispatcher.owedJobs(owed.owedJobIds);
      await this.dispatcher.mails(owed.mailIds);
      return view;
    } catch (error) {
      if (error instanceof TakenBack) return error.view;
      throw error;
    }
  }

  private async applyWithin(
    tx: Transaction,
    change: Change,
    fileName: string,
    { document: wanted, places, notices }: Read,
    owed: Pick<Applying, 'owedJobIds' | 'mailIds'>,
  ): Promise<SetUpWorkbookView> {
    // One import at a time: what it was compared with stays until it is done.
    await lockPlants(tx, [change.plantId]);
    const present = await readPresentSetUp(tx, change.plantId);
    const rows = new RowProblems(tx, places);
    const applying = { change, fileName, present, wanted, rows, ...owed };
    const comparisons = await applySetUp(applying, this.people);
    const documents = { present: present.document, wanted };
    const changes = comparisons.flatMap((sheet) => sheetSentences(sheet, documents));
    return {
      isApplied: false,
      problems: rows.problems.list(),
      notices: [...notices, ...rows.notices.list()],
      summary: comparisons.flatMap((sheet) => sheetSummary(sheet) ?? []),
      changes: changes.slice(0, SHOWN_CHANGES),
      changeCount: changes.length,
    };
  }
}

const NOTHING: SetUpWorkbookView = {
  isApplied: false,
  problems: [],
  notices: [],
  summary: [],
  changes: [],
  changeCount: 0,
};

const isRead = (reading: SetUpReading): reading is Read => reading.document !== null;

async function auditApplied(
  tx: Transaction,
  { plantId, person, at }: Change,
  fileName: string,
  { summary, changeCount }: SetUpWorkbookView,
): Promise<void> {
  if (changeCount === 0) return;
  await insertAuditEntry(tx, {
    plantId,
    at,
    actor: person,
    action: 'apply-set-up',
    thingKind: 'plant',
    thingId: plantId,
    sentence: `${person.name} applied the set-up in ${fileName}. ${summary.join(' ')}`,
    after: { fileName, summary },
  });
}

/** The problems as errors by cell: "/Lines/A3". */
function refused(problems: SetUpWorkbookProblem[]): DomainError {
  const fields = problems.map(({ sheet, cell, code, what, whatToDo }): FieldError => ({
    pointer: sheet === null ? '/file' : [`/${sheet}`, cell].filter(Boolean).join('/'),
    code,
    detail: `${what} ${whatToDo}`,
  }));
  const count = problems.length === 1 ? '1 problem' : `${problems.length} problems`;
  return new DomainError(
    'unprocessable',
    'set-up-workbook-problems',
    `Nothing was applied: the workbook has ${count}. Mend the cells that are named and drop it again.`,
    fields,
  );
}
