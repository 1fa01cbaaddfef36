import { randomBytes } from 'node:crypto';
import { chmodSync, existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureMariadb, freePort, isAlive, startDatabase } from '../database/mariadb.mjs';
import { KeptChild } from './children.mjs';
import { checkNode, ensurePackages } from './packages.mjs';

/** `npm start`: everything from a bare checkout to a product that answers. */

const root = join(dirname(fileURLToPath(import.meta.url)), '../..');
const port = Number(process.env.PORT || 4300);
const host = process.env.HOST || '127.0.0.1';
const dataDirectory = resolve(process.env.INIT_CWD ?? root, process.env.TOLLGATE_DATA || '.data');
const demonstration = (process.env.TOLLGATE_DEMO ?? '1') === '1';
const address = process.env.TOLLGATE_URL || `http://127.0.0.1:${port}`;
const out = resolve(root, process.env.TOLLGATE_BUILD || 'dist');
const runFile = join(dataDirectory, 'run.json');

function alreadyRunning() {
  if (!existsSync(runFile)) return undefined;
  const run = JSON.parse(readFileSync(runFile, 'utf8'));
  return isAlive(run.pid) && readFileSync(`/proc/${run.pid}/cmdline`, 'utf8').includes('start.mjs')
    ? run
    : undefined;
}

function refuseTakenPort() {
  return new Promise((done, fail) => {
    const probe = createServer();
    probe.once('error', () =>
      fail(new Error(`Port ${port} is taken. Set PORT to another, such as PORT=4310 npm start.`)),
    );
    probe.listen(port, host, () => probe.close(done));
  });
}

/** One secret for the life of the data directory: sessions survive a restart. */
function sessionSecret() {
  const file = join(dataDirectory, 'session-secret');
  if (!existsSync(file)) writeFileSync(file, randomBytes(32).toString('hex'), { mode: 0o600 });
  return readFileSync(file, 'utf8');
}

function serverChild(database, smtpPort, onReady) {
  const env = {
    ...process.env,
    NODE_ENV: 'production',
    PORT: String(port),
    TOLLGATE_DATA: dataDirectory,
    TOLLGATE_DEMO: demonstration ? '1' : '0',
    TOLLGATE_DB: JSON.stringify(database.access),
    TOLLGATE_WEB: join(out, 'web/browser'),
    TOLLGATE_SECRET: sessionSecret(),
    TOLLGATE_URL: address,
    ...(smtpPort ? { SMTP_URL: `smtp://127.0.0.1:${smtpPort}` } : {}),
  };
  const logFile = join(dataDirectory, 'server.log');
  return new KeptChild(
    'server',
    process.execPath,
    ['--enable-source-maps', join(out, 'server/main.mjs')],
    { env, cwd: root },
    (child) => {
      child.stdout.on('data', (text) => process.stdout.write(text));
      child.stderr.on('data', (text) => {
        writeFileSync(logFile, text, { flag: 'a', mode: 0o600 });
        for (const lineText of String(text).split('\n').filter(Boolean)) {
          if (lineText.includes('"message":"listening"')) onReady();
          else if (!lineText.startsWith('{')) console.error(lineText);
          else if (lineText.includes('"level":"error"')) console.error(lineText);
        }
      });
    },
  );
}

/** Keeps the database up: looks once a second, and starts it again on the same port where it has gone. */
function watchDatabase(state) {
  return setInterval(async () => {
    if (state.stopping || state.reviving || isAlive(state.database.pid)) return;
    state.reviving = true;
    console.error('The database ended; starting it again.');
    try {
      state.database = await startDatabase(join(dataDirectory, 'mariadb'), state.database.access.port);
      writeRun(state);
    } catch (error) {
      console.error(error.message);
    }
    state.reviving = false;
  }, 500);
}

function writeRun(state) {
  const run = {
    pid: process.pid,
    address,
    port,
    database: { port: state.database.access.port, pid: state.database.pid },
    server: { pid: state.server?.pid },
    mail: { port: state.smtpPort },
  };
  writeFileSync(runFile, JSON.stringify(run), { mode: 0o600 });
}

function printWelcome() {
  console.log(`\nTollgate answers at ${address}`);
  if (!demonstration) return;
  console.log(`Mail of this machine:  ${address}/mail`);
  const signIns = join(dataDirectory, 'demo-sign-ins.json');
  if (!existsSync(signIns)) return;
  console.log('\nDemonstration: everything in it is invented. Sign in as');
  for (const { role, email, password } of JSON.parse(readFileSync(signIns, 'utf8')))
    console.log(`  ${role.padEnd(16)}  ${email.padEnd(34)}  ${password}`);
  console.log('');
}

async function main() {
  checkNode();
  const running = alreadyRunning();
  if (running) {
    console.log(`Tollgate is running already at ${running.address}`);
    return;
  }
  await refuseTakenPort();
  ensurePackages(root);
  ensureMariadb();
  mkdirSync(dataDirectory, { recursive: true, mode: 0o700 });
  chmodSync(dataDirectory, 0o700);
  const { buildAll } = await import('../build/build.mjs');
  await buildAll(out);

  const state = { stopping: false, reviving: false };
  const stop = async () => {
    if (state.stopping) return;
    state.stopping = true;
    clearInterval(state.watch);
    await state.server?.stop();
    await state.catcher?.stop();
    await state.database?.stop();
    rmSync(runFile, { force: true });
    process.exit(0);
  };
  process.on('SIGINT', stop);
  process.on('SIGTERM', stop);

  state.database = await startDatabase(join(dataDirectory, 'mariadb'));
  state.watch = watchDatabase(state);
  if (demonstration) {
    state.smtpPort = await freePort();
    state.catcher = new KeptChild(
      'mail catcher',
      process.execPath,
      [join(root, 'tools/mail/catcher.mjs'), join(dataDirectory, 'mail'), String(state.smtpPort)],
      { cwd: root },
    );
    state.catcher.start();
  }
  let welcomed = false;
  state.server = serverChild(state.database, state.smtpPort, () => {
    writeRun(state);
    if (!welcomed) printWelcome();
    welcomed = true;
  });
  state.server.start();
  writeRun(state);
}

main().catch((error) => {
  console.error(error.message);
  process.exit(1);
});
