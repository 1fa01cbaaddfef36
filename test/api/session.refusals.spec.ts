import { password, TestServer } from '../support/server';

let server: TestServer;
beforeAll(async () => {
  server = await TestServer.start();
}, 60_000);
afterAll(() => server.stop());

describe('sign-in', () => {
  it('answers alike for a wrong password and an unknown account', async () => {
    const person = await server.makePerson('layout-engineer');
    const client = server.stranger();
    const wrong = await client.signIn(person.email, 'not the password');
    const unknown = await client.signIn('nobody@people.example', 'not the password');
    expect(wrong.status).toBe(401);
    expect(unknown.status).toBe(401);
    expect({ ...wrong.body, instance: '' }).toEqual({ ...unknown.body, instance: '' });
  });

  it('names the missing field', async () => {
    const client = server.stranger();
    await client.readSession();
    const reply = await client.post('/api/session', { email: 'a@b.example' });
    expect(reply.status).toBe(400);
    expect(reply.headers.get('content-type')).toContain('application/problem+json');
    expect(reply.body.fields).toEqual([{ path: 'password', message: 'Give your password.' }]);
  });

  it('refuses an unknown field', async () => {
    const client = server.stranger();
    await client.readSession();
    const reply = await client.post('/api/session', { email: 'a@b.example', password: 'x', admin: true });
    expect(reply.body.fields[0].path).toBe('admin');
  });

  it('is refused after ten failures in a quarter of an hour, with Retry-After, and open again later', async () => {
    const person = await server.makePerson('layout-engineer');
    const client = server.stranger();
    for (let i = 0; i < 10; i++) await client.signIn(person.email, 'wrong');
    const refused = await client.signIn(person.email, password);
    expect(refused.status).toBe(429);
    expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(0);
    server.clock.advance(16 * 60 * 1000);
    expect((await client.signIn(person.email, password)).status).toBe(200);
  });

  it('is refused to a deactivated person', async () => {
    const { client: admin } = await server.signedIn('administrator');
    const person = await server.makePerson('layout-engineer');
    await admin.patch(`/api/people/${person.id}`, { active: false });
    expect((await server.stranger().signIn(person.email, password)).status).toBe(401);
  });
});

describe('an unsafe request', () => {
  it('without the token is refused', async () => {
    const person = await server.makePerson('layout-engineer');
    const client = server.stranger();
    await client.readSession();
    const reply = await client.post(
      '/api/session',
      { email: person.email, password },
      { 'x-csrf-token': 'guessed' },
    );
    expect(reply.status).toBe(403);
    expect(reply.body.id).toBe('untrusted-origin');
  });

  it('from another origin is refused', async () => {
    const { client } = await server.signedIn('layout-engineer');
    const reply = await client.post('/api/boards', { name: 'x' }, { origin: 'https://elsewhere.example' });
    expect(reply.status).toBe(403);
  });
});

describe('a request', () => {
  it('that is not JSON is refused with the reason', async () => {
    const client = server.stranger();
    await client.readSession();
    const reply = await client.post('/api/session', '{"email":', { 'content-type': 'application/json' });
    expect(reply.status).toBe(400);
    expect(reply.body.fields[0].message).toContain('not JSON');
  });

  it('larger than a document is refused', async () => {
    const client = server.stranger();
    await client.readSession();
    const reply = await client.post('/api/session', { email: 'x'.repeat(3_000_000), password: 'x' });
    expect(reply.status).toBe(413);
  });
});

describe('a link', () => {
  it('that was never given is refused', async () => {
    const client = server.stranger();
    await client.readSession();
    const reply = await client.post('/api/password-resets/complete', {
      token: 'A'.repeat(43),
      newPassword: password,
    });
    expect(reply.status).toBe(410);
  });

  it('for the first administrator is refused once there are people', async () => {
    await server.makePerson('administrator');
    const link = await server.server.features.people.firstAdministratorLink();
    const client = server.stranger();
    await client.readSession();
    const token = link.slice(link.lastIndexOf('/') + 1);
    const reply = await client.post('/api/first-administrator', {
      token,
      name: 'Late',
      email: 'late@people.example',
      password,
    });
    expect(reply.status).toBe(410);
  });
});
