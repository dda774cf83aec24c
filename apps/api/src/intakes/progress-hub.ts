import { Inject, Injectable, type OnApplicationBootstrap, type OnApplicationShutdown } from '@nestjs/common';
import type { IntakeProgress } from '@app/contracts';
import { listenForProgress } from '@app/data';
import { CONFIG, type Config } from '@app/platform';
import { filter, type Observable, Subject } from 'rxjs';

/** Progress as workers tell it, for whoever watches an intake. One listening connection a process. */
@Injectable()
export class ProgressHub implements OnApplicationBootstrap, OnApplicationShutdown {
  private readonly progress = new Subject<IntakeProgress>();
  private listener?: ReturnType<typeof listenForProgress>;

  constructor(@Inject(CONFIG) private readonly config: Config) {}

  onApplicationBootstrap(): void {
    this.listener = listenForProgress(this.config.databaseUrl, (progress) => this.progress.next(progress));
  }

  of(intakeId: number): Observable<IntakeProgress> {
    return this.progress.pipe(filter((progress) => progress.intakeId === intakeId));
  }

  async onApplicationShutdown(): Promise<void> {
    this.progress.complete();
    await this.listener?.close();
  }
}
