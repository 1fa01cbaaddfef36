import { spawnSync } from 'node:child_process';
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { lossyPart } from '../../../test/support/fixtures';

// Every run is a process of its own, and the first one bundles.
jest.setTimeout(60_000);

const root = resolve(__dirname, '../../..');
let folder: string;

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'channel-'));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

interface Run {
  readonly code: number | null;
  readonly out: string;
  readonly errors: string;
}

/** Runs the command line as a process of its own, with a person standing in `folder`. */
function channel(...words: string[]): Run {
  const env = { ...process.env, INIT_CWD: folder, TOLLGATE_BUILD: join(folder, 'build') };
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    [join(root, 'tools/channel/run.mjs'), ...words],
    {
      cwd: root,
      env,
      encoding: 'utf8',
      maxBuffer: 1 << 28,
    },
  );
  return { code: status, out: stdout, errors: stderr };
}

const line = { kind: 'line', z0Ohm: 50, lengthM: 0.1, effectivePermittivity: 4, lossSqrtDbPerM: 10 };
const grid = { startHz: 1e9, stopHz: 5e9, points: 401 };
const limit = { id: 'loss', title: 'Own limit', quantity: 'insertion-loss', sense: 'max' };

function write(name: string, more: object): string {
  const document = { format: 'tollgate.channel/1', name: 'Test channel', signaling: 'single-ended', grid };
  writeFileSync(join(folder, name), JSON.stringify({ ...document, elements: [line], ...more }));
  return name;
}

function limited(db: number, more: object = {}): object {
  return { limits: [{ ...limit, segments: [{ fromHz: 1e9, toHz: 4e9, formula: `${db}` }], ...more }] };
}

describe('the command line', () => {
  it('exits 0 where the channel holds, and says so with the status of the limit', () => {
    const run = channel(write('holds.json', limited(3, { status: 'informative' })));
    expect(run).toMatchObject({ code: 0, errors: '' });
    expect(run.out).toContain('Test channel: holds, informative limit.');
    expect(run.out).toContain('worst margin 1.000 dB at 4 GHz');
  });

  it('exits 1 where it exceeds', () => {
    const run = channel(write('exceeds.json', limited(1.5)));
    expect(run).toMatchObject({ code: 1, errors: '' });
    expect(run.out).toContain('Test channel: exceeds.');
    expect(run.out).toContain('worst margin -0.500 dB at 4 GHz');
  });

  it('exits 2 where a limit could not be judged, names the range, and still writes the response', () => {
    const segments = [{ fromHz: 1e9, toHz: 9e9, formula: '5' }];
    const run = channel(
      write('short.json', { limits: [{ ...limit, segments }] }),
      '--response',
      'short.out.json',
    );
    expect(run.code).toBe(2);
    expect(run.errors).toMatch(
      /short\.json: limits\[0\] \(Own limit\): Not judged: .*5 GHz to 9 GHz.*Widen the grid/,
    );
    const response = JSON.parse(readFileSync(join(folder, 'short.out.json'), 'utf8'));
    expect(response.limits[0].verdict).toBe('not-judged');
    expect(response.s.length).toBe(401);
  });

  it('prints the response instead of the verdict on request, and nothing else', () => {
    const run = channel(write('holds.json', limited(3)), '--response', '-');
    expect(run.code).toBe(0);
    const response = JSON.parse(run.out);
    expect(response.format).toBe('tollgate.response/1');
    expect(response.ports).toBe(2);
    expect(response.fingerprint).toMatch(/^[0-9a-f]{64}$/);
    expect(response.limits[0].worstRefined.marginDb).toBeCloseTo(1, 6);
  });

  it('writes a Touchstone file that it reads as a part, to the same loss', () => {
    expect(channel(write('holds.json', limited(3)), '--touchstone', 'holds.s2p').code).toBe(0);
    const again = write('part.json', {
      ...limited(3),
      elements: [{ kind: 'touchstone', file: 'holds.s2p' }],
    });
    expect(channel(again).out).toContain('worst margin 1.000 dB at 4 GHz');
  });

  it.each([
    ['no file', [], 'No channel file is named.'],
    ['an unknown option', ['a.json', '--respond', 'x'], '--respond: This option is not known.'],
    ['an option without its file', ['a.json', '--response'], 'needs a file name'],
    ['two files', ['a.json', 'b.json'], 'One channel file'],
    ['a file that is not there', ['nowhere.json'], 'there is no such file'],
  ])('refuses %s with exit code 2', (_, words, message) => {
    const run = channel(...words);
    expect(run).toMatchObject({ code: 2, out: '' });
    expect(run.errors).toContain(message);
  });

  it('tells what is wrong with a file, where, and how to mend it', () => {
    writeFileSync(join(folder, 'broken.json'), '{ "format": ');
    expect(channel('broken.json').errors).toContain('broken.json: This is not JSON');
    const run = channel(write('wrong.json', { elements: [{ ...line, lengthMm: 4 }] }));
    expect(run).toMatchObject({ code: 2, out: '' });
    expect(run.errors).toBe(
      'wrong.json: elements[0].lengthMm: "lengthMm" is not a field known here. Remove it or correct its spelling.\n',
    );
  });

  it('never reads a part outside the folder of the channel file, by a path or a link', () => {
    mkdirSync(join(folder, 'inside'), { recursive: true });
    writeFileSync(join(folder, 'secret.s2p'), '# GHz S RI R 50\n1 0 0 1 0 1 0 0 0\n2 0 0 1 0 1 0 0 0\n');
    symlinkSync('../secret.s2p', join(folder, 'inside/link.s2p'));
    for (const file of ['../secret.s2p', join(folder, 'secret.s2p'), 'link.s2p', 'a/../../secret.s2p']) {
      const run = channel(write('inside/out.json', { elements: [line, { kind: 'touchstone', file }] }));
      expect(run.code).toBe(2);
      expect(run.errors).toContain('elements[1].file');
      expect(run.errors).toContain("lies outside the channel file's folder");
    }
  });

  it('refuses a part named by identifier, and one with a broken row by its line', () => {
    const fileId = '7d9a2a1e-6f53-4a83-9d42-1f0c1a8f9e11';
    expect(channel(write('id.json', { elements: [{ kind: 'touchstone', fileId }] })).errors).toContain(
      'elements[0].fileId',
    );
    writeFileSync(join(folder, 'bad.s2p'), '# GHz S RI R 50\n1 0 0 1 0 1 0 0 0\n2 0 0 x 0 1 0 0 0\n');
    const run = channel(write('bad.json', { elements: [{ kind: 'touchstone', file: 'bad.s2p' }] }));
    expect(run.code).toBe(2);
    expect(run.errors).toContain('bad.s2p, line 3');
  });
});

describe('the bundle of the command line', () => {
  it('is made once, with the code of the first run, and both are kept while the sources stay as they are', () => {
    const file = write('holds.json', limited(3));
    channel(file);
    const made = () =>
      readdirSync(join(folder, 'build/channel')).map((name) => {
        const { mtimeMs, size } = statSync(join(folder, 'build/channel', name));
        return { name, mtimeMs, size };
      });
    const first = made();
    expect(first.map(({ name }) => name.replace(/^channel-[0-9a-f]{16}/, ''))).toEqual(['.cjs', '.code']);
    expect(channel(file).code).toBe(0);
    expect(made()).toEqual(first);
  });

  it('runs where the kept code is of no use', () => {
    const file = write('holds.json', limited(3));
    channel(file);
    const code = readdirSync(join(folder, 'build/channel')).find((name) => name.endsWith('.code'))!;
    writeFileSync(join(folder, 'build/channel', code), 'no code');
    expect(channel(file)).toMatchObject({ code: 0, errors: '' });
  });
});

/** Measured files beside the repository, or ones of the same shape written here where it stands alone. */
const measured = join(
  process.env['TOLLGATE_REFERENCE'] ?? resolve(root, '../shared/reference'),
  'touchstone',
);
const hostMask = [
  { fromHz: 5e7, toHz: 12.890625e9, formula: '1.5 + 4.6*sqrt(f) + 1.318*f' },
  { fromHz: 12.890625e9, toHz: 25.78125e9, formula: '-12.71 + 3.7*f' },
];
const chipMask = [
  { fromHz: 1e7, toHz: 14e9, formula: '1.076*(0.075 + 0.537*sqrt(f) + 0.566*f)' },
  { fromHz: 14e9, toHz: 18.75e9, formula: '1.076*(-18 + 2*f)' },
];

function bring(name: string, ports: 2 | 4, fromGhz: number, toGhz: number): void {
  const path = join(measured, name);
  if (existsSync(path)) writeFileSync(join(folder, name), readFileSync(path));
  else writeFileSync(join(folder, name), lossyPart(ports, fromGhz, toGhz));
}

describe('measured parts against published masks', () => {
  it('judges a cable with its loss against the host mask and the chip-to-module mask', () => {
    bring('cable1_rx_pair.s4p', 4, 0.01, 40);
    const elements = [{ kind: 'touchstone', file: 'cable1_rx_pair.s4p', portOrder: '1-2,3-4' }];
    const mask = (id: string, segments: object[]) => ({ ...limit, id, title: id, segments });
    const limits = [mask('93.9.2', hostMask), mask('83E.1', chipMask)];
    const run = channel(
      write('cable.json', {
        signaling: 'differential',
        grid: undefined,
        symbolRateBd: 25.78125e9,
        elements,
        limits,
      }),
      '--response',
      '-',
    );
    expect(run.errors).toBe('');
    const response = JSON.parse(run.out);
    expect(response.ports).toBe(4);
    expect(response.limits.map((one: { verdict: string }) => one.verdict)).not.toContain('not-judged');
    expect(run.code).toBe(response.limits.every((one: { holds: boolean }) => one.holds) ? 0 : 1);
    const [ledger] = response.ledger;
    expect(ledger.totalDb).toBeCloseTo(ledger.rows[0].tollDb + ledger.reflectionDb, 9);
  });

  it('judges a stripline against a limit of our own', () => {
    bring('pcb_stripline_119mm.s2p', 2, 0.01, 20);
    const elements = [{ kind: 'touchstone', file: 'pcb_stripline_119mm.s2p' }];
    const limits = [{ ...limit, segments: [{ fromHz: 1e9, toHz: 8e9, formula: '0.5 + 1.2*sqrt(f)' }] }];
    const run = channel(write('stripline.json', { elements, limits, grid: undefined }));
    expect(run.errors).toBe('');
    expect([0, 1]).toContain(run.code);
    expect(run.out).toMatch(/worst margin -?\d+\.\d{3} dB at/);
  });

  it('does not judge a microstrip measured to 10 GHz above it, and names 10 to 25.78125 GHz', () => {
    bring('msl100.s2p', 2, 0.05, 10);
    const elements = [{ kind: 'touchstone', file: 'msl100.s2p' }];
    const limits = [{ ...limit, segments: hostMask }];
    const run = channel(
      write('msl.json', { elements, limits, grid: undefined }),
      '--response',
      'msl.out.json',
    );
    expect(run.code).toBe(2);
    expect(run.errors).toMatch(/Not judged: .*10 GHz to 25\.78125 GHz/);
    const response = JSON.parse(readFileSync(join(folder, 'msl.out.json'), 'utf8'));
    expect(response.frequenciesHz.at(-1)).toBeLessThanOrEqual(10e9);
    expect(response.frequenciesHz.at(-1)).toBeGreaterThan(9.98e9);
    expect(response.limits[0].worst).not.toBeNull();
  });
});
