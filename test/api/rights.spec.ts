import { rightOf, roles, roleAllows, type Role } from '@tollgate/contracts';
import { routeName, type Route } from '../../server/src/platform/http';
import type { TestClient } from '../support/client';
import { TestServer } from '../support/server';
import { stackupLayers } from '../support/stackups';

interface World {
  readonly boardId: string;
  readonly revisionId: string;
  readonly linkId: string;
  readonly channelId: string;
  readonly fileId: string;
  readonly stackupId: string;
  readonly personId: string;
}

const none = '00000000-0000-4000-8000-000000000000';
/** A body no route takes: whoever is let in is told so, and nothing is done. */
const unusable = { '': 'unusable' };

let server: TestServer;
let world: World;
let members: Map<Role, TestClient>;
let outsiders: Map<Role, TestClient>;

const channel = {
  format: 'tollgate.channel/1',
  name: 'Lane',
  signaling: 'single-ended',
  symbolRateBd: 10e9,
  elements: [{ kind: 'line', z0Ohm: 50, lengthM: 0.05, effectivePermittivity: 3.6, lossSqrtDbPerM: 4 }],
};

beforeAll(async () => {
  server = await TestServer.start();
  members = new Map();
  outsiders = new Map();
  const { client: maker } = await server.signedIn('layout-engineer');
  const board = (await maker.post('/api/boards', { name: 'Board' })).body;
  const revisionId = board.revisions[0].id as string;
  for (const role of roles) {
    const inside = await server.signedIn(role);
    members.set(role, inside.client);
    await maker.put(`/api/boards/${board.id}/members/${inside.person.id}`);
    outsiders.set(role, (await server.signedIn(role)).client);
  }
  const link = (await maker.post(`/api/revisions/${revisionId}/links`, { name: 'Link' })).body;
  const made = (await maker.post(`/api/revisions/${revisionId}/channels`, { document: channel })).body;
  const file = (
    await maker.post(
      `/api/boards/${board.id}/files?name=thru.s2p`,
      '# GHz S RI R 50\n1 0 0 1 0 1 0 0 0\n2 0 0 1 0 1 0 0 0\n',
    )
  ).body;
  const stackup = (
    await maker.post(
      `/api/revisions/${revisionId}/stackups`,
      { document: { layers: stackupLayers() }, why: 'First' },
      { 'if-match': '"0"' },
    )
  ).body;
  world = {
    boardId: board.id,
    revisionId,
    linkId: link.id,
    channelId: made.id,
    fileId: file.id,
    stackupId: stackup.id,
    personId: none,
  };
}, 120_000);

afterAll(() => server.stop());

function addressOf(route: Route): string {
  const values: Record<string, string> = { ...world, mailId: 'none' };
  const path = `/api${route.path}`.replace(/:(\w+)/g, (_all, name: string) => values[name] ?? none);
  return route.path.endsWith('/files') && route.method === 'post' ? `${path}?name=x.s2p` : path;
}

async function statusFor(client: TestClient, route: Route): Promise<number> {
  // The stream never ends by itself; that it is let in shows in its head.
  if (route.path === '/stream') return streamStatus(client);
  const body =
    ['post', 'put', 'patch'].includes(route.method) && (route.body ?? route.raw) ? unusable : undefined;
  return (await client.send(route.method.toUpperCase(), addressOf(route), body)).status;
}

async function streamStatus(client: TestClient): Promise<number> {
  const reply = await client.get('/api/stream?since=none');
  return reply.status;
}

const refused = [401, 403, 404];

describe('every route', () => {
  it('has a row in the rights table', () => {
    for (const route of server.server.features.routes) expect(rightOf(route.action)).toBeDefined();
  });

  it('came from a declaration: nothing else answers under /api', async () => {
    const stranger = server.stranger();
    expect((await stranger.get('/api/nothing-here')).status).toBe(404);
    const names = server.server.features.routes.map(routeName);
    expect(new Set(names).size).toBe(names.length);
    const description = (await stranger.get('/api/openapi.json')).body as {
      paths: Record<string, Record<string, unknown>>;
    };
    const described = Object.entries(description.paths).flatMap(([path, methods]) =>
      Object.keys(methods).map((method) => `${method.toUpperCase()} ${path.replace(/\{(\w+)\}/g, ':$1')}`),
    );
    expect(described.sort()).toEqual(names.sort());
  });

  it('below a board names how its board is found', () => {
    const homeless = server.server.features.routes.filter(
      (route) => rightOf(route.action).scope === 'member' && !route.board,
    );
    expect(homeless.map(routeName)).toEqual([]);
  });

  it('that is not public refuses strangers with 401', async () => {
    const stranger = server.stranger();
    await stranger.readSession();
    for (const route of server.server.features.routes) {
      const { scope } = rightOf(route.action);
      if (scope === 'public' || scope === 'demo') continue;
      expect([routeName(route), await statusFor(stranger, route)]).toEqual([routeName(route), 401]);
    }
  });

  it.each(roles)('answers a member who is %s as the table says', async (role) => {
    for (const route of inQuestion()) {
      const status = await statusFor(members.get(role)!, route);
      const allowed = roleAllows(route.action, [role]);
      if (!allowed) expect([routeName(route), status]).toEqual([routeName(route), 403]);
      else
        expect([routeName(route), refused.includes(status) && !isAbsent(route, status)]).toEqual([
          routeName(route),
          false,
        ]);
    }
  });

  it.each(roles)('hides boards from a %s who is no member', async (role) => {
    for (const route of inQuestion().filter((each) => rightOf(each.action).scope === 'member')) {
      expect([routeName(route), await statusFor(outsiders.get(role)!, route)]).toEqual([
        routeName(route),
        404,
      ]);
    }
  });

  it('of the demonstration is not there without it', async () => {
    for (const route of server.server.features.routes.filter(
      (each) => rightOf(each.action).scope === 'demo',
    )) {
      expect([routeName(route), await statusFor(server.stranger(), route)]).toEqual([routeName(route), 404]);
    }
  });
});

/** Routes whose answer depends on who asks; signing out would end the caller's session. */
function inQuestion(): Route[] {
  return server.server.features.routes.filter((route) => {
    const { scope } = rightOf(route.action);
    return scope !== 'public' && scope !== 'demo' && routeName(route) !== 'DELETE /api/session';
  });
}

/** The person these examples name does not exist: that much is told to those who may. */
function isAbsent(route: Route, status: number): boolean {
  return status === 404 && route.path.includes(':personId');
}
