import { execFileSync } from 'node:child_process';
import { readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { TestServer } from '../support/server';
import type { TestClient } from '../support/client';
import { rawUpload } from '../support/raw-upload';
import { channelDocument, limit, line, twoPortText } from '../support/fixtures';

let server: TestServer;
let engineer: TestClient;
let boardId: string;
let revisionId: string;

beforeAll(async () => {
  server = await TestServer.start();
  engineer = (await server.signedIn('layout-engineer')).client;
  const board = (await engineer.post('/api/boards', { name: 'Heron' })).body;
  boardId = board.id;
  revisionId = board.revisions[0].id;
}, 60_000);
afterAll(() => server.stop());

async function make(changes: Record<string, unknown> = {}) {
  const reply = await engineer.post(`/api/revisions/${revisionId}/channels`, {
    document: channelDocument(changes),
  });
  if (reply.status !== 201) throw new Error(reply.text);
  return reply.body;
}

function save(id: string, version: number, document: unknown, client = engineer) {
  return client.put(`/api/channels/${id}`, { document }, { 'if-match': `"${version}"` });
}

async function upload(name: string, text: string) {
  return engineer.post(path(name), text);
}

function path(name: string): string {
  return `/api/boards/${boardId}/files?name=${name}`;
}

/** The node's own runner may have taken the job: waits for what it leaves. */
async function until<Value>(read: () => Promise<Value>, enough: (value: Value) => boolean): Promise<Value> {
  for (let attempt = 0; ; attempt++) {
    await server.server.features.jobs.drain();
    const value = await read();
    if (enough(value) || attempt > 50) return value;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}

describe('a channel', () => {
  it('is stored in SI, checked, and listed with its verdict', async () => {
    const made = await make();
    expect(made.document.elements[0].lengthM).toBe(0.05);
    expect(made.verdict).toBe('holds');
    expect(made.check.limits[0].verdict).toBe('holds');
    const row = (await engineer.get(`/api/revisions/${revisionId}/channels`)).body.items.find(
      (each: { id: string }) => each.id === made.id,
    );
    expect(row).toMatchObject({
      verdict: 'holds',
      worstLimitTitle: limit.title,
      worstLimitStatus: 'own',
      version: 1,
      outOfDate: false,
    });
    expect(row.worstMarginDb).toBeCloseTo(made.check.worstMarginDb, 9);
  });

  it('that exceeds says so', async () => {
    const made = await make({ elements: [{ ...line, lengthM: '2 m' }] });
    expect(made.verdict).toBe('exceeds');
    expect(made.check.worstMarginDb).toBeLessThan(0);
  });

  it('that cannot be checked is kept, with the reasons', async () => {
    const made = await make({ elements: [line, { kind: 'touchstone' }] });
    expect(made.verdict).toBe('not-checked');
    expect(made.check).toBeNull();
    expect(made.checkProblems[0].path).toBe('elements[1].file');
  });

  it('of a broken shape is refused with paths and not kept', async () => {
    const before = (await engineer.get(`/api/revisions/${revisionId}/channels`)).body.items.length;
    const reply = await engineer.post(`/api/revisions/${revisionId}/channels`, {
      document: channelDocument({ elements: [{ ...line, z0Ohm: -1 }] }),
    });
    expect(reply.status).toBe(422);
    expect(reply.body.fields[0].path).toBe('document.elements[0].z0Ohm');
    expect((await engineer.get(`/api/revisions/${revisionId}/channels`)).body.items.length).toBe(before);
  });
});

describe('checking without saving', () => {
  it('gives the view, and leaves the stored channel alone', async () => {
    const made = await make();
    const reply = await engineer.post(`/api/channels/${made.id}/check`, {
      document: channelDocument({ elements: [{ ...line, lengthM: '1 m' }] }),
    });
    expect(reply.status).toBe(200);
    expect(reply.body.verdict).toBe('exceeds');
    expect((await engineer.get(`/api/channels/${made.id}`)).body.verdict).toBe('holds');
  });

  it('tells problems with their paths', async () => {
    const made = await make();
    const reply = await engineer.post(`/api/channels/${made.id}/check`, {
      document: channelDocument({
        limits: [{ ...limit, segments: [{ ...limit.segments[0], formula: '1 + g' }] }],
      }),
    });
    expect(reply.status).toBe(422);
    expect(reply.body.fields[0].path).toMatch(/^document\.limits\[0\]\.segments\[0\]/);
  });
});

describe('saving', () => {
  it('wants the version it was made from', async () => {
    const made = await make();
    expect((await engineer.put(`/api/channels/${made.id}`, { document: channelDocument() })).status).toBe(
      428,
    );
  });

  it('raises the version and checks anew', async () => {
    const made = await make();
    const { status, body } = await save(
      made.id,
      1,
      channelDocument({ elements: [{ ...line, lengthM: '2 m' }] }),
    );
    expect(status).toBe(200);
    expect(body).toMatchObject({ version: 2, verdict: 'exceeds' });
    expect((await engineer.get(`/api/channels/${made.id}`)).body.check.fingerprint).toBe(
      body.check.fingerprint,
    );
  });

  it('over someone else is told what is there now and loses nothing', async () => {
    const made = await make();
    const colleague = await server.signedIn('layout-engineer');
    await engineer.put(`/api/boards/${boardId}/members/${colleague.person.id}`);
    await save(made.id, 1, channelDocument({ name: 'Theirs' }), colleague.client);
    const { status, body } = await save(made.id, 1, channelDocument({ name: 'Mine' }));
    expect(status).toBe(412);
    expect(body.current).toMatchObject({ version: 2, name: 'Theirs' });
    expect((await engineer.get(`/api/channels/${made.id}`)).body.name).toBe('Theirs');
  });

  it('at the same moment lets one of two through', async () => {
    const made = await make();
    const replies = await Promise.all(
      ['One', 'Two', 'Three'].map((name) => save(made.id, 1, channelDocument({ name }))),
    );
    expect(replies.map((reply) => reply.status).sort()).toEqual([200, 412, 412]);
  });

  it('for ten minutes is one event that holds a JSON Patch', async () => {
    const made = await make();
    await save(made.id, 1, channelDocument({ name: 'Second' }));
    await save(made.id, 2, channelDocument({ name: 'Third', symbolRateBd: 5e9 }));
    const events = () =>
      server.server.sequelize.query("SELECT body FROM events WHERE what = 'channel.edited' AND subject = ?", {
        replacements: [made.id],
      }) as unknown as Promise<[{ body: string }[]]>;
    expect((await events())[0]).toHaveLength(0);
    server.clock.advance(11 * 60 * 1000);
    const rows = await until(
      async () => (await events())[0],
      (found) => found.length > 0,
    );
    expect(rows).toHaveLength(1);
    const { to } = JSON.parse(rows[0]!.body) as { to: { version: number; patch: { path: string }[] } };
    expect(to.version).toBe(3);
    expect(to.patch.map((step) => step.path).sort()).toEqual(['/name', '/symbolRateBd']);
  });

  it('in an archived revision is refused', async () => {
    const board = (await engineer.post('/api/boards', { name: 'Closed' })).body;
    const revision = board.revisions[0].id;
    const made = (await engineer.post(`/api/revisions/${revision}/channels`, { document: channelDocument() }))
      .body;
    await engineer.patch(`/api/revisions/${revision}`, { archived: true });
    expect((await save(made.id, 1, channelDocument())).status).toBe(409);
    expect((await engineer.get(`/api/channels/${made.id}`)).body.can.change).toBe(false);
  });
});

describe('a part', () => {
  it('is read at upload and used by its identifier', async () => {
    const file = (await upload('part.s2p', twoPortText())).body;
    expect(file).toMatchObject({ ports: 2, points: 200, fromHz: 1e8, toHz: 20e9 });
    const made = await make({ elements: [line, { kind: 'touchstone', fileId: file.id, below: 'to-dc' }] });
    expect(made.verdict).toBe('holds');
  });

  it('of the same bytes and name is one file', async () => {
    const first = await upload('twin.s2p', twoPortText(3));
    const second = await upload('twin.s2p', twoPortText(3));
    expect(second.body.id).toBe(first.body.id);
  });

  it('that ends below the mask leaves the limit not judged, with the range that is missing', async () => {
    const file = (await upload('short.s2p', twoPortText(3))).body;
    const made = await make({ elements: [line, { kind: 'touchstone', fileId: file.id, below: 'to-dc' }] });
    expect(made.verdict).toBe('not-judged');
    expect(made.check.limits[0].reason).toContain('3');
    expect(made.check.limits[0].missingHz).toEqual([[3e9, 5e9]]);
    const last = made.check.frequenciesHz[made.check.frequenciesHz.length - 1];
    expect(last).toBeLessThanOrEqual(3e9);
  });

  it('that cannot be read is refused with its line, and leaves nothing behind', async () => {
    const files = (await engineer.get(`/api/boards/${boardId}/files`)).body.items.length;
    const reply = await upload('broken.s2p', '# GHz S RI R 50\n1 0 0 1 0 1 0 0 0\n2 0 0 one 0 1 0 0 0\n');
    expect(reply.status).toBe(422);
    expect(reply.body.fields[0].message).toContain('Line 3');
    expect((await engineer.get(`/api/boards/${boardId}/files`)).body.items.length).toBe(files);
    expect(readdirSync(join(server.dataDirectory, 'tmp'))).toEqual([]);
  });

  it('of another kind, or announced larger than 64 MB, is refused', async () => {
    expect((await upload('notes.txt', 'hello')).status).toBe(422);
    const reply = await engineer.post(`/api/boards/${boardId}/files?name=x.s2p`, 'x', {
      'content-type': 'image/png',
    });
    expect(reply.status).toBe(415);
  });

  it('announced larger than 64 MB is refused before it is read', async () => {
    const { status, reply } = await rawUpload(
      server.origin,
      engineer,
      path('x.s2p'),
      String(65 * 1024 * 1024),
      (request) => request.flushHeaders(),
    );
    expect(status).toBe(413);
    expect(JSON.parse(reply)).toMatchObject({ id: 'too-large' });
    expect(readdirSync(join(server.dataDirectory, 'tmp'))).toEqual([]);
  });

  it('that breaks off on its way leaves nothing behind', async () => {
    const before = (await engineer.get(`/api/boards/${boardId}/files`)).body.items.length;
    await rawUpload(server.origin, engineer, path('half.s2p'), '1000', (request) => {
      request.write('# GHz S RI R 50\n1 0 0 1 0 1 0 0 0\n');
      setTimeout(() => request.destroy(), 200);
    }).catch(() => undefined);
    await until(
      () => Promise.resolve(readdirSync(join(server.dataDirectory, 'tmp'))),
      (left) => left.length === 0,
    );
    expect(readdirSync(join(server.dataDirectory, 'tmp'))).toEqual([]);
    expect((await engineer.get(`/api/boards/${boardId}/files`)).body.items.length).toBe(before);
  });

  it('of another board is not found', async () => {
    const other = (await engineer.post('/api/boards', { name: 'Other' })).body;
    const file = (await engineer.post(`/api/boards/${other.id}/files?name=part.s2p`, twoPortText(2))).body;
    const made = await make({ elements: [line, { kind: 'touchstone', fileId: file.id }] });
    expect(made.checkProblems[0].message).toContain('not one of the board');
    expect((await engineer.get(`/api/boards/${boardId}/files/${file.id}`)).status).toBe(404);
  });

  it('comes back as it was, to be saved and never shown', async () => {
    const text = twoPortText(2);
    const file = (await upload('back.s2p', text)).body;
    const reply = await engineer.get(`/api/boards/${boardId}/files/${file.id}`);
    expect(reply.text).toBe(text);
    expect(reply.headers.get('content-disposition')).toContain('attachment');
    expect(reply.headers.get('x-content-type-options')).toBe('nosniff');
  });
});

describe('exchange', () => {
  async function withPart() {
    const file = (await upload('exchange.s2p', twoPortText())).body;
    return make({
      name: 'Exchanged',
      elements: [line, { kind: 'touchstone', fileId: file.id, below: 'to-dc' }],
    });
  }

  async function exported(id: string): Promise<Buffer> {
    const response = await fetch(`${server.origin}/api/channels/${id}/export`, {
      headers: { cookie: engineer.cookieHeader },
    });
    expect(response.headers.get('content-type')).toContain('application/zip');
    return Buffer.from(await response.arrayBuffer());
  }

  it('of an export gives the same check again, its part included', async () => {
    const made = await withPart();
    const reply = await engineer.post(`/api/revisions/${revisionId}/import`, await exported(made.id), {
      'content-type': 'application/zip',
    });
    expect(reply.status).toBe(201);
    expect(reply.body.check.fingerprint).toBe(made.check.fingerprint);
  });

  it('gives the command line the fingerprint of the server', async () => {
    const made = await withPart();
    const folder = join(server.dataDirectory, 'unpacked');
    writeFileSync(join(server.dataDirectory, 'out.zip'), await exported(made.id));
    execFileSync('python3', ['-m', 'zipfile', '-e', join(server.dataDirectory, 'out.zip'), folder]);
    const printed = execFileSync(
      'npm',
      ['run', '-s', 'channel', '--', join(folder, 'channel.json'), '--response', '-'],
      { encoding: 'utf8', maxBuffer: 1e9 },
    );
    expect((JSON.parse(printed) as { fingerprint: string }).fingerprint).toBe(made.check.fingerprint);
  }, 60_000);

  it('refuses a lone channel file whose part did not come along', async () => {
    const document = JSON.stringify(
      channelDocument({ elements: [line, { kind: 'touchstone', file: 'parts/x.s2p' }] }),
    );
    const reply = await engineer.post(`/api/revisions/${revisionId}/import`, document, {
      'content-type': 'application/json',
    });
    expect(reply.status).toBe(422);
    expect(reply.body.fields[0].path).toBe('document.elements[1].file');
  });

  it('refuses what is no archive', async () => {
    const reply = await engineer.post(`/api/revisions/${revisionId}/import`, 'PK not really', {
      'content-type': 'application/zip',
    });
    expect(reply.status).toBe(422);
    expect(readdirSync(join(server.dataDirectory, 'tmp'))).toEqual([]);
  });

  it('gives the whole response of the stored document', async () => {
    const made = await make();
    const { body } = await engineer.get(`/api/channels/${made.id}/response`);
    expect(body.format).toBe('tollgate.response/1');
    expect(body.fingerprint).toBe(made.check.fingerprint);
    expect(body.s.length).toBe(body.frequenciesHz.length);
  });
});

describe('mask sets', () => {
  it('are the three published ones, and a limit taken from one names its revision', async () => {
    const sets = (await engineer.get('/api/mask-sets')).body.items;
    expect(sets.map((set: { key: string }) => set.key)).toEqual(['69B-KR-IL', '83E-C2M-IL', '93-KR4-IL']);
    const kr4 = sets[2];
    const taken = { ...kr4.limits[0], source: { text: kr4.standard, itemRevision: kr4.revisionId } };
    const made = await make({ limits: [taken], symbolRateBd: 25.78125e9 });
    expect(made.check.limits[0]).toMatchObject({ verdict: 'holds', status: 'informative' });
    const altered = await make({
      limits: [{ ...taken, segments: [{ fromHz: 1e9, toHz: 2e9, formula: '100' }] }],
    });
    expect(altered.checkProblems[0].message).toContain('differs from the mask set');
  });
});

describe('a check sheet', () => {
  it('is a sound PDF whose text names channel, verdict and fingerprint', async () => {
    const made = await make({ name: 'Lane Ω, printed' });
    const response = await fetch(`${server.origin}/api/channels/${made.id}/sheet`, {
      headers: { cookie: engineer.cookieHeader },
    });
    expect(response.headers.get('content-type')).toContain('application/pdf');
    const path = join(server.dataDirectory, 'sheet.pdf');
    writeFileSync(path, Buffer.from(await response.arrayBuffer()));
    execFileSync('qpdf', ['--check', path]);
    const text = execFileSync('pdftotext', ['-layout', path, '-'], { encoding: 'utf8' });
    expect(text).toContain('Lane Ω, printed');
    expect(text).toContain('Holds, worst margin');
    expect(text).toContain(made.check.fingerprint);
    expect(text).toContain('no compliance test');
  });

  it('of a channel without a check is refused with what stands in its way', async () => {
    const made = await make({ elements: [line, { kind: 'touchstone' }] });
    const reply = await engineer.get(`/api/channels/${made.id}/sheet`);
    expect(reply.status).toBe(409);
    expect(reply.body.fields[0].path).toBe('elements[1].file');
  });
});
