/** The frame of every mail: 600 px, the paper and ink of the pages, readable without images and by a narrow phone. */

export interface Mail {
  subject: string;
  html: string;
  text: string;
}

const ESCAPES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };

export function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (character) => ESCAPES[character]);
}

/** Colours of the pages' light theme; a mail has no stylesheet to take them from. */
export const PAPER = {
  ground: '#edf2ee',
  sheet: '#fbfcfb',
  hairline: '#d3e2d8',
  ink: '#17212b',
  inkSoft: '#4f5d5a',
  action: '#21418f',
  held: '#a83a16',
  released: '#3c6250',
  scrapped: '#6a2c5c',
} as const;

const FONT = "font-family:'Noto Sans',Arial,sans-serif";

export function link(url: string, label: string): string {
  return `<a href="${escapeHtml(url)}" style="color:${PAPER.action}">${escapeHtml(label)}</a>`;
}

export function paragraph(html: string, style = ''): string {
  return `<p style="margin:0 0 12px;${FONT};font-size:14px;line-height:20px;color:${PAPER.ink};${style}">${html}</p>`;
}

/** Rows of label and value, in figures that line up. */
export function figures(pairs: [string, string][]): string {
  const cell = `${FONT};font-size:13px;line-height:20px;padding:2px 12px 2px 0;vertical-align:top`;
  const lines = pairs.map(
    ([label, value]) =>
      `<tr><td style="${cell};color:${PAPER.inkSoft};white-space:nowrap">${escapeHtml(label)}</td>` +
      `<td style="${cell};color:${PAPER.ink};font-variant-numeric:tabular-nums">${escapeHtml(value)}</td></tr>`,
  );
  return `<table role="presentation" cellpadding="0" cellspacing="0" style="border-collapse:collapse;margin:0 0 12px">${lines.join('')}</table>`;
}

export function sheet(html: string, edge: string): string {
  return `<div style="background:${PAPER.sheet};border:1px solid ${PAPER.hairline};border-left:4px solid ${edge};padding:16px 16px 4px;margin:0 0 12px">${html}</div>`;
}

/** `style`: rules for narrow screens; who does not know them reads the same. Paper is light: readers are asked to leave it so. */
export function page(title: string, body: string, foot: string, style = ''): string {
  const head = `<meta name="color-scheme" content="light">${style === '' ? '' : `<style>${style}</style>`}`;
  return (
    `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width">${head}<title>${escapeHtml(title)}</title></head>` +
    `<body style="margin:0;background:${PAPER.ground}"><div style="max-width:600px;margin:0 auto;padding:20px 12px">${body}` +
    `<p style="margin:16px 0 0;${FONT};font-size:12px;line-height:18px;color:${PAPER.inkSoft}">${escapeHtml(foot)}</p></div></body></html>`
  );
}

export const FOOT =
  'Sent by Ebbline. A verdict supports a decision; it does not replace the inspection, the customer’s requirements, or the person authorised to release the lot.';
