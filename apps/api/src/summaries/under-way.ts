import { JOB_OPTIONS, type SummaryUnderWay } from '@app/contracts';
import type { SummaryUnderWayRow } from '@app/data';

export function toUnderWay(row: SummaryUnderWayRow): SummaryUnderWay {
  const { jobId, weekStartsOn, since } = row;
  const isFailed = row.state === 'failed';
  return {
    jobId,
    weekStartsOn,
    state: isFailed ? 'failed' : 'being_made',
    since: since.toISOString(),
    sentence: isFailed ? whyFailed(row) : null,
  };
}

function whyFailed({ attempts, isAsked, why }: SummaryUnderWayRow): string {
  const tried = Math.min(attempts, JOB_OPTIONS.attempts);
  const parts = [
    tried > 1 ? `Ebbline tried ${tried} times and gave up.` : 'Ebbline gave up.',
    why ?? 'Why stands in the log, which the administrator can read.',
  ];
  if (!isAsked) parts.push('It tries again by itself after six hours.');
  return parts.join(' ');
}
