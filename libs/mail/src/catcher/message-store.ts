import { createHash } from 'node:crypto';
import { mkdir, open, readdir, readFile, rename, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { readMessage, type CaughtMessage } from './caught-message';

const FILE_NAME = /^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)(\d{3})Z-[0-9a-f]{24}\.eml$/;

function nameFor(messageId: string, at: Date): string {
  const stamp = at.toISOString().replaceAll(/[-:.]/g, '');
  return `${stamp}-${createHash('sha256').update(messageId).digest('hex').slice(0, 24)}`;
}

/** Puts a file there whole or not at all, also when the power fails: its bytes and its name are on the disk on return. */
async function writeDurably(folder: string, name: string, bytes: Buffer): Promise<void> {
  const next = join(folder, `${name}.next`);
  const file = await open(next, 'w', 0o600);
  try {
    await file.writeFile(bytes);
    await file.sync();
  } finally {
    await file.close();
  }
  await rename(next, join(folder, name));
  const directory = await open(folder, 'r');
  try {
    await directory.sync();
  } finally {
    await directory.close();
  }
}

/** Messages as .eml files in one folder, each Message-ID once. */
export class MessageStore {
  private readonly byMessageId = new Map<string, CaughtMessage>();
  private pending: Promise<unknown> = Promise.resolve();

  private constructor(
    private readonly folder: string,
    private readonly now: () => Date,
  ) {}

  /** Opens a folder with what earlier runs kept; half-written files of a killed one are removed. */
  static async open(folder: string, now: () => Date): Promise<MessageStore> {
    await mkdir(folder, { recursive: true, mode: 0o700 });
    const store = new MessageStore(folder, now);
    for (const name of (await readdir(folder)).sort()) {
      const stamp = FILE_NAME.exec(name)?.slice(1);
      if (stamp) await store.load(name, stamp);
      else if (name.endsWith('.eml.next')) await rm(join(folder, name), { force: true });
    }
    return store;
  }

  private async load(name: string, [year, month, day, hour, minute, second, millisecond]: string[]): Promise<void> {
    const at = `${year}-${month}-${day}T${hour}:${minute}:${second}.${millisecond}Z`;
    const message = await readMessage(await readFile(join(this.folder, name)));
    this.byMessageId.set(message.messageId, { id: name.slice(0, -'.eml'.length), at, ...message });
  }

  /** Keeps a message unless one with its Message-ID is there; one at a time, so that twins cannot pass each other. */
  save(raw: Buffer): Promise<{ message: CaughtMessage; isNew: boolean }> {
    const saved = this.pending.then(() => this.saveNext(raw));
    this.pending = saved.catch(() => undefined);
    return saved;
  }

  private async saveNext(raw: Buffer): Promise<{ message: CaughtMessage; isNew: boolean }> {
    const read = await readMessage(raw);
    const known = this.byMessageId.get(read.messageId);
    if (known) return { message: known, isNew: false };
    const at = this.now();
    const id = nameFor(read.messageId, at);
    await writeDurably(this.folder, `${id}.eml`, raw);
    const message = { id, at: at.toISOString(), ...read };
    this.byMessageId.set(message.messageId, message);
    return { message, isNew: true };
  }

  /** Newest first. */
  list(): CaughtMessage[] {
    return [...this.byMessageId.values()].sort((a, b) => (a.id < b.id ? 1 : -1));
  }

  find(id: string): CaughtMessage | undefined {
    return this.list().find((message) => message.id === id);
  }

  readRaw(message: CaughtMessage): Promise<Buffer> {
    return readFile(join(this.folder, `${message.id}.eml`));
  }
}
