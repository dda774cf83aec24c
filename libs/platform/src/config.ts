/** Settings of the server programs, read once from the environment. */
export interface Config {
  isProduction: boolean;
  port: number;
  databaseUrl: string;
  /** Null: Bull runs on the in-process store and one process is API and worker. */
  redisUrl: string | null;
  smtpUrl: string;
  mailFrom: string;
  /** Where people reach the web pages; links in mails begin with it. */
  publicUrl: string;
  jwtSecret: string;
  isDemo: boolean;
  mailCatcherUrl: string | null;
}

type Environment = Record<string, string | undefined>;

/** Reads the settings or throws one error that names every bad key; no secret is printed. */
export function readConfig(env: Environment): Config {
  const problems: string[] = [];
  const text = (key: string, fallback?: string): string => {
    const value = env[key] ?? fallback;
    if (value === undefined || value === '') problems.push(`${key} is missing`);
    return value ?? '';
  };
  const url = (key: string, protocols: string[], fallback?: string): string => {
    const value = text(key, fallback);
    if (value !== '' && !protocols.some((protocol) => value.startsWith(`${protocol}://`)))
      problems.push(`${key} must begin with ${protocols.map((protocol) => `${protocol}://`).join(' or ')}`);
    return value;
  };
  const port = Number(env.PORT ?? '3000');
  if (!(Number.isInteger(port) && port >= 0 && port < 65536)) problems.push('PORT must be a whole number below 65536');
  const isProduction = env.NODE_ENV === 'production';
  const config: Config = {
    isProduction,
    port,
    databaseUrl: url('DATABASE_URL', ['postgres', 'postgresql']),
    redisUrl: env.REDIS_URL ? url('REDIS_URL', ['redis', 'rediss']) : null,
    smtpUrl: url('SMTP_URL', ['smtp', 'smtps']),
    mailFrom: text('EBBLINE_MAIL_FROM', isProduction ? undefined : 'Ebbline <ebbline@marrowby.example>'),
    publicUrl: url('EBBLINE_PUBLIC_URL', ['http', 'https'], isProduction ? undefined : `http://127.0.0.1:${port}`),
    jwtSecret: text('EBBLINE_JWT_SECRET'),
    isDemo: env.EBBLINE_DEMO === '1',
    mailCatcherUrl: env.EBBLINE_MAIL_CATCHER_URL || null,
  };
  if (config.jwtSecret !== '' && config.jwtSecret.length < 32)
    problems.push('EBBLINE_JWT_SECRET must have at least 32 characters');
  if (isProduction) {
    if (config.isDemo) problems.push('EBBLINE_DEMO must not be set in production: demo sign-ins are public');
    if (env.EBBLINE_SECRET_ORIGIN === 'generated')
      problems.push('EBBLINE_JWT_SECRET must be your own in production, not a generated one');
    if (env.EBBLINE_MAIL_CATCHER === '1' || config.mailCatcherUrl)
      problems.push('SMTP_URL must be a real mail server in production, not the mail catcher');
  }
  if (problems.length > 0) throw new Error(`Ebbline cannot start: ${problems.join('; ')}.`);
  return config;
}
