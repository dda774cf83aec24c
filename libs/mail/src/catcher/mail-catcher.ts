import type { Server } from 'node:http';
import type { AddressInfo, Server as NetServer } from 'node:net';
import { SMTPServer, type SMTPServerDataStream } from 'smtp-server';
import type { CaughtMessage } from './caught-message';
import { createCatcherPages } from './catcher-pages';
import { MessageStore } from './message-store';

export interface MailCatcherOptions {
  /** Folder of the .eml files; made when missing. */
  folder: string;
  /** 0 or nothing: any free port. */
  smtpPort?: number;
  /** 0 or nothing: any free port. */
  httpPort?: number;
  now?: () => Date;
  /** Called when a client begins to send a message, before anything of it is read. Throwing refuses it for now (451). */
  onData?: () => Promise<void> | void;
  /** Called once a message is on the disk and before the client is told so; not for a repeat. */
  onStored?: (message: CaughtMessage) => Promise<void> | void;
}

const HOST = '127.0.0.1';
const MOST_BYTES = 25 * 1024 * 1024;

class SmtpRefusal extends Error {
  constructor(
    message: string,
    readonly responseCode: number,
  ) {
    super(message);
  }
}

async function readAll(stream: SMTPServerDataStream): Promise<Buffer> {
  const chunks: Buffer[] = [];
  for await (const chunk of stream) if (!stream.sizeExceeded) chunks.push(chunk as Buffer);
  if (stream.sizeExceeded) throw new SmtpRefusal('The message is larger than 25 MB.', 552);
  return Buffer.concat(chunks);
}

function listen(server: Server | NetServer, start: () => void): Promise<number> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.once('listening', () => {
      server.off('error', reject);
      resolve((server.address() as AddressInfo).port);
    });
    start();
  });
}

/**
 * An SMTP server on loopback that delivers nothing: it keeps each message on the disk before it says that it has it,
 * drops repeats by their Message-ID, and shows what it has on a page of its own.
 */
export class MailCatcher {
  private constructor(
    private readonly store: MessageStore,
    private readonly smtp: SMTPServer,
    private readonly http: Server,
    readonly smtpPort: number,
    readonly httpPort: number,
  ) {}

  static async start(options: MailCatcherOptions): Promise<MailCatcher> {
    const store = await MessageStore.open(options.folder, options.now ?? (() => new Date()));
    const smtp = createSmtpServer(store, options);
    const http = createCatcherPages(store);
    const smtpPort = await listen(smtp.server, () => smtp.listen(options.smtpPort ?? 0, HOST));
    try {
      const httpPort = await listen(http, () => http.listen(options.httpPort ?? 0, HOST));
      smtp.on('error', () => undefined); // a client that goes away in the middle is no event here
      return new MailCatcher(store, smtp, http, smtpPort, httpPort);
    } catch (error) {
      smtp.close();
      throw error;
    }
  }

  get smtpUrl(): string {
    return `smtp://${HOST}:${this.smtpPort}`;
  }

  get pageUrl(): string {
    return `http://${HOST}:${this.httpPort}`;
  }

  /** Newest first. */
  messages(): CaughtMessage[] {
    return this.store.list();
  }

  async close(): Promise<void> {
    const smtpClosed = new Promise<void>((resolve) => this.smtp.close(() => resolve()));
    const httpClosed = new Promise<void>((resolve) => this.http.close(() => resolve()));
    this.http.closeAllConnections();
    await Promise.all([smtpClosed, httpClosed]);
  }
}

function createSmtpServer(store: MessageStore, { onData, onStored }: MailCatcherOptions): SMTPServer {
  const take = async (stream: SMTPServerDataStream): Promise<string> => {
    await onData?.();
    const { message, isNew } = await store.save(await readAll(stream));
    if (isNew) await onStored?.(message);
    return isNew ? 'Kept' : 'Already kept';
  };
  return new SMTPServer({
    banner: 'Ebbline mail catcher',
    disabledCommands: ['STARTTLS', 'AUTH'],
    authOptional: true,
    disableReverseLookup: true,
    size: MOST_BYTES,
    closeTimeout: 1000,
    logger: false,
    onData(stream, _session, callback) {
      take(stream).then(
        (answer) => callback(null, answer),
        (error: Error) => {
          stream.resume();
          callback(error instanceof SmtpRefusal ? error : new SmtpRefusal(error.message, 451));
        },
      );
    },
  });
}
