import { randomBytes } from 'node:crypto';
import { chmodSync, existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { z } from 'zod';

const environment = z.object({
  NODE_ENV: z.enum(['production', 'development', 'test']).default('development'),
  PORT: z.coerce.number().int().min(0).max(65535).default(3000),
  HOST: z.string().optional(),
  TOEBOARD_DATA: z.string().default('./data'),
  DATABASE_URL: z.url({ protocol: /^postgres(ql)?$/ }).optional(),
  PUBLIC_URL: z.url({ protocol: /^https?$/ }).optional(),
  SMTP_URL: z.url({ protocol: /^smtps?$/ }).optional(),
  MAIL_FROM: z.string().default('Toeboard <toeboard@localhost.example>'),
  SESSION_SECRET: z.string().min(16).optional(),
  TRUST_PROXY: z.coerce.number().int().min(0).default(0),
  LOG_LEVEL: z.enum(['trace', 'debug', 'info', 'warn', 'error', 'silent']).default('info'),
  CHROME_PATH: z.string().optional(),
  PATH: z.string().default(''),
});

export type Config = {
  production: boolean;
  port: number;
  host: string | undefined;
  dataDir: string;
  databaseUrl: string | undefined;
  /** Address that QR codes and mails carry; null until the port is known. */
  publicUrl: string | null;
  smtpUrl: string | undefined;
  mailFrom: string;
  /** Mail can be read in the browser: there is no mail host to send it. */
  outbox: boolean;
  sessionSecret: string;
  trustProxy: number;
  logLevel: string;
  chromePath: string | undefined;
  path: string;
};

/** A setting that can't be used; the message lists all of them. */
export class BadConfig extends Error {}

/** Reads the environment, once. The rest of the code receives values. */
export function readConfig(env: NodeJS.ProcessEnv = process.env): Config {
  const read = environment.safeParse(
    Object.fromEntries(Object.entries(env).filter(([, value]) => value !== '')),
  );
  if (!read.success) {
    const problems = read.error.issues.map((issue) => `  ${issue.path.join('.')}: ${issue.message}`);
    throw new BadConfig(`These settings can't be used:\n${problems.join('\n')}`);
  }
  const values = read.data;
  const dataDir = resolve(values.TOEBOARD_DATA);
  return {
    production: values.NODE_ENV === 'production',
    port: values.PORT,
    host: values.HOST,
    dataDir,
    databaseUrl: values.DATABASE_URL,
    publicUrl: values.PUBLIC_URL?.replace(/\/$/, '') ?? null,
    smtpUrl: values.SMTP_URL,
    mailFrom: values.MAIL_FROM,
    outbox: values.SMTP_URL === undefined,
    sessionSecret: values.SESSION_SECRET ?? keptSecret(dataDir),
    trustProxy: values.TRUST_PROXY,
    logLevel: values.LOG_LEVEL,
    chromePath: values.CHROME_PATH,
    path: values.PATH,
  };
}

/** The key of the session cookies, made on the first start and kept readable by us alone. */
function keptSecret(dataDir: string): string {
  const file = join(dataDir, 'session-secret');
  if (!existsSync(file)) {
    mkdirSync(dataDir, { recursive: true, mode: 0o700 });
    writeFileSync(file, randomBytes(32).toString('hex'), { mode: 0o600 });
  }
  chmodSync(file, 0o600);
  return readFileSync(file, 'utf8');
}
