import { InjectQueue } from '@nestjs/bull';
import { type BeforeApplicationShutdown, Injectable } from '@nestjs/common';
import type { Queue } from 'bull';
import { MAIL_QUEUE, WORK_QUEUE } from '@app/contracts';
import { ThreadPools, within } from '@app/platform';
import { RunningWork } from './running-work';

const PAUSE_MS = 500;
const GRACE_MS = 1500;
const CUT_SHORT_MS = 1000;

/** Stops the work: takes no more, waits a little for what runs, then ends its threads. What was cut short is still owed. */
@Injectable()
export class StopService implements BeforeApplicationShutdown {
  constructor(
    @InjectQueue(WORK_QUEUE) private readonly work: Queue,
    @InjectQueue(MAIL_QUEUE) private readonly mail: Queue,
    private readonly running: RunningWork,
    private readonly threads: ThreadPools,
  ) {}

  async beforeApplicationShutdown(): Promise<void> {
    this.running.beginToStop();
    await within(PAUSE_MS, Promise.allSettled([this.work.pause(true, true), this.mail.pause(true, true)]));
    await this.running.settled(GRACE_MS);
    await this.threads.close();
    await this.running.settled(CUT_SHORT_MS);
  }
}
