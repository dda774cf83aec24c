import { Process, Processor } from '@nestjs/bull';
import type { OnApplicationBootstrap } from '@nestjs/common';
import { DUE_SUMMARIES_JOB, WORK_QUEUE } from '@app/contracts';
import { RunningWork } from '../owed/running-work';
import { DueSummariesService } from './due-summaries.service';

@Processor(WORK_QUEUE)
export class DueSummariesProcessor implements OnApplicationBootstrap {
  constructor(
    private readonly due: DueSummariesService,
    private readonly running: RunningWork,
  ) {}

  onApplicationBootstrap(): Promise<void> {
    return this.due.start();
  }

  /** Runs in the places that the queue's other processor has. */
  @Process({ name: DUE_SUMMARIES_JOB, concurrency: 0 })
  beat(): Promise<number> {
    return this.running.track(this.due.oweDue());
  }
}
