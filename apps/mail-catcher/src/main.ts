import { MailCatcher } from '@app/mail';
import { readCatcherSettings } from './settings';

async function main(): Promise<void> {
  const catcher = await MailCatcher.start(readCatcherSettings(process.env));
  process.stdout.write(`Mail catcher: ${catcher.smtpUrl}, to be read at ${catcher.pageUrl}\n`);
  const end = (): void => {
    void catcher.close().then(() => process.exit(0));
  };
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.once(signal, end);
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
  process.exit(1);
});
