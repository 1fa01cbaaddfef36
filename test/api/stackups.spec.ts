import type { TestClient } from '../support/client';
import { channelDocument } from '../support/fixtures';
import { TestServer } from '../support/server';
import { stackupLayers } from '../support/stackups';

let server: TestServer;
let engineer: TestClient;
let reviewer: TestClient;
let boardId: string;

beforeAll(async () => {
  server = await TestServer.start();
  const made = await server.signedIn('layout-engineer');
  const other = await server.signedIn('si-reviewer');
  engineer = made.client;
  reviewer = other.client;
  boardId = (await engineer.post('/api/boards', { name: 'Heron' })).body.id;
  await engineer.put(`/api/boards/${boardId}/members/${other.person.id}`);
}, 60_000);
afterAll(() => server.stop());

async function newRevision(): Promise<string> {
  return (await engineer.post('/api/boards', { name: 'Board of its own' })).body.revisions[0].id as string;
}

function save(revisionId: string, seen: number, change: object = {}, by = engineer) {
  const body = { document: { layers: stackupLayers() }, why: 'A reason', ...change };
  return by.post(`/api/revisions/${revisionId}/stackups`, body, { 'if-match': `"${seen}"` });
}

const list = async (revisionId: string) => (await engineer.get(`/api/revisions/${revisionId}/stackups`)).body;

const trace = { kind: 'trace', layer: 'L3', widthM: '5 mil', lengthM: '50 mm' };

async function newChannel(revisionId: string, more: object = {}) {
  const document = channelDocument({ elements: [trace], stackup: { layers: stackupLayers() }, ...more });
  const reply = await engineer.post(`/api/revisions/${revisionId}/channels`, { document });
  expect(reply.status).toBe(201);
  return reply.body;
}

/** Until no re-check waits or runs; the server's own runner has most of them. */
async function settle(): Promise<void> {
  const sql = "SELECT id FROM jobs WHERE kind = 'recheck' AND state IN ('waiting', 'running')";
  for (;;) {
    await server.server.features.jobs.drain();
    if ((await server.server.sequelize.query(sql))[0].length === 0) return;
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
}

const channelOf = async (id: string) => (await engineer.get(`/api/channels/${id}`)).body;

describe('a stackup version', () => {
  it('is saved in SI as the next number, with its kind and why', async () => {
    const revisionId = await newRevision();
    expect(await list(revisionId)).toMatchObject({ items: [], can: { change: true, use: true } });
    const first = await save(revisionId, 0);
    expect(first.status).toBe(201);
    expect(first.body).toMatchObject({
      number: 1,
      kind: 'design',
      why: 'A reason',
      copperLayers: 4,
      layers: 7,
    });
    expect(first.body.document.layers[3].thicknessM).toBeCloseTo(203.2e-6, 12);
    const second = await save(revisionId, 1, { kind: 'as-built', why: 'From the section report' });
    expect(second.body).toMatchObject({ number: 2, kind: 'as-built' });
    const { items } = await list(revisionId);
    expect(items.map((each: { number: number }) => each.number)).toEqual([2, 1]);
    const read = await engineer.get(`/api/stackups/${first.body.id}`);
    expect(read.body.document).toEqual(first.body.document);
  });

  it('that someone else made in the meantime comes with the refusal', async () => {
    const revisionId = await newRevision();
    await save(revisionId, 0);
    const late = await save(revisionId, 0, { why: 'Late' });
    expect(late.status).toBe(412);
    expect(late.body.current).toMatchObject({ number: 1, why: 'A reason' });
    expect((await list(revisionId)).items).toHaveLength(1);
  });

  it('of two at once is made once', async () => {
    const revisionId = await newRevision();
    const replies = await Promise.all([save(revisionId, 0), save(revisionId, 0), save(revisionId, 0)]);
    expect(replies.map(({ status }) => status).sort()).toEqual([201, 412, 412]);
  });

  it('needs to say over which it is made, and why', async () => {
    const revisionId = await newRevision();
    const document = { layers: stackupLayers() };
    const blind = await engineer.post(`/api/revisions/${revisionId}/stackups`, { document, why: 'x' });
    expect(blind.status).toBe(428);
    const { status, body } = await save(revisionId, 0, { why: ' ' });
    expect([status, body.fields[0].path]).toEqual([400, 'why']);
  });

  it.each([
    ['no layers', { layers: [] }, 'document.layers'],
    ['a Dk below 1', { layers: stackupLayers({ D1: { dk: 0.9 } }) }, 'document.layers[1].dk'],
    [
      'a length that is none',
      { layers: stackupLayers({ L1: { thicknessM: '17 furlong' } }) },
      'document.layers[0].thicknessM',
    ],
    [
      'a causal dielectric without loss',
      { layers: stackupLayers({ D2: { df: 0 } }) },
      'document.layers[3].df',
    ],
    ['a name twice', { layers: stackupLayers({ L3: { name: 'L1' } }) }, 'document.layers[4].name'],
    [
      'a tolerance that leaves nothing',
      { layers: stackupLayers({ D1: { thicknessToleranceM: '0.1 mm' } }) },
      'document.layers[1].thicknessToleranceM',
    ],
    [
      'copper straight on copper',
      { layers: stackupLayers().filter((layer) => layer['name'] !== 'D1') },
      'document.layers[1].kind',
    ],
    [
      'solder mask inside',
      { layers: stackupLayers({ D2: { kind: 'soldermask' } }) },
      'document.layers[3].kind',
    ],
    [
      'no plane',
      { layers: stackupLayers({ L2: { role: 'signal' }, L4: { role: 'signal' } }) },
      'document.layers',
    ],
    [
      'a field nobody knows',
      { layers: stackupLayers({ D1: { colour: 'green' } }) },
      'document.layers[1].colour',
    ],
  ])('with %s is refused at the field', async (_what, document, path) => {
    const { status, body } = await save(await newRevision(), 0, { document });
    expect([status, body.fields.map((field: { path: string }) => field.path)]).toEqual([422, [path]]);
  });

  it('with suspicious values is kept, and says so', async () => {
    const layers = stackupLayers({ D1: { dk: 10, df: 0.02 }, D2: { thicknessM: '1 um' } });
    const { status, body } = await save(await newRevision(), 0, { document: { layers } });
    expect(status).toBe(201);
    expect(body.cautions.map((each: { path: string }) => each.path)).toEqual([
      'layers[1].dk',
      'layers[3].thicknessM',
    ]);
  });

  it('is never changed: the database itself refuses', async () => {
    const revisionId = await newRevision();
    await save(revisionId, 0);
    for (const sql of ["UPDATE stackup_versions SET why = 'other'", 'DELETE FROM stackup_versions'])
      await expect(server.server.sequelize.query(sql)).rejects.toThrow('never changed');
  });

  it('is not made in an archived revision', async () => {
    const revisionId = await newRevision();
    await engineer.patch(`/api/revisions/${revisionId}`, { archived: true });
    expect((await save(revisionId, 0)).status).toBe(409);
    expect((await list(revisionId)).can).toEqual({ change: false, use: false });
  });

  it('may be entered by a reviewer, who may not write it into channels', async () => {
    const revisionId = (await engineer.get(`/api/boards/${boardId}`)).body.revisions[0].id;
    expect((await save(revisionId, 0, {}, reviewer)).status).toBe(201);
    const listed = await reviewer.get(`/api/revisions/${revisionId}/stackups`);
    expect(listed.body.can).toEqual({ change: true, use: false });
    expect((await reviewer.post(`/api/revisions/${revisionId}/stackups/use`, {})).status).toBe(403);
  });

  it('leaves an event in the audit trail', async () => {
    const revisionId = await newRevision();
    const { body } = await save(revisionId, 0, { why: 'For the trail' });
    const admin = (await server.signedIn('administrator')).client;
    const { items } = (await admin.get('/api/events?what=stackup.version-created')).body;
    expect(items.map((event: { subject: string }) => event.subject)).toContain(body.id);
  });
});

describe('a copy', () => {
  it('of a readable revision becomes the next version, and names where it is from', async () => {
    const from = await newRevision();
    const { body: source } = await save(from, 0);
    const to = await newRevision();
    const { status, body } = await engineer.post(
      `/api/revisions/${to}/stackups/copy`,
      { fromVersionId: source.id },
      { 'if-match': '"0"' },
    );
    expect(status).toBe(201);
    expect(body.document).toEqual(source.document);
    expect(body.why).toContain('revision A, version 1');
    const sources = (await engineer.get('/api/stackups')).body.items;
    expect(sources.map((each: { revisionId: string }) => each.revisionId)).toEqual(
      expect.arrayContaining([from, to]),
    );
  });

  it('of a board one is no member of is refused like one that is not there', async () => {
    const { body: source } = await save(await newRevision(), 0);
    const stranger = (await server.signedIn('layout-engineer')).client;
    const own = (await stranger.post('/api/boards', { name: 'Mine' })).body.revisions[0].id;
    for (const fromVersionId of [source.id, own]) {
      const reply = await stranger.post(
        `/api/revisions/${own}/stackups/copy`,
        { fromVersionId },
        { 'if-match': '"0"' },
      );
      expect([reply.status, reply.body.fields[0].path]).toEqual([422, 'fromVersionId']);
    }
    expect((await stranger.get(`/api/stackups/${source.id}`)).status).toBe(404);
    expect((await stranger.get('/api/stackups')).body.items).toEqual([]);
  });

  it('is what a new revision starts with', async () => {
    const board = (await engineer.post('/api/boards', { name: 'Grows' })).body;
    await save(board.revisions[0].id, 0, { kind: 'as-built' });
    const made = (await engineer.post(`/api/boards/${board.id}/revisions`, {})).body;
    expect((await list(made.id)).items).toMatchObject([{ number: 1, kind: 'as-built' }]);
  });
});

describe('drafts', () => {
  it('take the newest stackup on demand, each as its next version, and follow it from then on', async () => {
    const revisionId = await newRevision();
    const made = await newChannel(revisionId, { stackup: { temperatureC: 60, layers: stackupLayers() } });
    await save(revisionId, 0, { document: { layers: stackupLayers({ D2: { thicknessM: '10 mil' } }) } });
    const { status, body } = await engineer.post(`/api/revisions/${revisionId}/stackups/use`, {});
    expect(status).toBe(200);
    expect(body).toEqual({
      number: 1,
      unchanged: 0,
      changed: [{ channelId: made.id, name: made.name, version: 2 }],
    });
    await settle();
    const now = await channelOf(made.id);
    expect(now).toMatchObject({ version: 2, outOfDate: false });
    expect(now.document.stackup.layers[3].thicknessM).toBeCloseTo(254e-6, 12);
    expect(now.document.stackup.temperatureC).toBe(60);
    expect(now.check.fingerprint).not.toBe(made.check.fingerprint);
    expect((await list(revisionId)).drafts).toEqual({ total: 1, following: 1, behind: 0 });
    const again = await engineer.post(`/api/revisions/${revisionId}/stackups/use`, {});
    expect(again.body).toEqual({ number: 1, unchanged: 1, changed: [] });
  });

  it('that follow go out of date with a newer version until they take it', async () => {
    const revisionId = await newRevision();
    const { id } = await newChannel(revisionId);
    await save(revisionId, 0);
    await engineer.post(`/api/revisions/${revisionId}/stackups/use`, {});
    await settle();
    await save(revisionId, 1, { document: { layers: stackupLayers({ D3: { dk: 3.7 } }) } });
    await settle();
    expect((await channelOf(id)).outOfDate).toBe(true);
    expect((await list(revisionId)).drafts).toEqual({ total: 1, following: 1, behind: 1 });
    await engineer.post(`/api/revisions/${revisionId}/stackups/use`, { channelIds: [id] });
    await settle();
    expect((await channelOf(id)).outOfDate).toBe(false);
  });

  it('with a stackup of their own are checked again and stay as they are', async () => {
    const revisionId = await newRevision();
    const { id, version, document } = await newChannel(revisionId);
    await save(revisionId, 0, { document: { layers: stackupLayers({ D3: { dk: 3.9 } }) } });
    await settle();
    expect(await channelOf(id)).toMatchObject({ version, document, outOfDate: false });
  });

  it('of another revision are not written to', async () => {
    const revisionId = await newRevision();
    await save(revisionId, 0);
    const elsewhere = await newChannel(await newRevision());
    const reply = await engineer.post(`/api/revisions/${revisionId}/stackups/use`, {
      channelIds: [elsewhere.id],
    });
    expect([reply.status, reply.body.fields[0].path]).toEqual([422, 'channelIds[0]']);
  });

  it('have nothing to take where there is no version', async () => {
    const reply = await engineer.post(`/api/revisions/${await newRevision()}/stackups/use`, {});
    expect(reply.status).toBe(409);
  });
});
