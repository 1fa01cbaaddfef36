import { channelDocument } from '../support/fixtures';
import { TestServer } from '../support/server';
import type { TestClient } from '../support/client';

let server: TestServer;
let engineer: TestClient;
beforeAll(async () => {
  server = await TestServer.start();
  engineer = (await server.signedIn('layout-engineer')).client;
}, 60_000);
afterAll(() => server.stop());

/** Listens until `enough` lines of data have come, or gives up after ten seconds. */
async function listen(
  client: TestClient,
  path: string,
  enough: number,
  act: () => Promise<unknown>,
): Promise<{ what: string; seq: number; version: number | null }[]> {
  const stop = new AbortController();
  const response = await fetch(`${server.origin}${path}`, {
    headers: { cookie: client.cookieHeader },
    signal: stop.signal,
  });
  const reader = response.body!.pipeThrough(new TextDecoderStream()).getReader();
  const heard: { what: string; seq: number; version: number | null }[] = [];
  const timer = setTimeout(() => stop.abort(), 10_000);
  await act();
  let text = '';
  try {
    while (heard.length < enough) {
      const { value, done } = await reader.read();
      if (done) break;
      text += value;
      const lines = text.split('\n');
      text = lines.pop()!;
      for (const each of lines) if (each.startsWith('data: {"')) heard.push(JSON.parse(each.slice(6)));
    }
  } catch (error) {
    if ((error as Error).name !== 'AbortError') throw error;
  }
  clearTimeout(timer);
  stop.abort();
  return heard;
}

describe('the event stream', () => {
  it('tells members what was saved, and resumes where one left', async () => {
    const board = (await engineer.post('/api/boards', { name: 'Heron' })).body;
    const made = (
      await engineer.post(`/api/revisions/${board.revisions[0].id}/channels`, { document: channelDocument() })
    ).body;
    const heard = await listen(engineer, '/api/stream', 1, () =>
      engineer.put(
        `/api/channels/${made.id}`,
        { document: channelDocument({ name: 'Renamed' }) },
        { 'if-match': '"1"' },
      ),
    );
    expect(heard[0]).toMatchObject({ what: 'channel.saved', channelId: made.id, version: 2 });
    const again = await listen(engineer, `/api/stream?since=${heard[0]!.seq - 1}`, 1, () =>
      Promise.resolve(),
    );
    expect(again[0]!.seq).toBe(heard[0]!.seq);
  }, 30_000);

  it('says nothing of boards one is not a member of', async () => {
    const stranger = (await server.signedIn('layout-engineer')).client;
    const heard = await listen(stranger, '/api/stream', 1, async () => {
      await engineer.post('/api/boards', { name: 'Hidden' });
      await stranger.post('/api/boards', { name: 'Own' });
    });
    const own = (await stranger.get('/api/boards')).body.items[0].id;
    expect(heard[0]).toMatchObject({ what: 'board.created', boardId: own });
  }, 30_000);
});
