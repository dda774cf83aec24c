import { Process, Processor } from '@nestjs/bull';
import { DUE_SUMMARIES_JOB, WORK_QUEUE } from '@app/contracts';
import { RunningWork } from '../owed/running-work';
import { DueSummariesService } from './due-summaries.service';

@Processor(WORK_QUEUE)
export class DueSummariesProcessor {
  constructor(
    private readonly due: DueSummariesService,
    private readonly running: RunningWork,
  ) {}

  /** Runs in the places that the queue's other processor has. */
  @Process({ name: DUE_SUMMARIES_JOB, concurrency: 0 })
  beat(): Promise<number> {
    return this.running.track(this.due.oweDue());
  }
}
