import { formatMean, formatNumber, formatValue, holdReason } from '@app/contracts';
import { escapeHtml, figures, FOOT, link, type Mail, page, PAPER, paragraph, sheet } from './layout';

/** One cause of a hold with the figures of its verdict. */
export interface HeldCause {
  channelName: string;
  unit: string;
  resolution: number;
  gaugeAssetNumber: string | null;
  sentence: string;
  lotMean: number | null;
  baseline: number | null;
  score: number | null;
  limit: number | null;
  controlLow: number | null;
  controlHigh: number | null;
  lower: number | null;
  upper: number | null;
  isProvisional: boolean;
  wouldConstantHold: boolean;
}

export interface HeldLotFacts {
  lotNumber: string;
  product: string;
  /** "1 Dec 06:00 to 08:00", in the plant's zone. */
  span: string;
  isLate: boolean;
  url: string;
  causes: HeldCause[];
}

export interface HeldLotsFacts {
  plantName: string;
  lineName: string;
  /** What was scored: "the intake of coater-2.xlsx" or "a new look after a break". */
  occasion: string;
  lots: HeldLotFacts[];
}

/** One mail about all lots that one scoring held. */
export function heldLotsMail(facts: HeldLotsFacts): Mail {
  const { lots } = facts;
  const numbers = lots.map((lot) => lot.lotNumber);
  const subject =
    lots.length === 1
      ? `Lot ${numbers[0]} held, ${facts.lineName}`
      : `${lots.length} lots held, ${facts.lineName}: ${numbers.slice(0, 5).join(', ')}${numbers.length > 5 ? ' …' : ''}`;
  const isOne = lots.length === 1;
  const opening = `${isOne ? 'One lot' : `${lots.length} lots`} of ${facts.lineName} (${facts.plantName}) may not move on until ${isOne ? 'it is' : 'they are'} decided. Held by ${facts.occasion}.`;
  const html = page(
    subject,
    paragraph(escapeHtml(opening)) + lots.map((lot) => sheet(lotHtml(lot), PAPER.held)).join(''),
    FOOT,
  );
  const text = `${opening}\n\n${lots.map(lotText).join('\n\n')}\n\n${FOOT}\n`;
  return { subject, html, text };
}

const reasonOf = (lot: HeldLotFacts) =>
  holdReason(
    lot.lotNumber,
    lot.causes.map((cause) => cause.sentence),
  );

const headOf = (lot: HeldLotFacts) =>
  `Product ${lot.product}, ${lot.span}.${lot.isLate ? ' Held late: it was within its control limits before later readings arrived.' : ''}`;

/** One cause a channel: all signals of a channel share its figures. */
const channelsOf = (lot: HeldLotFacts) =>
  [...new Map([...lot.causes].reverse().map((cause) => [cause.channelName, cause])).values()].reverse();

function lotHtml(lot: HeldLotFacts): string {
  return (
    paragraph(`<strong>${escapeHtml(reasonOf(lot))}</strong>`) +
    paragraph(escapeHtml(headOf(lot)), `color:${PAPER.inkSoft}`) +
    channelsOf(lot)
      .map((cause) => figures(causeFigures(cause)))
      .join('') +
    paragraph(link(lot.url, `Open the hold of lot ${lot.lotNumber}`))
  );
}

function lotText(lot: HeldLotFacts): string {
  const causes = channelsOf(lot).map((cause) =>
    causeFigures(cause)
      .map(([label, value]) => `  ${label}: ${value}`)
      .join('\n'),
  );
  return `${reasonOf(lot)}\n${headOf(lot)}\n${causes.join('\n\n')}\n  Open the hold: ${lot.url}`;
}

function causeFigures(cause: HeldCause): [string, string][] {
  const pairs: [string, string][] = [
    ['Characteristic', cause.channelName],
    ['Gauge', cause.gaugeAssetNumber ?? 'not recorded'],
  ];
  if (cause.lotMean !== null) pairs.push(['Lot mean as measured', formatMean(cause.lotMean, cause)]);
  pairs.push(['Lot mean as corrected', 'No gauge checks: not corrected']);
  if (cause.baseline !== null) pairs.push(['Baseline without the lot', formatMean(cause.baseline, cause)]);
  if (cause.score !== null)
    pairs.push(['Score', `${formatNumber(cause.score, 1)}\u202fσ${cause.isProvisional ? ' (provisional)' : ''}`]);
  if (cause.limit !== null) pairs.push(['Control limits of the score', `±${formatNumber(cause.limit, 1)}\u202fσ`]);
  if (cause.controlLow !== null && cause.controlHigh !== null)
    pairs.push([
      'Control limits of the lot mean',
      `${formatMean(cause.controlLow, cause)} to ${formatMean(cause.controlHigh, cause)}`,
    ]);
  if (cause.lower !== null || cause.upper !== null)
    pairs.push([
      'Specification limits',
      `${cause.lower === null ? 'none' : formatValue(cause.lower, cause)} to ${cause.upper === null ? 'none' : formatValue(cause.upper, cause)}`,
    ]);
  if (cause.score !== null)
    pairs.push([
      'Limits on unadjusted lot means',
      cause.wouldConstantHold ? 'would have held it too' : 'would not have held it',
    ]);
  return pairs;
}
