import type { CaughtMessage, CaughtPart } from './caught-message';
import { CATCHER_STYLE } from './catcher-style';
import { escapeHtml, linkAddresses } from './html-text';

function page(title: string, body: string, head = ''): string {
  return `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escapeHtml(title)}</title>${head}<style>${CATCHER_STYLE}</style></head>
<body><main>${body}</main></body></html>`;
}

const time = (at: string): string => `${at.slice(0, 10)} ${at.slice(11, 19)} UTC`;

function row(message: CaughtMessage): string {
  const subject = escapeHtml(message.subject || 'No subject');
  return `<li><a href="/mail/${message.id}">${subject}</a><span>to ${escapeHtml(message.to)} · ${time(message.at)}</span></li>`;
}

/** All messages, newest first; the page asks again by itself. */
export function listView(messages: CaughtMessage[]): string {
  const count = messages.length === 1 ? '1 mail' : `${messages.length} mails`;
  const body =
    messages.length === 0
      ? '<p>No mail yet. What Ebbline sends on this computer is kept here, and delivered nowhere.</p>'
      : `<p>${count}, newest first. They are kept here, and delivered nowhere.</p><ol class="sheet">${messages.map(row).join('')}</ol>`;
  return page('Mail of this Ebbline', `<h1>Mail</h1>${body}`, '<meta http-equiv="refresh" content="15">');
}

const fact = ([name, value]: [string, string]): string => `<dt>${escapeHtml(name)}</dt><dd>${escapeHtml(value)}</dd>`;

function fileRow(message: CaughtMessage, part: CaughtPart, index: number): string {
  const size = `${Math.ceil(part.content.length / 1024)} kB`;
  return `<li><a href="/mail/${message.id}/parts/${index}">${escapeHtml(part.filename)}</a><span>${escapeHtml(part.contentType)}, ${size}</span></li>`;
}

/** One message: both of its parts, the files with it, its headers. */
export function messageView(message: CaughtMessage, headers: [string, string][], parts: CaughtPart[]): string {
  const facts: [string, string][] = [
    ['To', message.to],
    ['From', message.from],
    ['Kept', time(message.at)],
  ];
  const html = `<h2>As the reader sees it</h2><div class="sheet"><iframe title="HTML part" src="/mail/${message.id}/html" sandbox="allow-popups allow-popups-to-escape-sandbox"></iframe></div>`;
  const files = parts.map((part, index) => fileRow(message, part, index)).join('');
  return page(
    message.subject || 'No subject',
    [
      '<p><a href="/">All mail</a></p>',
      `<h1>${escapeHtml(message.subject || 'No subject')}</h1>`,
      `<dl class="sheet">${facts.map(fact).join('')}</dl>`,
      message.html ? html : '',
      message.text ? `<h2>Plain text</h2><pre class="sheet">${linkAddresses(message.text)}</pre>` : '',
      files ? `<h2>Files</h2><ol class="sheet">${files}</ol>` : '',
      `<h2>Headers</h2><details class="sheet"><summary>Show ${headers.length} headers</summary><dl>${headers.map(fact).join('')}</dl></details>`,
      `<p><a href="/mail/${message.id}/source">The message as it came</a></p>`,
    ].join(''),
  );
}

/** The HTML part on its own: images named by cid are put in, links open outside the frame. */
export function htmlPart(message: CaughtMessage, parts: CaughtPart[]): string {
  const byCid = new Map(parts.flatMap((part) => (part.cid ? [[part.cid, part] as const] : [])));
  const shown = message.html.replaceAll(/cid:([^"'\s)>]+)/g, (whole, cid: string) => {
    const part = byCid.get(decodeURIComponent(cid));
    return part ? `data:${part.contentType};base64,${part.content.toString('base64')}` : whole;
  });
  return `<base target="_blank">${shown}`;
}
