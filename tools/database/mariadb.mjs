import { execFileSync, spawn } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createServer, connect } from 'node:net';
import { tmpdir, userInfo } from 'node:os';
import { join } from 'node:path';

/** A private MariaDB in a folder of its own, on loopback. Node built-ins only: it runs before packages are installed. */

const packages = ['mariadb-server-core', 'mariadb-client-core'];
const daemon = '/usr/sbin/mariadbd';

/** Installs MariaDB from Debian where it is missing and we may; otherwise names the command and stops. */
export function ensureMariadb() {
  if (existsSync(daemon) && existsSync('/usr/bin/mariadb-install-db')) return;
  installPackages(packages, 'MariaDB');
}

/** Debian packages by apt as root; for others the command is named. */
export function installPackages(names, what) {
  const command = `apt-get install -y --no-install-recommends ${names.join(' ')}`;
  if (userInfo().uid !== 0 || !existsSync('/usr/bin/apt-get')) {
    throw new Error(`${what} is missing. Install it with: sudo ${command}`);
  }
  console.log(`Installing ${what} from Debian's packages`);
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  execFileSync('apt-get', ['update', '-qq'], { stdio: ['ignore', 'ignore', 'inherit'], env });
  execFileSync('apt-get', ['install', '-y', '-qq', '--no-install-recommends', ...names], {
    stdio: ['ignore', 'ignore', 'inherit'],
    env,
  });
}

export function freePort() {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address();
      probe.close(() => resolve(port));
    });
  });
}

/** Whether a process runs; one that has ended and is not yet collected does not. */
export function isAlive(pid) {
  if (!pid) return false;
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    return !/^\d+ \(.*\) [ZX]/.test(stat);
  } catch {
    return false;
  }
}

/** Whether a process is the daemon of this very data folder. */
function isDaemonOf(pid, data) {
  try {
    return isAlive(pid) && readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes(`--datadir=${data}`);
  } catch {
    return false;
  }
}

function initialise(folder, data) {
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  if (existsSync(join(data, 'mysql'))) return;
  const user = userInfo().username;
  execFileSync(
    'mariadb-install-db',
    [
      '--no-defaults',
      `--datadir=${data}`,
      '--auth-root-authentication-method=socket',
      `--auth-root-socket-user=${user}`,
      '--skip-test-db',
      `--user=${user}`,
    ],
    { stdio: ['ignore', 'ignore', 'pipe'] },
  );
}

/** The kernel takes 107 characters of a socket's path: a deep folder gets a short one elsewhere. */
function socketPath(folder) {
  const near = join(folder, 'socket');
  return near.length <= 100 ? near : join(tmpdir(), `tg-${randomBytes(6).toString('hex')}.sock`);
}

function answers(port) {
  return new Promise((resolve) => {
    const probe = connect(port, '127.0.0.1');
    probe.once('connect', () => (probe.destroy(), resolve(true)));
    probe.once('error', () => resolve(false));
  });
}

async function whenReady(port, pid) {
  for (let attempt = 0; attempt < 300; attempt++) {
    if (await answers(port)) return;
    if (!isAlive(pid)) throw new Error('MariaDB ended while it was starting; see error.log beside its data.');
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  throw new Error('MariaDB did not answer within 30 seconds.');
}

/** A user of our own with a random password; root may enter by the socket only. */
function createUser(socket, account) {
  const sql = `CREATE DATABASE IF NOT EXISTS ${account.database} CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci;
CREATE USER IF NOT EXISTS '${account.user}'@'127.0.0.1' IDENTIFIED BY '${account.password}';
ALTER USER '${account.user}'@'127.0.0.1' IDENTIFIED BY '${account.password}';
GRANT ALL ON *.* TO '${account.user}'@'127.0.0.1';`;
  execFileSync(
    'mariadb',
    [
      '--no-defaults',
      `--socket=${socket}`,
      '--user',
      userInfo().username === 'root' ? 'root' : userInfo().username,
    ],
    { input: sql, stdio: ['pipe', 'ignore', 'inherit'] },
  );
}

/**
 * Starts (or finds running) the database of a folder. Returns how to reach it, its process id and `stop`.
 * `preferredPort` is used again after a crash, so that the server's pool finds it where it was.
 */
export async function startDatabase(folder, preferredPort) {
  const data = join(folder, 'data');
  const file = join(folder, 'db.json');
  initialise(folder, data);
  const known = existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : undefined;
  if (known && isDaemonOf(known.pid, data) && (await answers(known.port))) return handle(known);

  const port = preferredPort ?? (await freePort());
  const socket = known?.socket ?? socketPath(folder);
  rmSync(socket, { force: true });
  const user = userInfo().username;
  const child = spawn(
    daemon,
    [
      '--no-defaults',
      `--datadir=${data}`,
      `--socket=${socket}`,
      `--pid-file=${join(folder, 'pid')}`,
      `--port=${port}`,
      '--bind-address=127.0.0.1',
      '--skip-name-resolve',
      '--character-set-server=utf8mb4',
      '--collation-server=utf8mb4_unicode_ci',
      '--max-allowed-packet=64M',
      `--log-error=${join(folder, 'error.log')}`,
      `--user=${user}`,
    ],
    { stdio: 'ignore', detached: true },
  );
  child.unref();
  await whenReady(port, child.pid);
  const account = known ?? {
    user: 'tollgate',
    password: randomBytes(24).toString('hex'),
    database: 'tollgate',
  };
  const now = { ...account, host: '127.0.0.1', port, socket, pid: child.pid };
  createUser(socket, now);
  writeFileSync(file, JSON.stringify(now), { mode: 0o600 });
  return handle(now);
}

function handle(now) {
  const { host, port, user, password, database, pid, socket } = now;
  return {
    access: { host, port, user, password, database },
    pid,
    async stop() {
      if (isAlive(pid)) process.kill(pid, 'SIGTERM');
      for (let attempt = 0; attempt < 300 && isAlive(pid); attempt++)
        await new Promise((resolve) => setTimeout(resolve, 50));
      rmSync(socket, { force: true });
    },
  };
}
