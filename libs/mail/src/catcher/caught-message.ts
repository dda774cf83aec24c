import { createHash } from 'node:crypto';
import { simpleParser, type AddressObject, type ParsedMail } from 'mailparser';

/** One message that the catcher keeps; `id` is the name of its file without the ending. */
export interface CaughtMessage {
  id: string;
  /** With its angle brackets. */
  messageId: string;
  from: string;
  /** The addresses, joined by ", ". */
  to: string;
  subject: string;
  /** When it was stored, ISO 8601 in UTC. */
  at: string;
  text: string;
  html: string;
}

/** An image or file that travels with a message. */
export interface CaughtPart {
  cid: string | undefined;
  filename: string;
  contentType: string;
  content: Buffer;
}

function addresses(header: AddressObject | AddressObject[] | undefined): string {
  return [header ?? []]
    .flat()
    .flatMap((list) => list.value)
    .map((one) => one.address ?? one.name)
    .join(', ');
}

const parse = (raw: Buffer): Promise<ParsedMail> =>
  simpleParser(raw, { keepCidLinks: true, skipTextToHtml: true, skipImageLinks: true });

/** Reads a message as it came. One without a Message-ID is known by the hash of its bytes. */
export async function readMessage(raw: Buffer): Promise<Omit<CaughtMessage, 'id' | 'at'>> {
  const mail = await parse(raw);
  return {
    messageId: mail.messageId ?? `<${createHash('sha256').update(raw).digest('hex')}@no-message-id.invalid>`,
    from: addresses(mail.from),
    to: addresses(mail.to),
    subject: mail.subject ?? '',
    text: mail.text ?? '',
    html: mail.html || '',
  };
}

/** The headers of a message in their order, unfolded, and the files that travel with it. */
export async function readDetails(raw: Buffer): Promise<{ headers: [string, string][]; parts: CaughtPart[] }> {
  const mail = await parse(raw);
  const headers = mail.headerLines.map(({ line }): [string, string] => {
    const [name, value] = line.split(/:(.*)/s);
    return [name, value.replace(/\r?\n\s+/g, ' ').trim()];
  });
  const parts = mail.attachments.map(({ cid, filename, contentType, content }) => ({
    cid,
    filename: filename ?? cid ?? 'part',
    contentType,
    content,
  }));
  return { headers, parts };
}
