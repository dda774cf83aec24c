import { escapeHtml, type Mail, page, PAPER, paragraph, sheet } from './layout';

/** A mail about somebody's own account: sentences, at most one link, and why it came. */
export function accountMail(
  subject: string,
  sentences: string[],
  action: { label: string; url: string },
  foot: string,
): Mail {
  const [first, ...rest] = sentences;
  const html = page(
    subject,
    sheet(
      paragraph(`<strong>${escapeHtml(first)}</strong>`) +
        rest.map((sentence) => paragraph(escapeHtml(sentence))).join('') +
        pressed(action.url, action.label) +
        paragraph(escapeHtml(action.url), `color:${PAPER.inkSoft};font-size:12px;word-break:break-all`),
      PAPER.action,
    ),
    foot,
  );
  return { subject, html, text: `${sentences.join('\n\n')}\n\n${action.label}:\n${action.url}\n\n${foot}\n` };
}

/** A link as large as a thumb. */
const pressed = (url: string, label: string): string =>
  paragraph(
    `<a href="${escapeHtml(url)}" style="display:inline-block;padding:10px 16px;background:${PAPER.action};color:#ffffff;text-decoration:none"><strong>${escapeHtml(label)}</strong></a>`,
  );
