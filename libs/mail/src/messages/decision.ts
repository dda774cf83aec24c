import { type Disposition, formatNumber, SIGNATURE_MEANINGS } from '@app/contracts';
import { escapeHtml, figures, FOOT, link, type Mail, page, PAPER, paragraph, sheet } from './layout';

export interface DecisionFacts {
  plantName: string;
  lineName: string;
  lotNumber: string;
  disposition: Disposition;
  reason: string;
  note: string | null;
  /** The decider's printed name. */
  by: string;
  /** "1 Dec 2026 14:05", in the plant's zone. */
  at: string;
  quantity: number | null;
  quantityUnit: string | null;
  isSetAside: boolean;
  /** What the lot was held for, as phrases without its number. */
  causes: string[];
  url: string;
}

const EDGES: Partial<Record<Disposition, string>> = { release: PAPER.released, scrap: PAPER.scrapped };

/** Tells the line what was decided of a held lot. */
export function decisionMail(facts: DecisionFacts): Mail {
  const meaning = SIGNATURE_MEANINGS[facts.disposition];
  const subject = `Lot ${facts.lotNumber} ${meaning}, ${facts.lineName}`;
  const opening = `${facts.by} ${meaning} lot ${facts.lotNumber} of ${facts.lineName} (${facts.plantName}) on ${facts.at}.`;
  const next = nextStep(facts);
  const pairs: [string, string][] = [
    ['Reason', facts.reason],
    ...(facts.note ? ([['Note', facts.note]] as [string, string][]) : []),
    ['It was held because', `it ${facts.causes.join('; it also ')}`],
    ...(facts.quantity !== null
      ? ([['Quantity', `${formatNumber(facts.quantity, 0)} ${facts.quantityUnit ?? ''}`.trim()]] as [string, string][])
      : []),
    ['Signature', `${facts.by}, ${facts.at}, "${meaning}"`],
  ];
  const html = page(
    subject,
    sheet(
      paragraph(`<strong>${escapeHtml(opening)}</strong>`) +
        paragraph(escapeHtml(next)) +
        figures(pairs) +
        paragraph(link(facts.url, `Open the hold of lot ${facts.lotNumber}`)),
      EDGES[facts.disposition] ?? PAPER.action,
    ),
    FOOT,
  );
  const lines = pairs.map(([label, value]) => `  ${label}: ${value}`).join('\n');
  return { subject, html, text: `${opening}\n${next}\n\n${lines}\n  Open the hold: ${facts.url}\n\n${FOOT}\n` };
}

function nextStep(facts: DecisionFacts): string {
  if (facts.disposition === 'release')
    return facts.isSetAside ? 'It was set aside; it may move on now.' : 'It may move on now.';
  if (facts.disposition === 'scrap')
    return facts.isSetAside
      ? 'It stands aside. Make it unusable before disposal, as the plant’s procedure says.'
      : 'Nobody has confirmed yet that it was set aside: take it out of the line now.';
  return 'Follow what the decision says.';
}
