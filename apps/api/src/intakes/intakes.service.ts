import { createHash } from 'node:crypto';
import { Inject, Injectable } from '@nestjs/common';
import {
  type ConfirmIntakeRequest,
  DomainError,
  type IntakeListItem,
  type IntakeView,
  JOBS,
  type Page,
  type WorkbookAnswers,
} from '@app/contracts';
import {
  comparisonChanged,
  confirmIntake,
  type Database,
  findIntake,
  findLine,
  findSameFile,
  findWithdrawalObstacle,
  getIntakeBytes,
  getIntakeNotes,
  getIntakeOutcome,
  getLineContext,
  insertAuditEntry,
  insertIntake,
  insertOwedJob,
  type IntakeRow,
  listIntakeProblems,
  listIntakes,
  listShiftNames,
  lockIntake,
  refreshComparison,
  type Person,
  updateIntakeReadAgain,
} from '@app/data';
import { CLOCK, type Clock, DATABASE, Dispatcher, ThreadPools } from '@app/platform';
import { AccessService } from '../access/access.service';
import { intakeListItem, intakeView, isConfirmable, type StoredReport } from './intake-view';

const SHOWN_PROBLEMS = 1000;
/** An upload answers when its workbook has been read, or after this long with the intake still being read. */
const READING_WAIT_MS = 20_000;
const POLL_MS = 60;

@Injectable()
export class IntakesService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
    private readonly dispatcher: Dispatcher,
    private readonly threads: ThreadPools,
  ) {}

  /** Stores the workbook whole and owes its reading, in one transaction. */
  async receive(
    person: Person,
    lineId: number,
    file: { name: string; bytes: Buffer },
    { confirmsItself = false } = {},
  ): Promise<IntakeView> {
    const { thing: line } = await this.access.requireThing(
      person,
      await findLine(this.database, lineId),
      'upload_intake',
    );
    if (line.isRetired)
      throw new DomainError(
        'conflict',
        'line-retired',
        `${line.name} is retired. An administrator brings it back into use before its workbooks are taken in.`,
      );
    const receivedAt = this.clock.now();
    const { intakeId, owedJobId } = await this.database.transaction(async (tx) => {
      const sha256 = createHash('sha256').update(file.bytes).digest();
      const intakeId = await insertIntake(tx, {
        plantId: line.plantId,
        lineId,
        fileName: file.name,
        bytes: file.bytes,
        sha256,
        receivedBy: person.id,
        receivedAt,
        confirmsItself,
      });
      await insertAuditEntry(tx, {
        plantId: line.plantId,
        at: receivedAt,
        actor: person,
        action: 'upload',
        thingKind: 'intake',
        thingId: intakeId,
        sentence: `${senderOf(person)} uploaded ${file.name} for ${line.name} (${file.bytes.length} bytes).`,
        after: { state: 'received', sha256: sha256.toString('hex') },
      });
      const owedJobId = await insertOwedJob(tx, {
        plantId: line.plantId,
        name: JOBS.readIntake,
        subject: { intakeId },
        at: receivedAt,
      });
      return { intakeId, owedJobId };
    });
    await this.dispatcher.owedJobs([owedJobId]);
    return this.view(await this.waitUntilRead(intakeId));
  }

  async get(person: Person, id: number): Promise<IntakeView> {
    return this.view(await this.require(person, id, 'read'));
  }

  async list(person: Person, lineId: number, page: number, pageSize: number): Promise<Page<IntakeListItem>> {
    await this.access.requireThing(person, await findLine(this.database, lineId), 'read');
    const { items, total } = await listIntakes(this.database, lineId, page, pageSize);
    return { items: items.map(intakeListItem), total, page, pageSize };
  }

  /** Reads the workbook again, by answers that take the place of those before. */
  async readAgain(person: Person, id: number, answers: WorkbookAnswers): Promise<IntakeView> {
    await this.require(person, id, 'upload_intake');
    const owedJobId = await this.database.transaction(async (tx) => {
      const intake = (await lockIntake(tx, id)) as IntakeRow;
      refuseReadingAgain(intake);
      const at = this.clock.now();
      await updateIntakeReadAgain(tx, id, answers);
      await insertAuditEntry(tx, {
        plantId: intake.plantId,
        at,
        actor: person,
        action: 'answer',
        thingKind: 'intake',
        thingId: id,
        sentence: `${person.name} said how ${intake.fileName} for ${intake.lineName} is to be read.`,
        before: { answers: intake.answers },
        after: { answers },
      });
      return insertOwedJob(tx, { plantId: intake.plantId, name: JOBS.readIntake, subject: { intakeId: id }, at });
    });
    await this.dispatcher.owedJobs([owedJobId]);
    return this.view(await this.waitUntilRead(id));
  }

  async confirm(person: Person, id: number, request: ConfirmIntakeRequest = {}): Promise<IntakeView> {
    await this.require(person, id, 'upload_intake');
    const isOutdated = await this.database.transaction((tx) => refreshComparison(tx, id, this.clock.now()));
    if (isOutdated) throw comparisonChanged();
    const owedJobId = await this.database.transaction(async (tx) => {
      const intake = (await lockIntake(tx, id)) as IntakeRow;
      refuseUnconfirmable(intake);
      return confirmIntake(tx, { intake, person, at: this.clock.now(), ...request });
    });
    await this.dispatcher.owedJobs([owedJobId]);
    return this.view((await findIntake(this.database, id)) as IntakeRow);
  }

  /** The workbook as uploaded, with its problem cells marked. Marking runs in a thread. */
  async markedWorkbook(person: Person, id: number): Promise<{ fileName: string; bytes: Buffer }> {
    const intake = await this.require(person, id, 'read');
    if (intake.report === null)
      throw new DomainError('conflict', 'not-read', 'This workbook could not be read, so no cell of it can be marked.');
    const bytes = await getIntakeBytes(this.database, id);
    const problems = await listIntakeProblems(this.database, id, SHOWN_PROBLEMS);
    const marked = await this.threads.run<Uint8Array>('mark-workbook.thread', {
      bytes,
      problems,
      answers: intake.answers,
    });
    return { fileName: intake.fileName.replace(/(\.[a-z]{3,4})?$/i, ' marked.xlsx'), bytes: Buffer.from(marked) };
  }

  async require(person: Person, id: number, permission: 'read' | 'upload_intake'): Promise<IntakeRow> {
    const { thing } = await this.access.requireThing(person, await findIntake(this.database, id), permission);
    return thing;
  }

  private async waitUntilRead(id: number): Promise<IntakeRow> {
    const end = performance.now() + READING_WAIT_MS;
    for (;;) {
      const intake = (await findIntake(this.database, id)) as IntakeRow;
      if (intake.state !== 'received' || performance.now() >= end) return intake;
      await new Promise((resolve) => setTimeout(resolve, POLL_MS));
    }
  }

  private async view(intake: IntakeRow): Promise<IntakeView> {
    const firstRows = (intake.report as StoredReport | null)?.firstRows ?? [];
    const instants = firstRows.map(({ at }) => new Date(at));
    const [sameFile, problems, context, shifts, obstacle, outcome] = await Promise.all([
      findSameFile(this.database, intake),
      listIntakeProblems(this.database, intake.id, SHOWN_PROBLEMS),
      getLineContext(this.database, intake.lineId, { isWithRetired: true }),
      listShiftNames(this.database, intake.plantId, instants),
      findWithdrawalObstacle(this.database, intake),
      intake.state === 'scored' ? this.outcome(intake.id) : null,
    ]);
    const channels = new Map(context.channels.map((channel) => [channel.id, channel]));
    return intakeView({
      intake,
      sameFile,
      problems,
      channels,
      shifts,
      isWithdrawable: obstacle === undefined,
      outcome,
    });
  }

  private async outcome(intakeId: number) {
    const [outcome, notes] = await Promise.all([
      getIntakeOutcome(this.database, intakeId),
      getIntakeNotes(this.database, intakeId),
    ]);
    return { ...outcome, ...notes };
  }
}

const senderOf = ({ name, machine }: Person): string =>
  machine ? `${name}, by the API token "${machine.name}",` : name;

function refuseReadingAgain({ state, failure }: IntakeRow): void {
  if (state === 'needs_attention') return;
  if (state === 'received')
    throw new DomainError('conflict', 'still-being-read', 'The workbook is still being read. Answer when it is.');
  if (state === 'refused')
    throw new DomainError('conflict', 'refused', `This intake was refused: ${failure ?? 'it could not be read'}`);
  throw new DomainError(
    'conflict',
    'confirmed-already',
    'This intake was confirmed already, so it is not read in another way any more. Withdraw it and upload the workbook again.',
  );
}

function refuseUnconfirmable(intake: IntakeRow): void {
  if (isConfirmable(intake)) return;
  const conflict = (code: string, detail: string) => new DomainError('conflict', code, detail);
  if (intake.state === 'received')
    throw conflict('still-being-read', 'The workbook is still being read. Look at what was recognised, then confirm.');
  if (intake.state === 'refused')
    throw conflict('refused', `This intake was refused: ${intake.failure ?? 'it could not be read'}`);
  if (intake.state !== 'needs_attention') throw conflict('confirmed-already', 'This intake was confirmed already.');
  throw conflict(
    'blocked',
    'Something in this workbook must be put right before it can be confirmed. See its problems, mend it and upload it again.',
  );
}
