import { type SummaryContent, weekInWords } from '@app/contracts';
import { chartInWords, CHART_WIDTH, summaryChart } from '../chart/summary-chart';
import { escapeHtml, FOOT, link, type Mail, page, PAPER, paragraph, sheet } from './layout';
import { type SummarySection, summarySections } from './summary-sections';

export interface WeeklySummaryFacts {
  content: SummaryContent;
  version: number;
  /** The summary's own page. */
  url: string;
  /** Where pages stand, without a slash at the end. */
  publicUrl: string;
}

/** The chart's place in the mail. */
export const CHART_CONTENT_ID = 'week@ebbline';

/** The week of a plant: the one thing to know first, then whom to ask, then the figures. Reads the same without pictures. */
export function weeklySummaryMail(facts: WeeklySummaryFacts): Mail {
  const { content, version } = facts;
  const week = weekInWords(content.week.startsOn);
  const subject = `${content.plant.name}, ${week}: ${content.headline}`;
  const heading = `${content.plant.name}, week of ${week}${version > 1 ? `, version ${version}` : ''}`;
  const sections = summarySections(content);
  const foot = `All figures are in the workbook with this mail. Times are those of the plant (${content.plant.timeZone}). ${FOOT}`;
  const html = page(
    subject,
    sheet(
      paragraph(escapeHtml(heading), `color:${PAPER.inkSoft}`) +
        paragraph(`<strong>${escapeHtml(content.headline)}</strong>`, 'font-size:18px;line-height:26px'),
      PAPER.action,
    ) +
      sheet(chartHtml(content), PAPER.hairline) +
      sections.map((section) => sheet(sectionHtml(section, facts.publicUrl), PAPER.hairline)).join('') +
      paragraph(link(facts.url, 'Open the page of this week')),
    foot,
  );
  const text = [
    heading,
    content.headline,
    ...sections.map((section) => sectionText(section, facts.publicUrl)),
    `Open the page of this week: ${facts.url}`,
    foot,
  ].join('\n\n');
  return { subject, html, text: `${text}\n` };
}

function chartHtml(content: SummaryContent): string {
  const { height } = summaryChart(content);
  const style = `display:block;width:100%;max-width:${CHART_WIDTH}px;height:auto;border:0;margin:0 0 12px;font-family:Arial,sans-serif;font-size:13px;line-height:20px;color:${PAPER.ink}`;
  return `<img src="cid:${CHART_CONTENT_ID}" width="${CHART_WIDTH}" height="${height}" alt="${escapeHtml(chartInWords(content))}" style="${style}">`;
}

function sectionHtml({ title, sentences, table }: SummarySection, publicUrl: string): string {
  const said = sentences.map(({ text, path }) =>
    paragraph(
      `${escapeHtml(text)}${path === undefined || path === null ? '' : ` ${link(publicUrl + path, 'Open')}`}`,
      'font-size:13px',
    ),
  );
  return paragraph(`<strong>${escapeHtml(title)}</strong>`) + said.join('') + (table ? tableHtml(table) : '');
}

function tableHtml({ head, rows }: NonNullable<SummarySection['table']>): string {
  const cell = `font-family:'Noto Sans',Arial,sans-serif;font-size:12px;line-height:18px;padding:4px 8px 4px 0;vertical-align:top;text-align:left;border-bottom:1px solid ${PAPER.hairline}`;
  const headings = head.map(
    (name) => `<th scope="col" style="${cell};font-weight:600;color:${PAPER.inkSoft}">${escapeHtml(name)}</th>`,
  );
  const lines = rows.map(
    (row) =>
      `<tr>${row.map((value) => `<td style="${cell};color:${PAPER.ink};font-variant-numeric:tabular-nums">${escapeHtml(value)}</td>`).join('')}</tr>`,
  );
  return `<table cellpadding="0" cellspacing="0" width="100%" style="border-collapse:collapse;margin:0 0 12px"><thead><tr>${headings.join('')}</tr></thead><tbody>${lines.join('')}</tbody></table>`;
}

function sectionText({ title, sentences, table }: SummarySection, publicUrl: string): string {
  const said = sentences.map(
    ({ text, path }) => `- ${text}${path === undefined || path === null ? '' : `\n  ${publicUrl}${path}`}`,
  );
  const rows = (table?.rows ?? []).map(([first, ...rest]) =>
    [`- ${first}`, ...rest.map((value, index) => `    ${table?.head[index + 1]}: ${value}`)].join('\n'),
  );
  return [title.toUpperCase(), ...said, ...rows].join('\n');
}
