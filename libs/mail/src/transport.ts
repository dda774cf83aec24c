import { createTransport } from 'nodemailer';
import { MailSendError } from './mail-send-error';

export interface OutgoingAttachment {
  filename: string;
  content: Buffer | string;
  contentType: string;
  /** Named by an image in the HTML part as `cid:<cid>`; such an attachment is shown in its place. */
  cid?: string;
}

export interface OutgoingMessage {
  /** With its angle brackets: `<hold-opened.42.7@marrowby.example>`. The same for every attempt to send this message. */
  messageId: string;
  to: string;
  subject: string;
  html: string;
  text: string;
  attachments?: OutgoingAttachment[];
}

export interface MailTransport {
  /** Resolves once the server has accepted the message; throws MailSendError otherwise. */
  send(message: OutgoingMessage): Promise<void>;
  close(): void;
}

const TIMEOUT_MILLISECONDS = 10_000;
const DEFAULT_PORTS: Record<string, number> = { 'smtp:': 587, 'smtps:': 465 };

function isLoopback(host: string): boolean {
  return host === 'localhost' || host === '::1' || /^127(\.\d{1,3}){3}$/.test(host);
}

function readAddress(smtpUrl: string) {
  const url = URL.canParse(smtpUrl) ? new URL(smtpUrl) : undefined;
  if (!url || !(url.protocol in DEFAULT_PORTS) || url.hostname === '') {
    throw new RangeError('The mail server must be given as smtp://host:port or smtps://host:port.');
  }
  const host = url.hostname.replace(/^\[|\]$/g, '');
  const auth = url.username
    ? { user: decodeURIComponent(url.username), pass: decodeURIComponent(url.password) }
    : undefined;
  return { host, port: Number(url.port) || DEFAULT_PORTS[url.protocol], secure: url.protocol === 'smtps:', auth };
}

/**
 * A way to send mail through one SMTP server, a connection a message. On loopback no encryption is asked for; elsewhere
 * it is used when the server offers it. Throws RangeError when `smtpUrl` is no SMTP address.
 */
export function createMailTransport(smtpUrl: string, from: string): MailTransport {
  const address = readAddress(smtpUrl);
  const transporter = createTransport({
    ...address,
    ignoreTLS: isLoopback(address.host),
    connectionTimeout: TIMEOUT_MILLISECONDS,
    greetingTimeout: TIMEOUT_MILLISECONDS,
    dnsTimeout: TIMEOUT_MILLISECONDS,
    socketTimeout: TIMEOUT_MILLISECONDS,
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return {
    async send(message) {
      try {
        await transporter.sendMail({ from, ...message });
      } catch (error) {
        throw MailSendError.from(error);
      }
    },
    close: () => transporter.close(),
  };
}
