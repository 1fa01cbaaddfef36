import { TestServer } from '../support/server';
import type { TestClient } from '../support/client';

let server: TestServer;
let engineer: TestClient;
beforeAll(async () => {
  server = await TestServer.start();
  engineer = (await server.signedIn('layout-engineer')).client;
}, 60_000);
afterAll(() => server.stop());

describe('a board', () => {
  it('starts with its maker and a revision A', async () => {
    const { status, body } = await engineer.post('/api/boards', {
      name: 'Heron',
      description: 'A line card',
    });
    expect(status).toBe(201);
    expect(body.revisions.map((each: { letter: string }) => each.letter)).toEqual(['A']);
    expect(body.members).toHaveLength(1);
    expect(body.can).toEqual({ change: true, manageMembers: true, createRevision: true });
  });

  it('without a name is refused at the field', async () => {
    const { status, body } = await engineer.post('/api/boards', { name: '   ' });
    expect(status).toBe(400);
    expect(body.fields).toEqual([{ path: 'name', message: 'Name must not be empty.' }]);
  });

  it('is seen by its members only', async () => {
    const { body } = await engineer.post('/api/boards', { name: 'Petrel' });
    const other = await server.signedIn('si-reviewer');
    expect((await other.client.get('/api/boards')).body.items).toEqual([]);
    await engineer.put(`/api/boards/${body.id}/members/${other.person.id}`);
    expect((await other.client.get(`/api/boards/${body.id}`)).body.can.change).toBe(false);
    await engineer.delete(`/api/boards/${body.id}/members/${other.person.id}`);
    expect((await other.client.get(`/api/boards/${body.id}`)).status).toBe(404);
  });

  it('keeps its last member', async () => {
    const { body } = await engineer.post('/api/boards', { name: 'Alone' });
    const reply = await engineer.delete(`/api/boards/${body.id}/members/${body.members[0].personId}`);
    expect(reply.status).toBe(409);
  });

  it('in the archive takes no new revision', async () => {
    const { body } = await engineer.post('/api/boards', { name: 'Old' });
    await engineer.patch(`/api/boards/${body.id}`, { archived: true });
    expect((await engineer.post(`/api/boards/${body.id}/revisions`, {})).status).toBe(409);
  });
});

describe('a revision', () => {
  it('gets the next letter, and starts as a copy of another', async () => {
    const board = (await engineer.post('/api/boards', { name: 'Copied' })).body;
    const from = board.revisions[0].id;
    const link = (await engineer.post(`/api/revisions/${from}/links`, { name: 'Uplink' })).body;
    const document = {
      format: 'tollgate.channel/1',
      name: 'Lane',
      signaling: 'single-ended',
      elements: [{ kind: 'line', z0Ohm: 50, lengthM: 0.01, effectivePermittivity: 3 }],
    };
    await engineer.post(`/api/revisions/${from}/channels`, { document, linkId: link.id });
    const { status, body } = await engineer.post(`/api/boards/${board.id}/revisions`, {
      copyFrom: from,
      releaseOn: '2026-12-18',
    });
    expect(status).toBe(201);
    expect(body).toMatchObject({ letter: 'B', releaseOn: '2026-12-18', links: [{ name: 'Uplink' }] });
    const copied = (await engineer.get(`/api/revisions/${body.id}/channels`)).body.items;
    expect(copied).toHaveLength(1);
    expect(copied[0]).toMatchObject({ name: 'Lane', linkId: body.links[0].id, version: 1 });
  });

  it('of a letter in use is refused at the field', async () => {
    const board = (await engineer.post('/api/boards', { name: 'Twice' })).body;
    const { status, body } = await engineer.post(`/api/boards/${board.id}/revisions`, { letter: 'A' });
    expect(status).toBe(409);
    expect(body.fields[0].path).toBe('letter');
  });
});
