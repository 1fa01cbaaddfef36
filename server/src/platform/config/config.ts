import { createHash, randomBytes } from 'node:crypto';
import { isIP } from 'node:net';
import { resolve } from 'node:path';
import * as z from 'zod';

/** How the server reaches MariaDB; tools/start writes it, tests build their own. */
const databaseAccess = z.strictObject({
  host: z.string().default('127.0.0.1'),
  port: z.int().min(1).max(65535),
  user: z.string().min(1),
  password: z.string(),
  database: z.string().regex(/^[A-Za-z0-9_]{1,64}$/, 'A database name has letters, digits and underscores.'),
});
export type DatabaseAccess = z.output<typeof databaseAccess>;

/** Every setting the server knows, with its default. Nothing starts before all of them are in order. */
export interface Config {
  /** PORT: where the client and the API answer; 4300. */
  readonly port: number;
  /** HOST: address to bind; 127.0.0.1. A demonstration binds to loopback only. */
  readonly host: string;
  /** TOLLGATE_URL: the address people use, for links in mail and the Host check; http://HOST:PORT. */
  readonly url: string;
  /** TOLLGATE_DATA: private data directory; .data. */
  readonly dataDirectory: string;
  /** TOLLGATE_DEMO: '1' (default) fills an empty database with invented boards and known sign-ins; '0' does not. */
  readonly demonstration: boolean;
  /** TOLLGATE_DB: JSON, how to reach MariaDB. */
  readonly database: DatabaseAccess;
  /** TOLLGATE_DB_POOL: connections at most; 10. */
  readonly poolSize: number;
  /** SMTP_URL: where mail is handed over; without it mail waits in the outbox. */
  readonly smtpUrl: string | undefined;
  /** TOLLGATE_WEB: folder of the built client; without it the API answers alone. */
  readonly webDirectory: string | undefined;
  /** Secret that signs session cookies; kept in the data directory by the start command. TOLLGATE_SECRET. */
  readonly sessionSecret: string;
  /** Cookies are not separated by port: the data directory is part of their name. */
  readonly cookieName: string;
  /** scrypt's N as a power of two: 17, and 12 where NODE_ENV is test. */
  readonly scryptLogN: number;
  /** TOLLGATE_WORKERS: threads for checks; one less than the processors, at least 1. */
  readonly checkThreads: number;
}

export class ConfigError extends Error {}

type Environment = Readonly<Record<string, string | undefined>>;

/** Reads and checks every setting; a ConfigError names the setting and what would be right. */
export function readConfig(env: Environment, processors: number): Config {
  const host = env['HOST'] ?? '127.0.0.1';
  const port = integer(env, 'PORT', 4300, 0, 65535);
  const dataDirectory = resolve(env['TOLLGATE_DATA'] ?? '.data');
  const demonstration = flag(env, 'TOLLGATE_DEMO', true);
  if (demonstration && !isLoopback(host)) {
    throw new ConfigError(
      `HOST=${host} is not loopback: a demonstration has known sign-ins and answers on this machine only. Set TOLLGATE_DEMO=0 or leave HOST out.`,
    );
  }
  return {
    port,
    host,
    url: address(env['TOLLGATE_URL'] ?? `http://${isIP(host) === 6 ? `[${host}]` : host}:${port}`),
    dataDirectory,
    demonstration,
    database: readDatabase(env),
    poolSize: integer(env, 'TOLLGATE_DB_POOL', 10, 1, 100),
    smtpUrl: env['SMTP_URL'] || undefined,
    webDirectory: env['TOLLGATE_WEB'] ? resolve(env['TOLLGATE_WEB']) : undefined,
    sessionSecret: env['TOLLGATE_SECRET'] || randomBytes(32).toString('hex'),
    cookieName: `tg-${createHash('sha256').update(dataDirectory).digest('hex').slice(0, 8)}`,
    scryptLogN: env['NODE_ENV'] === 'test' ? 12 : 17,
    checkThreads: integer(env, 'TOLLGATE_WORKERS', Math.max(1, processors - 1), 1, 64),
  };
}

function readDatabase(env: Environment): DatabaseAccess {
  const text = env['TOLLGATE_DB'];
  if (!text)
    throw new ConfigError('TOLLGATE_DB is missing: JSON with host, port, user, password and database.');
  try {
    return databaseAccess.parse(JSON.parse(text));
  } catch (error) {
    throw new ConfigError(`TOLLGATE_DB cannot be read: ${(error as Error).message}`);
  }
}

function integer(env: Environment, name: string, fallback: number, min: number, max: number): number {
  const text = env[name];
  if (text === undefined || text === '') return fallback;
  const value = Number(text);
  if (!Number.isInteger(value) || value < min || value > max) {
    throw new ConfigError(`${name}=${text} must be a whole number from ${min} to ${max}.`);
  }
  return value;
}

function flag(env: Environment, name: string, fallback: boolean): boolean {
  const text = env[name];
  if (text === undefined || text === '') return fallback;
  if (text !== '0' && text !== '1') throw new ConfigError(`${name}=${text} must be 0 or 1.`);
  return text === '1';
}

function address(text: string): string {
  if (!URL.canParse(text))
    throw new ConfigError(`TOLLGATE_URL=${text} must be an address such as https://tollgate.example.com.`);
  return text.replace(/\/+$/, '');
}

export function isLoopback(host: string): boolean {
  return host === 'localhost' || host === '::1' || /^127\./.test(host);
}
