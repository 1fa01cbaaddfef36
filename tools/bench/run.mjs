import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { availableParallelism, tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensurePackages } from '../start/packages.mjs';

/**
 * `npm run bench`: medians of this engine, of Debian's scikit-rf and of plain C compiled on the spot, side by side on one
 * thread. This engine and C take turns for a few rounds, and all three stay on the processor where C is fastest just now, so that
 * what else the machine does meets them alike. What is not installed has no figure (null with `-- --json`).
 */
const root = join(dirname(fileURLToPath(import.meta.url)), '../..');
const work = mkdtempSync(join(tmpdir(), 'tg-bench-'));
const file = join(work, 'long.s4p');
const rounds = 5;
const oneThread = { OMP_NUM_THREADS: '1', OPENBLAS_NUM_THREADS: '1' };

/** Words before a command that keep it on one processor; none where that cannot be chosen. */
let kept = [];

/** Runs one of the three programs; its lines "job seconds" as a map, or undefined where it cannot run here. */
function times(name, command, args) {
  const [first, ...words] = [...kept, command, ...args];
  const { status, stdout, stderr, error } = spawnSync(first, words, {
    encoding: 'utf8',
    env: { ...process.env, ...oneThread },
  });
  if (error || status !== 0) {
    console.error(`${name} is left out: ${error?.message ?? stderr.trim().split('\n').at(-1)}`);
    return undefined;
  }
  return new Map(
    stdout
      .split('\n')
      .map((line) => line.trim().split(' '))
      .filter((words) => words.length === 2)
      .map(([job, seconds]) => [job, Number(seconds)]),
  );
}

async function bundled() {
  const { build } = await import('esbuild');
  const outfile = join(work, 'ours.mjs');
  await build({
    entryPoints: [join(root, 'test/bench/ours.ts')],
    outfile,
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    tsconfig: join(root, 'tsconfig.base.json'),
    logLevel: 'warning',
  });
  return outfile;
}

function ours(program) {
  const found = times('This engine', process.execPath, [program, file, work]);
  if (!found) throw new Error('The bench of this engine does not run.');
  return found;
}

/** Keeps what follows on the processor that runs C's first job fastest: a busy twin of a core slows programs by unequal shares. */
function choosePlace(plain) {
  if (spawnSync('taskset', ['--version']).status !== 0) return;
  const places = Array.from({ length: availableParallelism() }, (_unused, cpu) => [
    'taskset',
    '-c',
    `${cpu}`,
  ]);
  const speeds = places.map((place) => {
    kept = place;
    return times('C', plain, ['probe'])?.values().next().value ?? Infinity;
  });
  kept = places[speeds.indexOf(Math.min(...speeds))];
}

/** The median of each job over the rounds. */
function middle(found) {
  const jobs = [...(found[0]?.keys() ?? [])];
  return new Map(
    jobs.map((job) => [
      job,
      found.map((round) => round.get(job)).sort((a, b) => a - b)[Math.floor(found.length / 2)],
    ]),
  );
}

/** The path of the compiled program, or undefined where there is no compiler. */
function compiledC() {
  const program = join(work, 'plain');
  const built = spawnSync('gcc', ['-O3', '-o', program, join(root, 'test/bench/plain.c'), '-lm'], {
    encoding: 'utf8',
  });
  if (built.error || built.status !== 0) {
    console.error(`C is left out: ${built.error?.message ?? built.stderr}`);
    return undefined;
  }
  return program;
}

function scikitRf() {
  const python = '/usr/bin/python3';
  if (!existsSync(python)) return undefined;
  return times('scikit-rf', python, [join(root, 'test/bench/scikit_rf.py'), file, work]);
}

function table(rows) {
  const shown = (value) => (value === null ? '-' : `${(value * 1000).toFixed(2)} ms`).padStart(12);
  const ratio = (over, under) =>
    (over === null || under === null ? '-' : (over / under).toFixed(2)).padStart(12);
  const lines = rows.map(({ job, ours: own, scikitRf: python, c }) =>
    [job.padEnd(28), shown(own), shown(python), shown(c), ratio(python, own), ratio(own, c)].join(''),
  );
  const heads = ['ours', 'scikit-rf', 'C', 'rf / ours', 'ours / C'].map((head) => head.padStart(12));
  return ['job'.padEnd(28) + heads.join(''), ...lines].join('\n');
}

try {
  ensurePackages(root);
  const program = await bundled();
  const plain = compiledC();
  if (plain) choosePlace(plain);
  const engineRounds = [];
  const cRounds = [];
  for (let round = 0; round < rounds; round++) {
    engineRounds.push(ours(program));
    const c = plain && times('C', plain, [file]);
    if (c) cRounds.push(c);
  }
  const engine = middle(engineRounds);
  const c = middle(cRounds);
  const reference = scikitRf();
  const rows = [...engine].map(([job, seconds]) => ({
    job,
    ours: seconds,
    scikitRf: reference?.get(job) ?? null,
    c: c.get(job) ?? null,
  }));
  console.log(process.argv.includes('--json') ? JSON.stringify(rows) : table(rows));
} finally {
  rmSync(work, { recursive: true, force: true });
}
