import { escapeHtml, figures, FOOT, link, type Mail, page, PAPER, paragraph, sheet } from './layout';

export interface WithdrawnIntakeFacts {
  plantName: string;
  lineName: string;
  fileName: string;
  /** Who withdrew it. */
  by: string;
  /** "1 Dec 2026 14:05", in the plant's zone. */
  at: string;
  reason: string;
  /** Lots whose holds ended with it. */
  lotNumbers: string[];
  url: string;
}

const MOST_IN_SUBJECT = 5;

/** Tells those who were told of held lots that these holds ended, undecided, because the intake behind them was withdrawn. */
export function withdrawnIntakeMail(facts: WithdrawnIntakeFacts): Mail {
  const { lotNumbers, lineName } = facts;
  const isOne = lotNumbers.length === 1;
  const subject = isOne
    ? `Lot ${lotNumbers[0]} no longer held, ${lineName}`
    : `${lotNumbers.length} lots no longer held, ${lineName}: ${lotNumbers.slice(0, MOST_IN_SUBJECT).join(', ')}${lotNumbers.length > MOST_IN_SUBJECT ? ' …' : ''}`;
  const opening = `${facts.by} withdrew the intake of ${facts.fileName} for ${lineName} (${facts.plantName}) on ${facts.at}. ${isOne ? 'The hold' : 'The holds'} that came of it ended without a decision.`;
  const next = `Ebbline judges the line again without its readings. A lot that still stands out is held anew, and you get a mail of its own about it.`;
  const pairs: [string, string][] = [
    ['Reason', facts.reason],
    [isOne ? 'Lot' : 'Lots', lotNumbers.join(', ')],
  ];
  const html = page(
    subject,
    sheet(
      paragraph(`<strong>${escapeHtml(opening)}</strong>`) +
        paragraph(escapeHtml(next)) +
        figures(pairs) +
        paragraph(link(facts.url, 'Open the intake')),
      PAPER.action,
    ),
    FOOT,
  );
  const lines = pairs.map(([label, value]) => `  ${label}: ${value}`).join('\n');
  return { subject, html, text: `${opening}\n${next}\n\n${lines}\n  Open the intake: ${facts.url}\n\n${FOOT}\n` };
}
