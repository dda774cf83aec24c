import type { IntakeProgress } from '@app/contracts';
import { Client } from 'pg';
import type { Queryable } from './database';

const CHANNEL = 'intake_progress';

/** Tells whoever listens how far an intake is. Told after commit when inside a transaction; lost when nobody listens. */
export async function notifyProgress(db: Queryable, progress: IntakeProgress): Promise<void> {
  await db.raw('select pg_notify(?, ?)', [CHANNEL, JSON.stringify(progress)]);
}

/** Listens on a connection of its own until closed; when the connection breaks, it is opened again after a second. */
export function listenForProgress(
  url: string,
  onProgress: (progress: IntakeProgress) => void,
): { close(): Promise<void> } {
  let client: Client | undefined;
  let isClosed = false;
  let retry: NodeJS.Timeout | undefined;
  const open = async () => {
    const next = new Client({ connectionString: url, application_name: 'ebbline progress' });
    client = next;
    const again = () => {
      if (isClosed || client !== next) return;
      client = undefined;
      retry = setTimeout(() => void open(), 1000);
    };
    next.on('error', again);
    next.on('end', again);
    next.on('notification', (message) => onProgress(JSON.parse(message.payload ?? '{}') as IntakeProgress));
    try {
      await next.connect();
      await next.query(`listen ${CHANNEL}`);
    } catch {
      again();
    }
  };
  void open();
  return {
    async close() {
      isClosed = true;
      clearTimeout(retry);
      await client?.end().catch(() => undefined);
    },
  };
}
