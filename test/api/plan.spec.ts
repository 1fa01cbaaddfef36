import { TestServer } from '../support/server';
import type { TestClient } from '../support/client';

let server: TestServer;
let engineer: TestClient;
beforeAll(async () => {
  server = await TestServer.start();
  engineer = (await server.signedIn('layout-engineer')).client;
}, 60_000);
afterAll(() => server.stop());

async function board(name: string) {
  const { body } = await engineer.post('/api/boards', { name });
  return { id: body.id as string, revisionId: body.revisions[0].id as string };
}

const square = [
  [0, 0],
  ['160 mm', 0],
  [0.16, '4 in'],
  [0, 0.1016],
];

describe('the outline of a revision', () => {
  it('is none at first, is taken in any unit of length, and goes on to the next revision', async () => {
    const { id, revisionId } = await board('Outlined');
    expect((await engineer.get(`/api/revisions/${revisionId}`)).body.outline).toBeNull();
    const { status, body } = await engineer.patch(`/api/revisions/${revisionId}`, {
      outline: { cornersM: square },
    });
    expect(status).toBe(200);
    expect(body.outline.cornersM[2]).toEqual([0.16, 0.1016]);
    const next = await engineer.post(`/api/boards/${id}/revisions`, {});
    expect(next.body.outline).toEqual(body.outline);
    await engineer.patch(`/api/revisions/${revisionId}`, { outline: null });
    expect((await engineer.get(`/api/revisions/${revisionId}`)).body.outline).toBeNull();
  });

  it('that crosses itself is refused, naming the sides', async () => {
    const { revisionId } = await board('Crossed');
    const { status, body } = await engineer.patch(`/api/revisions/${revisionId}`, {
      outline: { cornersM: [square[0], square[2], square[1], square[3]] },
    });
    expect(status).toBe(422);
    expect(body.fields).toEqual([
      {
        path: 'outline.cornersM',
        message: 'The outline crosses itself: the side from corner 1 meets the side from corner 3.',
      },
    ]);
  });

  it('of two corners is refused at its place', async () => {
    const { revisionId } = await board('Thin');
    const { status, body } = await engineer.patch(`/api/revisions/${revisionId}`, {
      outline: { cornersM: square.slice(0, 2) },
    });
    expect(status).toBe(400);
    expect(body.fields[0]).toEqual({
      path: 'outline.cornersM',
      message: 'An outline has at least three corners.',
    });
  });
});

describe('the plan of a revision', () => {
  it('has the traces and parts that its channels draw, and nothing of what is only typed', async () => {
    const { revisionId } = await board('Planned');
    const document = {
      format: 'tollgate.channel/1',
      name: 'Lane 0',
      signaling: 'single-ended',
      elements: [
        {
          kind: 'trace',
          layer: 'L1',
          widthM: '0.1 mm',
          path: [
            [0, 0],
            ['10 mm', 0],
          ],
        },
        {
          kind: 'via',
          fromLayer: 'L1',
          toLayer: 'L3',
          drillM: 2e-4,
          padM: 4e-4,
          antipadM: 7e-4,
          plan: { xM: 0.01, yM: 0 },
        },
        { kind: 'line', z0Ohm: 50, lengthM: 0.01, effectivePermittivity: 3 },
      ],
    };
    const made = await engineer.post(`/api/revisions/${revisionId}/channels`, { document });
    expect((await engineer.get(`/api/revisions/${revisionId}/plan`)).body.items).toEqual([
      {
        id: made.body.id,
        name: 'Lane 0',
        traces: [
          {
            layer: 'L1',
            widthM: 1e-4,
            path: [
              [0, 0],
              [0.01, 0],
            ],
          },
        ],
        parts: [{ kind: 'via', at: [0.01, 0] }],
      },
    ]);
    await engineer.patch(`/api/channels/${made.body.id}`, { archived: true });
    expect((await engineer.get(`/api/revisions/${revisionId}/plan`)).body.items).toEqual([]);
  });
});
