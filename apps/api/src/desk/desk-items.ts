import { type DeskItem, formatSpan, remindedSentence } from '@app/contracts';
import type { DeskChannelRow, DeskHoldRow, DeskIntakeRow, DeskPlanRow, DeskSpecificationRow } from '@app/data';

const ago = (since: Date, now: Date) => formatSpan(now.getTime() - since.getTime());
const causesOf = (hold: DeskHoldRow) => hold.sentences.join('; it also ') || 'is held';
/** "Held 9 h 12 min. The quality managers were reminded 1 h ago." */
const heldWords = ({ openedAt, reminders }: DeskHoldRow, now: Date) =>
  [`Held ${ago(openedAt, now)}.`, remindedSentence(reminders, now)].filter((sentence) => sentence !== null).join(' ');
const place = (row: { lineId: number; lineName: string }) => ({ lineId: row.lineId, lineName: row.lineName });

export function decideItem(hold: DeskHoldRow, now: Date): DeskItem {
  return {
    group: 'decide',
    ...place(hold),
    sentence: `Lot ${hold.lotNumber}, ${hold.lineName}: ${causesOf(hold)}. ${heldWords(hold, now)}`,
    since: hold.openedAt.toISOString(),
    action: { label: `Decide lot ${hold.lotNumber}`, path: `/holds/${hold.id}` },
  };
}

export function setAsideItem(hold: DeskHoldRow, now: Date): DeskItem {
  return {
    group: 'set_aside',
    ...place(hold),
    sentence: `Lot ${hold.lotNumber}, ${hold.lineName}, is held and not yet set aside: it ${causesOf(hold)}. ${heldWords(hold, now)}`,
    since: hold.openedAt.toISOString(),
    action: { label: `Set lot ${hold.lotNumber} aside`, path: `/holds/${hold.id}` },
  };
}

export function fixItem(intake: DeskIntakeRow, now: Date): DeskItem {
  return {
    group: 'fix',
    ...place(intake),
    sentence: `${intake.fileName}, ${intake.lineName}: ${intakeWords(intake)} Received ${ago(intake.receivedAt, now)} ago.`,
    since: intake.receivedAt.toISOString(),
    action: { label: intakeLabel(intake), path: `/intakes/${intake.id}` },
  };
}

const counted = (count: number, one: string) => `${count} ${one}${count === 1 ? '' : 's'}`;

function intakeWords(intake: DeskIntakeRow): string {
  if (intake.state === 'refused') return `refused. ${intake.failure ?? ''}`.trim();
  if (intake.blockingCount > 0)
    return `${counted(intake.blockingCount, 'problem')} must be put right before it can go in.`;
  return `${counted(intake.rowsRead, 'row')} read, ${intake.rowsNotUsed} not used; it waits for your word.`;
}

function intakeLabel({ state, blockingCount }: DeskIntakeRow): string {
  if (state === 'refused') return 'See why it was refused';
  return blockingCount > 0 ? 'Put the workbook right' : 'Confirm the workbook';
}

export function approveItem(plan: DeskPlanRow, now: Date): DeskItem {
  return {
    group: 'approve',
    ...place(plan),
    sentence: `Plan ${plan.revision} for ${plan.channelName}, ${plan.lineName}, was proposed by ${plan.proposedByName} ${ago(plan.proposedAt, now)} ago.`,
    since: plan.proposedAt.toISOString(),
    action: { label: `Read plan ${plan.revision}`, path: `/plans/${plan.id}` },
  };
}

export function approveSpecificationItem(proposal: DeskSpecificationRow, plantId: number, now: Date): DeskItem {
  return {
    group: 'approve',
    lineId: null,
    lineName: null,
    sentence: `A specification of ${proposal.productCode}, ${proposal.characteristicName}, was proposed by ${proposal.proposedByName} ${ago(proposal.proposedAt, now)} ago.`,
    since: proposal.proposedAt.toISOString(),
    action: { label: 'Read the specification', path: `/plants/${plantId}/set-up/specifications` },
  };
}

export function checkItem(channel: DeskChannelRow): DeskItem {
  const gauge = channel.gaugeAssetNumber === null ? 'the gauge' : `gauge ${channel.gaugeAssetNumber}`;
  return {
    group: 'check',
    ...place(channel),
    sentence: `${channel.channelName}, ${channel.lineName}: the slow movement is beyond what the plan allows, so lot ${channel.lotNumber} could not be scored. Check ${gauge}.`,
    since: channel.lotStartsAt.toISOString(),
    action: { label: `See ${channel.channelName.toLowerCase()}`, path: `/channels/${channel.channelId}` },
  };
}
