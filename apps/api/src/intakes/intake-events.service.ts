import { Inject, Injectable, type MessageEvent } from '@nestjs/common';
import type { IntakeProgress } from '@app/contracts';
import { type Database, findIntake, type IntakeRow, type Person } from '@app/data';
import { DATABASE } from '@app/platform';
import { concat, defer, exhaustMap, interval, map, merge, type Observable, scan, takeWhile } from 'rxjs';
import { IntakesService } from './intakes.service';
import { ProgressHub } from './progress-hub';

/** Beside what workers tell, the state itself is looked at this often: a telling may be lost, the state is not. */
const LOOK_EVERY_MS = 2_000;

/** The progress of an intake as an event stream that ends with the intake. */
@Injectable()
export class IntakeEventsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly intakes: IntakesService,
    private readonly hub: ProgressHub,
  ) {}

  async watch(person: Person, id: number): Promise<Observable<MessageEvent>> {
    await this.intakes.require(person, id, 'read');
    const look = () => this.look(id);
    const looks = concat(defer(look), interval(LOOK_EVERY_MS).pipe(exhaustMap(look)));
    return merge(this.hub.of(id), looks).pipe(
      scan(neverBack),
      takeWhile((progress) => !isOver(progress), true),
      map((progress) => ({ data: progress })),
    );
  }

  private async look(id: number): Promise<IntakeProgress> {
    return asProgress((await findIntake(this.database, id)) as IntakeRow);
  }
}

const isOver = ({ stage }: IntakeProgress) => stage === 'failed' || stage === 'done';

/** A look at the state knows no count of scored channels: what was told before stands. */
function neverBack(told: IntakeProgress, next: IntakeProgress): IntakeProgress {
  const isBehind = next.stage === told.stage && next.channelsScored < told.channelsScored;
  return isBehind ? told : next;
}

function asProgress(intake: IntakeRow): IntakeProgress {
  const total = intake.channelIds?.length ?? 0;
  const progress = { intakeId: intake.id, rowsRead: intake.rowsRead, channelsScored: 0, channelsTotal: total };
  switch (intake.state) {
    case 'received':
      return { ...progress, stage: 'reading', sentence: 'Reading the workbook.' };
    case 'needs_attention':
      return {
        ...progress,
        stage: 'read',
        sentence: `Read ${intake.rowsRead} rows. Look at what was recognised, then confirm.`,
      };
    case 'queued':
      return { ...progress, stage: 'storing', sentence: 'Waiting for its turn, then storing the readings.' };
    case 'working':
      return { ...progress, stage: 'judging', sentence: `Readings are stored; judging ${total} channels.` };
    case 'scored':
      return { ...progress, stage: 'done', channelsScored: total, sentence: 'Scored.' };
    case 'refused':
      return { ...progress, stage: 'failed', sentence: intake.failure ?? 'Refused.' };
    case 'withdrawn':
      return { ...progress, stage: 'done', channelsScored: total, sentence: 'Withdrawn.' };
  }
}
