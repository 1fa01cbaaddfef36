import type { TestClient } from '../support/client';
import { channelDocument } from '../support/fixtures';
import { TestServer } from '../support/server';
import { stackupLayers } from '../support/stackups';

let server: TestServer;
let engineer: TestClient;
beforeAll(async () => {
  server = await TestServer.start();
  engineer = (await server.signedIn('layout-engineer')).client;
}, 60_000);
afterAll(() => server.stop());

describe('the cross-section desk', () => {
  const ask = (change: object = {}, by = engineer) =>
    by.post('/api/stackups/cross-section', {
      stackup: { layers: stackupLayers() },
      layer: 'L3',
      widthM: '5 mil',
      frequencyHz: '10 GHz',
      ...change,
    });

  it('tells impedance, delay and loss, the closed form beside, and what the impedance answers to', async () => {
    const { status, body } = await ask();
    expect(status).toBe(200);
    expect(body).toMatchObject({
      kind: 'stripline',
      pair: false,
      standing: 'solved',
      differencePercent: expect.any(Number),
    });
    const [mode] = body.figures.modes;
    expect(body.figures.z0Ohm).toBeGreaterThan(50);
    expect(mode.delaySPerM).toBeCloseTo(Math.sqrt(3.6) / 299792458, 12);
    expect(mode.conductorLossDbPerM).toBeGreaterThan(0);
    expect(Math.abs(body.differencePercent)).toBeLessThan(1);
    expect(body.planes).toEqual({ above: 'L2', below: 'L4' });
    expect(body.solver.errorZ0).toBeLessThan(0.01);
    const dk = body.sensitivities.filter((each: { of: string }) => each.of === 'dk');
    expect(dk.length).toBe(2);
    for (const each of dk) expect(each.ohmPerUnit).toBeLessThan(0);
  });

  it('draws a masked pair with its mask over copper and laminate', async () => {
    const mask = {
      kind: 'soldermask',
      name: 'M',
      thicknessM: '20 um',
      dk: 3.4,
      df: 0.02,
      atHz: '1 GHz',
      dispersion: 'wideband-debye',
    };
    const stackup = { layers: [mask, ...stackupLayers()] };
    const { status, body } = await ask({ stackup, layer: 'L1', gapM: '6 mil', sensitivities: false });
    expect(status).toBe(200);
    expect(body).toMatchObject({
      kind: 'coated-microstrip',
      pair: true,
      closedForm: null,
      sensitivities: [],
    });
    expect(body.closedFormReason).toContain('mask');
    expect(body.figures.differentialOhm).toBeCloseTo(2 * body.figures.modes[1].z0Ohm, 9);
    const { traces, mask: cover, sheets } = body.drawing;
    expect(traces).toHaveLength(2);
    const laminateM = Math.max(...sheets.map((sheet: { toM: number }) => sheet.toM));
    const highest = Math.max(...cover.outline.map(([, y]: [number, number]) => y));
    expect(highest - laminateM).toBeCloseTo(37.5e-6, 9);
  });

  it('keeps a solved section in the database, by its content', async () => {
    const count = async () =>
      (await server.server.sequelize.query('SELECT sha256 FROM section_solutions'))[0].length;
    await ask({ widthM: '131 um', sensitivities: false });
    const before = await count();
    await ask({ widthM: '131 um', frequencyHz: '3 GHz', sensitivities: false });
    expect(await count()).toBe(before);
    await ask({ widthM: '132 um', sensitivities: false });
    expect(await count()).toBe(before + 1);
  });

  it('shares a section that a check has solved, and a check takes one that it has solved', async () => {
    const kept = async () =>
      (await server.server.sequelize.query('SELECT sha256, created_at FROM section_solutions'))[0].length;
    const board = (await engineer.post('/api/boards', { name: 'Shared sections' })).body;
    const made = await engineer.post(`/api/revisions/${board.revisions[0].id}/channels`, {
      document: channelDocument({
        stackup: { layers: stackupLayers() },
        elements: [{ kind: 'trace', layer: 'L3', widthM: '141 um', lengthM: '20 mm' }],
      }),
    });
    const check = async (widthM: string) => {
      const document = structuredClone(made.body.document);
      document.elements[0].widthM = widthM;
      return engineer.post(`/api/channels/${made.body.id}/check`, { document });
    };
    expect((await check('142 um')).status).toBe(200);
    const after = await kept();
    // The desk finds what the check solved, and the check what the desk did: nothing is kept twice.
    await ask({ widthM: '142 um', sensitivities: false });
    expect(await kept()).toBe(after);
    await ask({ widthM: '143 um', sensitivities: false });
    expect(await kept()).toBe(after + 1);
    const { body } = await check('143 um');
    expect(await kept()).toBe(after + 1);
    expect((body.view ?? body).models[0]).toMatchObject({ kind: 'trace' });
  });

  it.each([
    ['a layer that is not there', { layer: 'L9' }, 422, 'layer'],
    ['a plane', { layer: 'L2' }, 422, 'layer'],
    ['a gap of zero', { gapM: 0 }, 400, 'gapM'],
    ['a width beyond any board', { widthM: '200 mm' }, 400, 'widthM'],
    [
      'a stackup with a Dk below 1',
      { stackup: { layers: stackupLayers({ D2: { dk: 0.5 } }) } },
      422,
      'stackup.layers[3].dk',
    ],
    [
      'a causal model without loss',
      { stackup: { layers: stackupLayers({ D2: { df: 0 } }) } },
      422,
      'stackup.layers[3].df',
    ],
  ])('refuses %s at the field', async (_what, change, status, path) => {
    const reply = await ask(change);
    expect([reply.status, reply.body.fields[0].path]).toEqual([status, path]);
  });

  it('says which planes were looked for', async () => {
    const { status, body } = await ask({ planes: { above: null, below: null } });
    expect([status, body.fields[0].message]).toEqual([422, expect.stringContaining('L2 (plane)')]);
  });

  it('answers anyone signed in, and no stranger', async () => {
    const librarian = (await server.signedIn('librarian')).client;
    expect((await ask({ sensitivities: false }, librarian)).status).toBe(200);
    const stranger = server.stranger();
    await stranger.readSession();
    expect((await ask({}, stranger)).status).toBe(401);
  });
});

describe('synthesis', () => {
  const ask = (change: object) =>
    engineer.post('/api/stackups/synthesis', {
      stackup: { layers: stackupLayers() },
      layer: 'L3',
      frequencyHz: '10 GHz',
      mode: 'single',
      targetOhm: 50,
      ...change,
    });

  it('finds the width of a trace', async () => {
    const { status, body } = await ask({});
    expect([status, body.found]).toEqual([200, 'width']);
    expect(body.reachedOhm).toBeCloseTo(50, 2);
    expect(body.section.figures.z0Ohm).toBeCloseTo(50, 2);
  });

  it('finds the width of a pair at a gap, and the gap at a width', async () => {
    const pair = { mode: 'differential', targetOhm: 95 };
    const width = (await ask({ ...pair, gapM: '6 mil' })).body;
    expect(width.reachedOhm).toBeCloseTo(95, 2);
    const gap = (await ask({ ...pair, widthM: width.widthM })).body;
    expect(gap.found).toBe('gap');
    expect(gap.gapM).toBeCloseTo(152.4e-6, 7);
  });

  it('refuses what no width reaches, with what is reached', async () => {
    const { status, body } = await ask({ targetOhm: 300 });
    expect([status, body.fields[0].path]).toEqual([422, 'targetOhm']);
    expect(body.fields[0].message).toMatch(/from .* to .* ohm/);
  });

  it.each([
    ['a pair without width and gap', { mode: 'differential' }, 'gapM'],
    ['a pair with both', { mode: 'differential', widthM: '5 mil', gapM: '5 mil' }, 'gapM'],
    ['a single trace with a gap', { gapM: '5 mil' }, 'gapM'],
  ])('refuses %s', async (_what, change, path) => {
    const { status, body } = await ask(change);
    expect([status, body.fields[0].path]).toEqual([400, path]);
  });
});
