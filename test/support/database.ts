import { execFile, spawn, type ChildProcess } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { mkdtemp, rm } from 'node:fs/promises';
import { createServer } from 'node:net';
import { tmpdir, userInfo } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import * as mariadb from 'mariadb';
import type { DatabaseAccess } from '../../server/src/platform/config/config';

/** How to reach a MariaDB as a user who may make databases; the test command starts one for all and says so. */
interface AdminAccess {
  readonly host: string;
  readonly port: number;
  readonly user: string;
  readonly password: string;
}

export interface TestDatabase {
  readonly access: DatabaseAccess;
  drop(): Promise<void>;
}

/** A database of its own on the real server. */
export async function createDatabase(): Promise<TestDatabase> {
  inUse += 1;
  const admin = await adminAccess();
  const name = `t_${randomBytes(6).toString('hex')}`;
  const run = async (sql: string) => {
    const connection = await mariadb.createConnection(admin);
    await connection.query(sql);
    await connection.end();
  };
  const drop = async () => {
    await run(`DROP DATABASE IF EXISTS ${name}`);
    inUse -= 1;
    if (inUse === 0) await stopPrivateServer();
  };
  await run(`CREATE DATABASE ${name} CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`);
  return { access: { ...admin, database: name }, drop };
}

/** How many databases of this file are in use: the private server ends with the last. */
let inUse = 0;
let own: Promise<{ admin: AdminAccess; child: ChildProcess; folder: string }> | undefined;

async function adminAccess(): Promise<AdminAccess> {
  const given = process.env['TOLLGATE_TEST_DB'];
  if (given) {
    const { host, port, user, password } = JSON.parse(given) as AdminAccess;
    return { host, port, user, password };
  }
  own ??= startPrivate();
  return (await own).admin;
}

/** Ends the private server of a spec that was run by itself. */
async function stopPrivateServer(): Promise<void> {
  if (!own) return;
  const { child, folder } = await own;
  own = undefined;
  const ended = new Promise((resolve) => child.once('exit', resolve));
  child.kill('SIGTERM');
  await ended;
  await rm(folder, { recursive: true, force: true });
}

/** A spec run by itself, outside the test command, gets a server of its own. */
async function startPrivate(): Promise<{ admin: AdminAccess; child: ChildProcess; folder: string }> {
  const folder = await mkdtemp(join(tmpdir(), 'tg-'));
  const data = join(folder, 'db');
  const user = userInfo().username;
  const port = await freePort();
  await promisify(execFile)('mariadb-install-db', [
    '--no-defaults',
    `--datadir=${data}`,
    '--auth-root-authentication-method=normal',
    '--skip-test-db',
    `--user=${user}`,
  ]);
  const child = spawn(
    '/usr/sbin/mariadbd',
    [
      '--no-defaults',
      `--datadir=${data}`,
      `--socket=${join(folder, 's')}`,
      `--port=${port}`,
      '--bind-address=127.0.0.1',
      '--skip-name-resolve',
      '--character-set-server=utf8mb4',
      '--max-allowed-packet=64M',
      `--user=${user}`,
    ],
    { stdio: 'ignore' },
  );
  const admin = { host: '127.0.0.1', port, user: 'root', password: '' };
  for (let attempt = 0; attempt < 100; attempt++) {
    try {
      const connection = await mariadb.createConnection(admin);
      await connection.end();
      return { admin, child, folder };
    } catch (error) {
      if (child.exitCode !== null) throw error;
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
  }
  throw new Error('MariaDB did not come up within 10 seconds.');
}

function freePort(): Promise<number> {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address() as { port: number };
      probe.close(() => resolve(port));
    });
  });
}
