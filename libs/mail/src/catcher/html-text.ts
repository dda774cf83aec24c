const ENTITIES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' };

export function escapeHtml(text: string): string {
  return text.replaceAll(/[&<>"']/g, (character) => ENTITIES[character]);
}

/** Plain text as HTML, its web addresses as links; a full stop or bracket behind an address is no part of it. */
export function linkAddresses(text: string): string {
  return text
    .split(/(https?:\/\/[^\s<>"]+[^\s<>".,;:!?)\]])/)
    .map((piece, i) => {
      const escaped = escapeHtml(piece);
      return i % 2 === 1 ? `<a href="${escaped}" target="_blank" rel="noopener">${escaped}</a>` : escaped;
    })
    .join('');
}
