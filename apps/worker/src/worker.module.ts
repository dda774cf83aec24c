import { type DynamicModule, Module } from '@nestjs/common';
import { ReadIntakeHandler } from './intake/read-intake.handler';
import { RejudgeWithdrawnHandler } from './intake/rejudge-withdrawn.handler';
import { CompareSettledHandler } from './judging/compare-settled.handler';
import { HeldLotsMailService } from './judging/held-lots-mail.service';
import { JudgingService } from './judging/judging.service';
import { RejudgeSettledHandler } from './judging/rejudge-settled.handler';
import { ScoreChannelsHandler } from './judging/score-channels.handler';
import { ScoreIntakeHandler } from './judging/score-intake.handler';
import { MailProcessor } from './mail/mail.processor';
import { MailSendingService } from './mail/mail-sending.service';
import { OWED_JOB_HANDLERS, type OwedJobHandler } from './owed/owed-job-handler';
import { OwedWorkService } from './owed/owed-work.service';
import { RunningWork } from './owed/running-work';
import { StopService } from './owed/stop.service';
import { WorkProcessor } from './owed/work.processor';
import { ProposePlanHandler } from './plans/propose-plan.handler';
import { HoldRemindersService } from './reminders/hold-reminders.service';
import { DueSummariesProcessor } from './summary/due-summaries.processor';
import { DueSummariesService } from './summary/due-summaries.service';
import { SummaryMailService } from './summary/summary-mail.service';
import { WeeklySummaryHandler } from './summary/weekly-summary.handler';

const HANDLERS = [
  ReadIntakeHandler,
  ScoreIntakeHandler,
  ScoreChannelsHandler,
  RejudgeWithdrawnHandler,
  CompareSettledHandler,
  RejudgeSettledHandler,
  ProposePlanHandler,
  WeeklySummaryHandler,
];

const MAILING = [MailSendingService, MailProcessor];

/** Works off the queues. Needs PlatformModule and QueueModule, both global, in the same program. */
@Module({})
export class WorkerModule {
  /** Without `isMailing` mails stay in the outbox, for another worker to send; without `isTellingWeeks` no summary is due by itself. */
  static register({ isMailing = true, isTellingWeeks = true } = {}): DynamicModule {
    return {
      module: WorkerModule,
      providers: [
        JudgingService,
        HeldLotsMailService,
        SummaryMailService,
        ...HANDLERS,
        { provide: OWED_JOB_HANDLERS, inject: HANDLERS, useFactory: (...handlers: OwedJobHandler[]) => handlers },
        RunningWork,
        WorkProcessor,
        StopService,
        ...(isMailing ? MAILING : []),
        OwedWorkService,
        HoldRemindersService,
        DueSummariesService,
        ...(isTellingWeeks ? [DueSummariesProcessor] : []),
      ],
      exports: [WorkProcessor],
    };
  }
}
