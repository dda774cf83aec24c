const ENTITIES: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };

/** Text for XML; characters that XML cannot hold are left out. */
export const escapeXml = (text: string): string =>
  text
    .replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g, '')
    .replace(/[&<>"]/g, (sign) => ENTITIES[sign]);

/** The prefix with its colon that an element is written with, '' without. */
export const prefixOf = (xml: string, name: string): string =>
  new RegExp(`<(\\w+:)?${name}[\\s/>]`).exec(xml)?.[1] ?? '';

/** Puts a piece before the last end tag of an element; an element closed in itself is opened. */
export function insertBeforeEnd(xml: string, name: string, piece: string): string {
  const prefix = prefixOf(xml, name);
  const end = xml.lastIndexOf(`</${prefix}${name}>`);
  if (end >= 0) return xml.slice(0, end) + piece + xml.slice(end);
  const closed = new RegExp(`<${prefix}${name}(\\s[^>]*)?/>`);
  if (!closed.test(xml)) throw new Error(`no element ${name}`);
  return xml.replace(
    closed,
    (_, attributes?: string) => `<${prefix}${name}${attributes ?? ''}>${piece}</${prefix}${name}>`,
  );
}

/** Sets one attribute in the inside of a tag (`r="A1" s="3"`), keeping a closing slash. */
export function setAttribute(inside: string, name: string, value: string | number): string {
  const pattern = new RegExp(`(^|\\s)${name}="[^"]*"`);
  if (pattern.test(inside)) return inside.replace(pattern, `$1${name}="${value}"`);
  return inside.endsWith('/') ? `${inside.slice(0, -1)} ${name}="${value}"/` : `${inside} ${name}="${value}"`;
}

export const getAttribute = (inside: string, name: string): string | undefined =>
  new RegExp(`(?:^|\\s)${name}="([^"]*)"`).exec(inside)?.[1];
