import { password, TestServer } from '../support/server';

let server: TestServer;
beforeAll(async () => {
  server = await TestServer.start();
}, 60_000);
afterAll(() => server.stop());

async function latestLink(to: string): Promise<string> {
  const [row] = (await server.server.sequelize.query(
    'SELECT text_body AS text FROM outbox WHERE recipient = ? ORDER BY created_at DESC, id LIMIT 1',
    {
      replacements: [to],
    },
  )) as unknown as [{ text: string }[]];
  return /\/(?:reset|first)\/([\w-]{43})/.exec(row[0]!.text)![1]!;
}

describe('the first start', () => {
  it('makes one administrator by a link that works once', async () => {
    const fresh = await TestServer.start();
    const client = fresh.stranger();
    expect((await client.readSession()).body.unclaimed).toBe(true);
    const link = await fresh.server.features.people.firstAdministratorLink();
    const token = link.slice(link.lastIndexOf('/') + 1);
    const claim = { token, name: 'First', email: 'first@people.example', password };
    expect((await client.post('/api/first-administrator', claim)).status).toBe(204);
    expect((await client.post('/api/first-administrator', claim)).status).toBe(410);
    expect((await client.signIn('first@people.example', password)).body.can.managePeople).toBe(true);
    await fresh.stop();
  }, 60_000);
});

describe('a session', () => {
  it('is told to strangers with a token and nobody', async () => {
    const reply = await server.stranger().readSession();
    expect(reply.status).toBe(200);
    expect(reply.body.person).toBeNull();
    expect(reply.body.csrfToken.length).toBeGreaterThan(20);
  });

  it('is renewed at sign-in and gone after sign-out', async () => {
    const person = await server.makePerson('layout-engineer');
    const client = server.stranger();
    const before = await client.readSession();
    const after = await client.signIn(person.email, password);
    expect(after.body.csrfToken).not.toBe(before.body.csrfToken);
    expect(after.body.person).toEqual({
      id: person.id,
      name: person.name,
      email: person.email,
      roles: ['layout-engineer'],
    });
    expect((await client.delete('/api/session')).status).toBe(204);
    expect((await client.get('/api/boards')).status).toBe(401);
  });

  it('ends after seven days, however busy', async () => {
    const { client } = await server.signedIn('layout-engineer');
    server.clock.advance(7 * 24 * 3600 * 1000 + 1);
    expect((await client.get('/api/boards')).status).toBe(401);
  });

  it('has a cookie that scripts cannot read', async () => {
    const reply = await server.stranger().readSession();
    expect(reply.headers.get('set-cookie')).toMatch(/^tg-[0-9a-f]{8}=.*HttpOnly; SameSite=Lax/);
  });
});

describe('a change of password', () => {
  it('keeps this session and ends the others', async () => {
    const person = await server.makePerson('layout-engineer');
    const [one, other] = [server.stranger(), server.stranger()];
    await one.signIn(person.email, password);
    await other.signIn(person.email, password);
    const next = 'another long password';
    const changed = await one.put('/api/account/password', { currentPassword: password, newPassword: next });
    expect([changed.status, changed.text]).toEqual([204, '']);
    expect((await one.get('/api/boards')).status).toBe(200);
    expect((await other.get('/api/boards')).status).toBe(401);
    expect((await server.stranger().signIn(person.email, next)).status).toBe(200);
  });

  it('wants the current one and a long new one', async () => {
    const { client } = await server.signedIn('layout-engineer');
    const wrong = await client.put('/api/account/password', {
      currentPassword: 'not it',
      newPassword: 'another long password',
    });
    expect(wrong.body.fields[0].path).toBe('currentPassword');
    const short = await client.put('/api/account/password', {
      currentPassword: password,
      newPassword: 'short',
    });
    expect(short.body.fields[0]).toEqual({
      path: 'newPassword',
      message: 'A password has at least 12 characters.',
    });
  });
});

describe('a reset by mail', () => {
  it('gives a link that works once and ends all sessions', async () => {
    const { client, person } = await server.signedIn('layout-engineer');
    const stranger = server.stranger();
    await stranger.readSession();
    expect((await stranger.post('/api/password-resets', { email: person.email })).status).toBe(204);
    const token = await latestLink(person.email);
    const next = 'a wholly new password';
    expect((await stranger.post('/api/password-resets/complete', { token, newPassword: next })).status).toBe(
      204,
    );
    expect((await client.get('/api/boards')).status).toBe(401);
    expect((await stranger.post('/api/password-resets/complete', { token, newPassword: next })).status).toBe(
      410,
    );
    expect((await server.stranger().signIn(person.email, next)).status).toBe(200);
  });

  it('answers the same for an address nobody has', async () => {
    const stranger = server.stranger();
    await stranger.readSession();
    expect((await stranger.post('/api/password-resets', { email: 'nobody@people.example' })).status).toBe(
      204,
    );
  });

  it('runs out after an hour', async () => {
    const person = await server.makePerson('layout-engineer');
    const stranger = server.stranger();
    await stranger.readSession();
    await stranger.post('/api/password-resets', { email: person.email });
    const token = await latestLink(person.email);
    server.clock.advance(3600 * 1000 + 1);
    expect(
      (await stranger.post('/api/password-resets/complete', { token, newPassword: 'a wholly new password' }))
        .status,
    ).toBe(410);
  });
});

describe('people', () => {
  it('are invited by mail and choose their password', async () => {
    const { client: admin } = await server.signedIn('administrator');
    const made = await admin.post('/api/people', {
      name: 'New Colleague',
      email: 'New@People.example',
      roles: ['si-reviewer'],
    });
    expect(made.status).toBe(201);
    expect(made.body).toMatchObject({ email: 'new@people.example', invited: true, active: true });
    const stranger = server.stranger();
    await stranger.readSession();
    await stranger.post('/api/password-resets/complete', {
      token: await latestLink('new@people.example'),
      newPassword: password,
    });
    expect((await server.stranger().signIn('new@people.example', password)).status).toBe(200);
    const again = await admin.post('/api/people', {
      name: 'Twin',
      email: 'new@people.example',
      roles: ['si-reviewer'],
    });
    expect(again.status).toBe(409);
    expect(again.body.fields[0].path).toBe('email');
  });

  it('keep their last administrator', async () => {
    const fresh = await TestServer.start();
    const { client, person } = await fresh.signedIn('administrator');
    const reply = await client.patch(`/api/people/${person.id}`, { roles: ['librarian'] });
    expect(reply.status).toBe(409);
    expect(reply.body.fields[0].path).toBe('roles');
    await fresh.stop();
  }, 60_000);

  it('leave an event for what was done to them', async () => {
    const { client: admin } = await server.signedIn('administrator');
    const person = await server.makePerson('librarian');
    await admin.patch(`/api/people/${person.id}`, { active: false });
    const { body } = await admin.get('/api/events?what=person.deactivated');
    expect(body.items[0]).toMatchObject({ what: 'person.deactivated', subject: person.id });
  });
});
