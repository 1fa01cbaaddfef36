import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensureMariadb, installPackages, startDatabase } from '../database/mariadb.mjs';
import { checkNode, ensurePackages } from '../start/packages.mjs';

/** `npm test`: brings what the tests need, runs everything, and ends with one plain line. */

const root = join(dirname(fileURLToPath(import.meta.url)), '../..');
const out = resolve(root, 'dist-test');
const work = mkdtempSync(join(tmpdir(), 'tg-test-'));
const totals = { passed: 0, failed: 0 };
const failures = [];
const skipped = [];
/** References and measured files of Debian that some tests call (test/support/needs.ts); without them those are named as skipped. */
const references = {
  'python3-scikit-rf': '/usr/lib/python3/dist-packages/skrf',
  ngspice: '/usr/bin/ngspice',
  atlc: '/usr/bin/atlc',
};

function run(command, args, env = {}) {
  return new Promise((done) => {
    const child = spawn(command, args, {
      cwd: root,
      env: { ...process.env, ...env },
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    let text = '';
    child.stdout.on('data', (part) => (text += part));
    child.stderr.on('data', (part) => (text += part));
    child.on('close', (code) => done({ code, text }));
  });
}

function onPath(name) {
  return (process.env.PATH ?? '').split(':').some((folder) => existsSync(join(folder, name)));
}

function bin(name) {
  return join(root, 'node_modules/.bin', name);
}

/** A check that is a whole counts as one test. */
async function whole(name, command, args) {
  const started = Date.now();
  const { code, text } = await run(command, args);
  tally(name, code === 0 ? 1 : 0, code === 0 ? 0 : 1, started);
  if (code !== 0) failures.push(`${name}\n${text.slice(-6000)}`);
}

function tally(name, passed, failed, started) {
  totals.passed += passed;
  totals.failed += failed;
  console.log(
    `${failed ? 'FAILED' : 'passed'}  ${name}  (${passed} passed, ${failed} failed, ${Math.round((Date.now() - started) / 1000)} s)`,
  );
}

async function jest(name, config, args, env) {
  const started = Date.now();
  const report = join(work, `${name}.json`);
  const { code, text } = await run(
    bin('jest'),
    ['--config', config, '--json', `--outputFile=${report}`, '--silent', ...args],
    env,
  );
  if (!existsSync(report)) {
    tally(name, 0, 1, started);
    failures.push(`${name} did not run\n${text.slice(-6000)}`);
    return;
  }
  const result = JSON.parse(readFileSync(report, 'utf8'));
  const broken = result.testResults.filter(
    (file) => file.assertionResults.length === 0 && file.status === 'failed',
  );
  tally(name, result.numPassedTests, result.numFailedTests + broken.length, started);
  for (const file of result.testResults) {
    if (broken.includes(file)) failures.push(`${file.name}\n${file.message.slice(0, 3000)}`);
    for (const test of file.assertionResults) {
      if (test.status === 'failed')
        failures.push(`${test.fullName}\n${test.failureMessages.join('\n').slice(0, 3000)}`);
      else if (test.status === 'pending') skipped.push(test.fullName);
    }
  }
  if (code !== 0 && result.numFailedTests + broken.length === 0)
    failures.push(`${name} ended with ${code}\n${text.slice(-3000)}`);
}

/** Brings the references where we may; their absence is an error only where everything is required, as .ci/run does. */
function ensureReferences() {
  const missing = Object.keys(references).filter((name) => !existsSync(references[name]));
  if (missing.length === 0) return;
  try {
    installPackages(missing, `What tests compare with (${missing.join(', ')})`);
  } catch (error) {
    if (process.env.TOLLGATE_REQUIRE_ALL === '1') throw error;
    console.log(`${error.message}\nWithout it the tests that need it are skipped.`);
  }
}

async function main() {
  checkNode();
  ensurePackages(root);
  ensureMariadb();
  const programs = { chromium: 'chromium', pdftotext: 'poppler-utils', qpdf: 'qpdf', python3: 'python3' };
  const missing = Object.keys(programs).filter((name) => !onPath(name));
  if (missing.length)
    installPackages(
      missing.map((name) => programs[name]),
      `What the tests call (${missing.join(', ')})`,
    );
  ensureReferences();

  const database = await startDatabase(join(work, 'mariadb'));
  try {
    const node = process.execPath;
    await Promise.all([
      (async () => {
        await whole('lint', bin('eslint'), ['.', '--max-warnings', '0']);
        await whole('format', bin('prettier'), ['--check', '.']);
      })(),
      (async () => {
        await whole('types of the libraries', bin('tsc'), ['-p', 'tsconfig.libs.json', '--noEmit']);
        await whole('types of server, tools and tests', bin('tsc'), ['-p', 'tsconfig.node.json', '--noEmit']);
        await whole('types of the client', bin('tsc'), ['-p', 'apps/web/tsconfig.app.json', '--noEmit']);
        await whole("types of the client's specs", bin('tsc'), [
          '-p',
          'apps/web/tsconfig.spec.json',
          '--noEmit',
        ]);
      })(),
    ]);
    const env = { TOLLGATE_TEST_DB: JSON.stringify(database.access), TOLLGATE_BUILD: out };
    await whole('build', node, [join(root, 'tools/build/build.mjs'), '--out', 'dist-test']);
    await jest('units and API', 'jest.config.mjs', ['--maxWorkers=2'], env);
    if (existsSync(join(root, 'test/journeys/jest.config.mjs')))
      await jest('journeys', 'test/journeys/jest.config.mjs', ['--runInBand'], env);
  } finally {
    await database.stop();
    rmSync(work, { recursive: true, force: true });
  }
  for (const name of skipped) console.log(`skipped  ${name}`);
  for (const failure of failures) console.log(`\n--- ${failure}`);
  const left = skipped.length ? `, ${skipped.length} skipped` : '';
  console.log(`${totals.passed} passed, ${totals.failed} failed${left}`);
  process.exit(totals.failed > 0 || failures.length > 0 || totals.passed === 0 ? 1 : 0);
}

main().catch((error) => {
  console.error(error.message);
  console.log(`${totals.passed} passed, ${totals.failed + 1} failed`);
  process.exit(1);
});
