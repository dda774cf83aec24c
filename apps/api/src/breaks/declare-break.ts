import { type BreakKind, JOBS } from '@app/contracts';
import {
  findPlanInForce,
  insertAuditEntry,
  insertBreak,
  insertOwedJob,
  type Person,
  type Transaction,
} from '@app/data';

const KIND_WORDS = {
  adjustment: 'an adjustment',
  gauge_change: 'a gauge change',
  process_change: 'a process change',
} as const;

export interface BreakDeclaration {
  channel: { id: number; plantId: number; name: string; lineName: string };
  break: { at: Date; kind: BreakKind; reason: string };
  person: Person;
  now: Date;
}

/** Writes that a channel's baseline starts afresh, and owes the judging of the lots that the old one reached across the instant. */
export async function declareBreak(
  tx: Transaction,
  { channel, break: { at, kind, reason }, person, now }: BreakDeclaration,
): Promise<{ id: number; owedJobId: number }> {
  const { plantId } = channel;
  const id = await insertBreak(tx, {
    plantId,
    channelId: channel.id,
    at,
    kind,
    reason,
    declaredBy: person.id,
    declaredAt: now,
  });
  await insertAuditEntry(tx, {
    plantId,
    at: now,
    actor: person,
    action: 'declare-break',
    thingKind: 'channel',
    thingId: channel.id,
    sentence: `${person.name} declared ${KIND_WORDS[kind]} on ${channel.name} of ${channel.lineName}: ${reason}`,
    after: { breakId: id, at: at.toISOString(), kind, reason },
  });
  const plan = await findPlanInForce(tx, channel.id);
  const reachMs = plan ? (plan.parameters.effectivePeriodSeconds / 2) * 1000 : 0;
  const owedJobId = await insertOwedJob(tx, {
    plantId,
    name: JOBS.scoreChannels,
    subject: {
      channelIds: [channel.id],
      reason: `a break on ${channel.name}`,
      rejudgeFrom: new Date(at.getTime() - reachMs).toISOString(),
    },
    at: now,
  });
  return { id, owedJobId };
}
