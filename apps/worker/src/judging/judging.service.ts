import { Inject, Injectable } from '@nestjs/common';
import {
  type Database,
  InputsChangedError,
  type JudgedChannel,
  type Recorded,
  recordJudgements,
  type Transaction,
} from '@app/data';
import { CLOCK, type Clock, CONFIG, type Config, DATABASE, ThreadPools } from '@app/platform';
import { METHOD_VERSION } from '@app/scoring';
import type { JudgeChannelTask } from './judge-channel.thread';

const MAX_ROUNDS = 8;

export interface JudgingRequest<T> {
  channelIds: number[];
  intakeId: number | null;
  rejudgeFrom: number | null;
  onScored?: (scored: number, total: number) => void;
  /** Writes the rest of the outcome in the same transaction as verdicts and holds. */
  finish: (tx: Transaction, recorded: Recorded) => Promise<T>;
}

/** Judges channels in threads and records them in one transaction; what changed meanwhile is judged again. */
@Injectable()
export class JudgingService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly threads: ThreadPools,
  ) {}

  async judge<T>(request: JudgingRequest<T>): Promise<T> {
    const judged = new Map<number, JudgedChannel>();
    let stale = request.channelIds;
    for (let round = 1; ; round++) {
      await this.judgeChannels(stale, judged, request);
      try {
        return await this.database.transaction(async (tx) => {
          const recorded = await recordJudgements(tx, [...judged.values()], {
            intakeId: request.intakeId,
            methodVersion: METHOD_VERSION,
            at: this.clock.now(),
          });
          return request.finish(tx, recorded);
        });
      } catch (error) {
        if (!(error instanceof InputsChangedError) || round >= MAX_ROUNDS) throw error;
        stale = error.channelIds;
      }
    }
  }

  /** A channel as it would be judged now; nothing is recorded. */
  onTrial(channelId: number, rejudgeFrom: number | null): Promise<JudgedChannel> {
    const task: JudgeChannelTask = { databaseUrl: this.config.databaseUrl, channelId, rejudgeFrom };
    return this.threads.run<JudgedChannel>('judge-channel.thread', task);
  }

  private async judgeChannels(
    channelIds: number[],
    judged: Map<number, JudgedChannel>,
    request: JudgingRequest<unknown>,
  ): Promise<void> {
    for (const id of channelIds) judged.delete(id);
    await Promise.all(
      channelIds.map(async (channelId) => {
        const channel = await this.onTrial(channelId, request.rejudgeFrom);
        for (const segment of channel.segments) segment.inputHash = Buffer.from(segment.inputHash);
        judged.set(channelId, channel);
        request.onScored?.(judged.size, request.channelIds.length);
      }),
    );
  }
}
