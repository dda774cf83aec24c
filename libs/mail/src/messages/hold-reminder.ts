import { ageWords, formatNumber, formatQuantity, holdReason, type ReminderAudience } from '@app/contracts';
import { escapeHtml, figures, FOOT, link, type Mail, page, PAPER, paragraph, sheet } from './layout';

export interface OldHoldFacts {
  lotNumber: string;
  lineName: string;
  product: string;
  ageMs: number;
  /** "1 Dec 2026, 06:00", in the plant's zone. */
  openedAt: string;
  sentences: string[];
  quantity: number | null;
  quantityUnit: string | null;
  /** In the plant's currency. */
  value: number | null;
  isSetAside: boolean;
  /** Names of the quality managers who may decide it. */
  deciders: string[];
  /** When they were reminded, in the plant's zone. */
  remindedAt: string | null;
  url: string;
}

export interface HoldReminderFacts {
  plantName: string;
  audience: ReminderAudience;
  /** The plant's own time after which the audience is told, h. */
  hours: number;
  currency: string | null;
  holds: OldHoldFacts[];
}

/** Tells of open holds that have grown old: what, how old, how much, and who was asked. One mail for all of a plant. */
export function holdReminderMail(facts: HoldReminderFacts): Mail {
  const subject = subjectOf(facts);
  const opening = `${openingOf(facts)} ${askOf(facts)}`;
  const foot = `You get this once a lot, when its hold is older than ${hoursWords(facts.hours)}. ${FOOT}`;
  const html = page(
    subject,
    paragraph(escapeHtml(opening)) + facts.holds.map((hold) => sheet(holdHtml(hold, facts), PAPER.held)).join(''),
    foot,
  );
  const text = `${opening}\n\n${facts.holds.map((hold) => holdText(hold, facts)).join('\n\n')}\n\n${foot}\n`;
  return { subject, html, text };
}

const hoursWords = (hours: number) => `${formatNumber(hours, Number.isInteger(hours) ? 0 : 1)} h`;

function subjectOf({ holds, hours, plantName }: HoldReminderFacts): string {
  const [oldest] = holds;
  if (holds.length === 1) return `Lot ${oldest.lotNumber} held for ${ageWords(oldest.ageMs)}, ${oldest.lineName}`;
  return `${holds.length} lots held for more than ${hoursWords(hours)}, ${plantName}`;
}

function openingOf({ holds, plantName, currency }: HoldReminderFacts): string {
  const [oldest] = holds;
  if (holds.length === 1)
    return `Lot ${oldest.lotNumber} of ${oldest.lineName} (${plantName}) has been held for ${ageWords(oldest.ageMs)} and nobody has decided it.`;
  return `${holds.length} lots of ${plantName} are held and nobody has decided them, the oldest for ${ageWords(oldest.ageMs)}. Together: ${totalWords(holds, currency)}.`;
}

function askOf({ audience, holds }: HoldReminderFacts): string {
  const isOne = holds.length === 1;
  if (audience === 'quality_manager') return `${isOne ? 'It waits' : 'They wait'} for a quality manager’s decision.`;
  return 'Ask those named below what stands in the way of a decision.';
}

/** Quantities of one unit together; worth together only when each is known. */
function totalWords(holds: OldHoldFacts[], currency: string | null): string {
  const units = new Map<string, number>();
  for (const { quantity, quantityUnit } of holds)
    if (quantity !== null) units.set(quantityUnit ?? '', (units.get(quantityUnit ?? '') ?? 0) + quantity);
  const parts = [...units].map(([unit, sum]) => formatQuantity(sum, unit).trim());
  const unknown = holds.filter(({ quantity }) => quantity === null).length;
  if (unknown > 0) parts.push(`${unknown} ${unknown === 1 ? 'lot' : 'lots'} of unknown quantity`);
  const isPriced = currency !== null && holds.every(({ value }) => value !== null);
  const value = holds.reduce((sum, hold) => sum + (hold.value ?? 0), 0);
  const worth = isPriced ? ` (worth ${formatQuantity(Math.round(value), currency)})` : '';
  return parts.join(' and ') + worth;
}

function figuresOf(hold: OldHoldFacts, { currency, audience }: HoldReminderFacts): [string, string][] {
  return [
    ['Line', hold.lineName],
    ['Product', hold.product],
    ['Held since', `${hold.openedAt}, for ${ageWords(hold.ageMs)}`],
    ['Quantity at risk', totalWords([hold], currency)],
    ['Set aside', hold.isSetAside ? 'yes' : 'nobody has confirmed it yet'],
    [
      'May decide',
      hold.deciders.length > 0 ? hold.deciders.join(', ') : 'no quality manager: each confirmed its intake',
    ],
    ...(audience === 'director'
      ? ([['Quality managers reminded', hold.remindedAt ?? 'no, none of them takes reminders']] as [string, string][])
      : []),
  ];
}

const reasonOf = (hold: OldHoldFacts) => holdReason(hold.lotNumber, hold.sentences);

function holdHtml(hold: OldHoldFacts, facts: HoldReminderFacts): string {
  return (
    paragraph(`<strong>${escapeHtml(reasonOf(hold))}</strong>`) +
    figures(figuresOf(hold, facts)) +
    paragraph(link(hold.url, `Open the hold of lot ${hold.lotNumber}`))
  );
}

function holdText(hold: OldHoldFacts, facts: HoldReminderFacts): string {
  const lines = figuresOf(hold, facts).map(([label, value]) => `  ${label}: ${value}`);
  return `${reasonOf(hold)}\n${lines.join('\n')}\n  Open the hold: ${hold.url}`;
}
