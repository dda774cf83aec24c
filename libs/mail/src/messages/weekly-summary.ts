import { type SummaryContent, weekInWords } from '@app/contracts';
import { chartInWords, CHART_WIDTH, summaryChart } from '../chart/summary-chart';
import { escapeHtml, FOOT, link, type Mail, page, PAPER, paragraph, sheet } from './layout';
import { summaryAnswers } from './summary-answers';
import { type SummarySection, summarySections } from './summary-sections';

export interface WeeklySummaryFacts {
  content: SummaryContent;
  version: number;
  /** The summary's own page. */
  url: string;
  /** Where pages stand, without a slash at the end. */
  publicUrl: string;
  /** Weeks that were missed and have their pages only now, oldest first. */
  earlier?: { weekStartsOn: string; headline: string; url: string }[];
  /** The list of weeks. */
  allWeeksUrl: string;
}

/** The chart's place in the mail. */
export const CHART_CONTENT_ID = 'week@ebbline';

/** Narrow screens show a table's rows one under the other, each value with its name. */
const NARROW = [
  '@media (max-width:480px){.rows thead{display:none}',
  '.rows td{display:block;border-bottom:0!important;padding:1px 0!important}',
  `.rows tr{display:block;border-bottom:1px solid ${PAPER.hairline};padding:4px 0}`,
  '.rows .name{display:inline!important}}',
].join('');
const MOST_EARLIER = 8;

/** The week of a plant: the one thing to know first, then its answers, then the figures. Reads the same without pictures. */
export function weeklySummaryMail(facts: WeeklySummaryFacts): Mail {
  const { content, version } = facts;
  const week = weekInWords(content.week.startsOn);
  const subject = `${content.plant.name}, ${week}: ${content.headline}`;
  const heading = `${content.plant.name}, week of ${week}${version > 1 ? `, version ${version}` : ''}`;
  const answers = [...summaryAnswers(content), ...earlierSection(facts)];
  const sections = summarySections(content);
  const foot = `All figures are in the workbook with this mail. Times are those of the plant (${content.plant.timeZone}). ${FOOT}`;
  const html = page(
    subject,
    sheet(
      paragraph(escapeHtml(heading), `color:${PAPER.inkSoft}`) +
        paragraph(`<strong>${escapeHtml(content.headline)}</strong>`, 'font-size:18px;line-height:26px') +
        answers.map((answer) => sectionHtml(answer, facts.publicUrl)).join(''),
      content.openHolds.count > 0 ? PAPER.held : PAPER.action,
    ) +
      paragraph(link(facts.url, 'Open the page of this week')) +
      sections.map((section) => sheet(sectionHtml(section, facts.publicUrl), PAPER.hairline)).join('') +
      sheet(chartHtml(content), PAPER.hairline),
    foot,
    NARROW,
  );
  const text = [
    heading,
    content.headline,
    ...answers.map((answer) => sectionText(answer, facts.publicUrl)),
    `Open the page of this week: ${facts.url}`,
    ...sections.map((section) => sectionText(section, facts.publicUrl)),
    foot,
  ].join('\n\n');
  return { subject, html, text: `${text}\n` };
}

/** Weeks that the program was stopped over; the newest of them when there are many. */
function earlierSection({ earlier = [], allWeeksUrl }: WeeklySummaryFacts): SummarySection[] {
  if (earlier.length === 0) return [];
  const named = earlier.slice(-MOST_EARLIER);
  const sentences = named.map(({ weekStartsOn, headline, url }) => ({
    text: `${weekInWords(weekStartsOn)}: ${headline}`,
    url,
  }));
  const more = earlier.length - named.length;
  if (more > 0) sentences.unshift({ text: `${more} more before these: see the list of weeks.`, url: allWeeksUrl });
  return [
    {
      title: earlier.length === 1 ? 'A week told only now' : `${earlier.length} weeks told only now`,
      sentences,
    },
  ];
}

function chartHtml(content: SummaryContent): string {
  const { height } = summaryChart(content);
  const style = `display:block;width:100%;max-width:${CHART_WIDTH}px;height:auto;border:0;margin:0 0 12px;font-family:Arial,sans-serif;font-size:13px;line-height:20px;color:${PAPER.ink}`;
  return `<img src="cid:${CHART_CONTENT_ID}" width="${CHART_WIDTH}" height="${height}" alt="${escapeHtml(chartInWords(content))}" style="${style}">`;
}

const addressOf = ({ path, url }: SummarySection['sentences'][number], publicUrl: string): string | null =>
  url ?? (path === undefined || path === null ? null : publicUrl + path);

function sectionHtml({ title, sentences, table }: SummarySection, publicUrl: string): string {
  const said = sentences.map((sentence) => {
    const address = addressOf(sentence, publicUrl);
    return paragraph(
      `${escapeHtml(sentence.text)}${address === null ? '' : ` ${link(address, 'Open')}`}`,
      'margin:0 0 6px',
    );
  });
  return (
    paragraph(`<strong>${escapeHtml(title)}</strong>`, 'margin:12px 0 4px') +
    said.join('') +
    (table ? tableHtml(table) : '<div style="height:6px;line-height:6px;font-size:1px">&nbsp;</div>')
  );
}

function tableHtml({ head, rows }: NonNullable<SummarySection['table']>): string {
  const cell = `font-family:'Noto Sans',Arial,sans-serif;font-size:12px;line-height:18px;padding:4px 8px 4px 0;vertical-align:top;text-align:left;border-bottom:1px solid ${PAPER.hairline}`;
  const headings = head.map(
    (name) => `<th scope="col" style="${cell};font-weight:600;color:${PAPER.inkSoft}">${escapeHtml(name)}</th>`,
  );
  const lines = rows.map(
    (row) =>
      `<tr>${row.map((value, index) => `<td style="${cell};color:${PAPER.ink};font-variant-numeric:tabular-nums">${nameHtml(head, index)}${escapeHtml(value)}</td>`).join('')}</tr>`,
  );
  return `<table class="rows" cellpadding="0" cellspacing="0" width="100%" style="border-collapse:collapse;margin:0 0 12px"><thead><tr>${headings.join('')}</tr></thead><tbody>${lines.join('')}</tbody></table>`;
}

/** Of the value, where the row is shown as a list; the first column leads it. */
const nameHtml = (head: string[], index: number): string =>
  index === 0 ? '' : `<span class="name" style="display:none">${escapeHtml(head[index])}: </span>`;

function sectionText({ title, sentences, table }: SummarySection, publicUrl: string): string {
  const said = sentences.map((sentence) => {
    const address = addressOf(sentence, publicUrl);
    return `- ${sentence.text}${address === null ? '' : `\n  ${address}`}`;
  });
  const rows = (table?.rows ?? []).map(([first, ...rest]) =>
    [`- ${first}`, ...rest.map((value, index) => `    ${table?.head[index + 1]}: ${value}`)].join('\n'),
  );
  return [title.toUpperCase(), ...said, ...rows].join('\n');
}
