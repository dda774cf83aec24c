import {
  ageInWords,
  ageSpanInWords,
  lotsInWords,
  percentInWords,
  type SummaryContent,
  type SummaryGauge,
  type SummaryLine,
} from '@app/contracts';
import { escapeHtml, PAPER } from '../messages/layout';

export const CHART_WIDTH = 568;
const LABEL_WIDTH = 214;
const END_WIDTH = 118;
const BAR_WIDTH = CHART_WIDTH - LABEL_WIDTH - END_WIDTH;
const ROW_HEIGHT = 26;
const BAR_HEIGHT = 14;
const MOST_GAUGES = 12;
/** The scale reaches a little beyond the allowance, so that what is beyond it shows. */
const FULL_SHARE = 1.25;
const AGE_STRENGTHS = [0.3, 0.5, 0.75, 1];

const text = (x: number, y: number, content: string, attributes = '') =>
  `<text x="${x}" y="${y}" ${attributes}>${escapeHtml(content)}</text>`;
const rectangle = (x: number, y: number, width: number, height: number, attributes: string) =>
  `<rect x="${x.toFixed(1)}" y="${y}" width="${Math.max(0, width).toFixed(1)}" height="${height}" ${attributes}/>`;

/** The week at a glance, as SVG: lots on hold by line and age, and each channel's movement against its allowance. */
export function summaryChart(content: SummaryContent): { svg: string; height: number } {
  const parts: string[] = [];
  let y = 24;
  const heading = (title: string, explanation: string) => {
    parts.push(text(0, y, title, 'font-size="14" font-weight="600"'));
    parts.push(text(0, y + 18, explanation, `font-size="12" fill="${PAPER.inkSoft}"`));
    y += 30;
  };
  const ages = content.total.week.stillOpenByAge.map(ageSpanInWords).join(', ');
  heading('Lots on hold at the week’s end, by line', `Pale to dark by age: ${ages}.`);
  const most = Math.max(1, ...content.lines.map(({ week }) => week.stillOpen.lots));
  for (const line of content.lines) {
    parts.push(lineRow(line, y, most, oldestOf(content, line)));
    y += ROW_HEIGHT;
  }
  const gauges = drawnGauges(content);
  if (gauges.length > 0) {
    y += 34;
    heading(
      'Slow movement as a share of its allowance',
      'Bar: this week. Upright mark: the week before. Rule: the allowance.',
    );
    const top = y;
    for (const gauge of gauges) {
      parts.push(gaugeRow(gauge, y));
      y += ROW_HEIGHT;
    }
    const x = LABEL_WIDTH + BAR_WIDTH / FULL_SHARE;
    parts.push(`<path d="M${x} ${top - 4}V${y}" stroke="${PAPER.held}" stroke-width="1.5" stroke-dasharray="4 3"/>`);
    parts.push(text(x, y + 12, '100\u202f%', `font-size="11" fill="${PAPER.held}" text-anchor="middle"`));
    y += 16;
  }
  const height = y + 8;
  const svg =
    `<svg xmlns="http://www.w3.org/2000/svg" width="${CHART_WIDTH}" height="${height}" viewBox="0 0 ${CHART_WIDTH} ${height}" ` +
    `font-family="Noto Sans" fill="${PAPER.ink}"><rect width="100%" height="100%" fill="${PAPER.sheet}"/>${parts.join('')}</svg>`;
  return { svg, height };
}

/** The same in words, for who sees no picture. */
export function chartInWords(content: SummaryContent): string {
  const lines = content.lines.map((line) => {
    const { stillOpen } = line.week;
    return stillOpen.lots === 0
      ? `${line.line.name} none`
      : `${line.line.name} ${lotsInWords(stillOpen.lots)}${oldestOf(content, line)}`;
  });
  const gauges = drawnGauges(content).map(
    ({ channel, line, share, lastWeekShare }) =>
      `${channel.name} on ${line.name} ${percentInWords(share ?? 0)}${lastWeekShare === null ? '' : ` (week before ${percentInWords(lastWeekShare)})`}`,
  );
  const moved = gauges.length === 0 ? '' : ` Slow movement as a share of its allowance: ${gauges.join(', ')}.`;
  return `Chart. Lots on hold at the week’s end: ${lines.length === 0 ? 'none' : lines.join(', ')}.${moved}`;
}

const drawnGauges = (content: SummaryContent) =>
  content.gauges.filter(({ share }) => share !== null).slice(0, MOST_GAUGES);

function oldestOf(content: SummaryContent, { line }: SummaryLine): string {
  const oldest = content.openHolds.holds.find((hold) => hold.line.id === line.id);
  return oldest === undefined ? '' : `, oldest ${ageInWords(oldest.ageHours)}`;
}

function lineRow({ line, week }: SummaryLine, y: number, most: number, oldest: string): string {
  const middle = y + ROW_HEIGHT / 2 + 4;
  const parts = [text(0, middle, shorten(line.name), 'font-size="13"'), ground(y)];
  const unit = BAR_WIDTH / most;
  let x = LABEL_WIDTH;
  week.stillOpenByAge.forEach(({ lots }, index) => {
    if (lots === 0) return;
    const strength = AGE_STRENGTHS[Math.min(index, AGE_STRENGTHS.length - 1)];
    parts.push(rectangle(x, y + 6, lots * unit - 1, BAR_HEIGHT, `fill="${PAPER.held}" fill-opacity="${strength}"`));
    x += lots * unit;
  });
  const words = week.stillOpen.lots === 0 ? 'none' : `${week.stillOpen.lots}${oldest}`;
  parts.push(text(LABEL_WIDTH + BAR_WIDTH + 8, middle, words, 'font-size="12"'));
  return parts.join('');
}

function gaugeRow({ channel, line, share, lastWeekShare }: SummaryGauge, y: number): string {
  const middle = y + ROW_HEIGHT / 2 + 4;
  const at = (value: number) => (BAR_WIDTH * Math.min(value, FULL_SHARE)) / FULL_SHARE;
  const now = share ?? 0;
  const parts = [
    text(0, middle, shorten(`${channel.name}, ${line.name}`), 'font-size="12"'),
    ground(y),
    rectangle(LABEL_WIDTH, y + 6, at(now), BAR_HEIGHT, `fill="${now > 1 ? PAPER.held : '#85560a'}"`),
  ];
  if (lastWeekShare !== null)
    parts.push(rectangle(LABEL_WIDTH + at(lastWeekShare) - 1, y + 3, 2, BAR_HEIGHT + 6, `fill="${PAPER.ink}"`));
  const before = lastWeekShare === null ? '' : `, was ${percentInWords(lastWeekShare)}`;
  parts.push(text(LABEL_WIDTH + BAR_WIDTH + 8, middle, `${percentInWords(now)}${before}`, 'font-size="12"'));
  return parts.join('');
}

const ground = (y: number) => rectangle(LABEL_WIDTH, y + 6, BAR_WIDTH, BAR_HEIGHT, `fill="${PAPER.ground}"`);

/** What fits beside the bars. */
const shorten = (label: string) => (label.length > 35 ? `${label.slice(0, 34)}…` : label);
