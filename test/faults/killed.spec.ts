import { TestClient } from '../support/client';
import { channelDocument } from '../support/fixtures';
import { Product } from '../support/product';

let product: Product;
beforeAll(async () => {
  product = await Product.start();
}, 300_000);
afterAll(() => product.stop());

/**
 * Saves version after version, the kill falling while a save is on its way, until saves succeed again. A version once
 * acknowledged must never be found missing: what is stored may be newer than the last answer, never older.
 */
async function saveThrough(
  client: TestClient,
  channelId: string,
  from: number,
  kill: () => void,
): Promise<number> {
  let acknowledged = from;
  for (let round = 0; round < 400; round++) {
    const document = channelDocument({ name: `Saved ${acknowledged + 1}` });
    const saving = client
      .put(`/api/channels/${channelId}`, { document }, { 'if-match': `"${acknowledged}"` })
      .catch(() => undefined);
    if (round === 5) {
      await new Promise((resolve) => setTimeout(resolve, 5));
      kill();
    }
    const reply = await saving;
    if (reply?.status === 200) {
      expect(reply.body.version).toBe(acknowledged + 1);
      acknowledged = reply.body.version as number;
    } else if (reply?.status === 412) {
      // Only the one save whose answer was lost may have been written without our knowing.
      expect(reply.body.current.version).toBe(acknowledged + 1);
      acknowledged = reply.body.current.version as number;
    } else await new Promise((resolve) => setTimeout(resolve, 100));
    if (round > 8 && reply?.status === 200) return acknowledged;
  }
  throw new Error(`It did not come back:\n${product.output}`);
}

/** The start command notes a new process a moment after it answers. */
async function changedPid(victim: 'server' | 'database', pid: number): Promise<number> {
  for (let attempt = 0; attempt < 50 && product.run[victim].pid === pid; attempt++) {
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  return product.run[victim].pid;
}

describe.each(['server', 'database'] as const)('a killed %s', (victim) => {
  it('loses nothing that was acknowledged, and comes back by itself', async () => {
    const client = new TestClient(product.address);
    const person = product.signIn('Layout engineer');
    await client.signIn(person.email, person.password);
    const board = (await client.post('/api/boards', { name: `Through a killed ${victim}` })).body;
    const made = (
      await client.post(`/api/revisions/${board.revisions[0].id}/channels`, { document: channelDocument() })
    ).body;
    const pid = product.run[victim].pid;
    const last = await saveThrough(client, made.id, 1, () => process.kill(pid, 'SIGKILL'));
    expect(await changedPid(victim, pid)).not.toBe(pid);
    const stored = (await client.get(`/api/channels/${made.id}`)).body;
    expect(stored.version).toBe(last);
    expect(stored.name).toBe(`Saved ${last}`);
    expect(stored.check.verdict).toBe('holds');
  }, 120_000);
});
