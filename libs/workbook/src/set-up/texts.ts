const DANGEROUS = /^'*[=+\-@\t\r\n]/;

/**
 * Makes a text harmless in any spreadsheet program by an apostrophe in front of = + - @, a tab or a line break; where such apostrophes
 * stand already, by one more, so that `unescapeText` gives every text back.
 */
export const escapeText = (text: string): string => (DANGEROUS.test(text) ? `'${text}` : text);

/** The inverse of `escapeText`. */
export const unescapeText = (text: string): string => (/^'+[=+\-@\t\r\n]/.test(text) ? text.slice(1) : text);

/** A text of a cell for a sentence. */
export const quoted = (text: string): string => `"${text.length > 40 ? `${text.slice(0, 39)}…` : text}"`;

/** A detail in two parts: its first sentence says what is wrong, the others, or else `otherwise`, what to do. */
export function sentencesOf(detail: string, otherwise: string): { what: string; whatToDo: string } {
  const [what, ...rest] = detail.split(/(?<=\.)\s+(?=[A-Z])/);
  return { what, whatToDo: rest.join(' ') || otherwise };
}
