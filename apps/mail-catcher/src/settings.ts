export interface CatcherSettings {
  smtpPort: number;
  httpPort: number;
  folder: string;
}

function readPort(name: string, text: string | undefined, problems: string[]): number {
  const port = Number(text);
  if (text && Number.isInteger(port) && port >= 1 && port <= 65535) return port;
  problems.push(`${name} must be a whole number from 1 to 65535`);
  return 0;
}

/** Reads the catcher's settings; throws one error that names all that is wrong. */
export function readCatcherSettings(env: NodeJS.ProcessEnv): CatcherSettings {
  const problems: string[] = [];
  if (env.NODE_ENV === 'production') problems.push('it delivers nothing, so it does not run with NODE_ENV=production');
  const smtpPort = readPort('CATCHER_SMTP_PORT', env.CATCHER_SMTP_PORT, problems);
  const httpPort = readPort('CATCHER_HTTP_PORT', env.CATCHER_HTTP_PORT, problems);
  const folder = env.CATCHER_DIR ?? '';
  if (folder === '') problems.push('CATCHER_DIR must name the folder of the mails');
  if (problems.length > 0) throw new Error(`The mail catcher cannot start: ${problems.join('; ')}.`);
  return { smtpPort, httpPort, folder };
}
