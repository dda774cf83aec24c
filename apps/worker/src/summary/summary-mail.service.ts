import { Inject, Injectable } from '@nestjs/common';
import type { SummaryContent } from '@app/contracts';
import { insertMails, listSummaryRecipients, type OutboxAttachment, type Transaction } from '@app/data';
import { CHART_CONTENT_ID, renderPng, summaryChart, weeklySummaryMail } from '@app/mail';
import { CONFIG, type Config } from '@app/platform';
import { writeSummary } from '@app/workbook';

const XLSX = 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet';

/** A week that was missed, and has its page now. */
export interface EarlierWeek {
  id: number;
  weekStartsOn: string;
  headline: string;
}

/** Writes the mails of a week's summary, with its chart and its workbook. */
@Injectable()
export class SummaryMailService {
  constructor(@Inject(CONFIG) private readonly config: Config) {}

  /** What goes with the mails; made before the transaction, since drawing takes a while. */
  async attachments(content: SummaryContent): Promise<OutboxAttachment[]> {
    const week = content.week.startsOn;
    return [
      {
        fileName: `week-${week}.png`,
        mediaType: 'image/png',
        contentId: CHART_CONTENT_ID,
        bytes: renderPng(summaryChart(content).svg),
      },
      { fileName: `summary-${week}.xlsx`, mediaType: XLSX, contentId: null, bytes: await writeSummary(content) },
    ];
  }

  /** Returns the outbox ids to send once the transaction has committed, and to how many people. */
  async write(
    tx: Transaction,
    summary: { id: number; plantId: number; version: number; content: SummaryContent; earlier: EarlierWeek[] },
    attachments: OutboxAttachment[],
    at: Date,
  ): Promise<number[]> {
    const { publicUrl } = this.config;
    const urlOf = (id: number) => `${publicUrl}/summaries/${id}`;
    const earlier = summary.earlier.map((week) => ({ ...week, url: urlOf(week.id) }));
    const allWeeksUrl = `${publicUrl}/plants/${summary.plantId}/summaries`;
    const mail = weeklySummaryMail({ ...summary, earlier, allWeeksUrl, publicUrl, url: urlOf(summary.id) });
    const recipients = await listSummaryRecipients(tx, summary.plantId);
    const event = `summary-${summary.id}`;
    const mails = recipients.map(({ email }) => ({ event, kind: 'weekly-summary', recipient: email, ...mail }));
    return insertMails(tx, summary.plantId, mails, at, attachments);
  }
}
