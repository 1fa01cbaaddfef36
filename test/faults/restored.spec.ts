import { execFile } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { TestClient } from '../support/client';
import { channelDocument } from '../support/fixtures';
import { Product } from '../support/product';

const folder = mkdtempSync(join(tmpdir(), 'tg-backup-'));
const archive = join(folder, 'record.tgz');
const restored = join(folder, 'restored');
let product: Product;
let channelId: string;

/** Runs one of the two commands; what it printed, and whether it went well. */
async function command(name: 'backup' | 'restore', dataDirectory: string, file: string) {
  const env = { ...process.env, NODE_ENV: 'production', TOLLGATE_DATA: dataDirectory };
  return promisify(execFile)(process.execPath, [`tools/backup/${name}.mjs`, file], { env }).then(
    ({ stdout }) => ({ ok: true, text: stdout }),
    (error: { stdout: string; stderr: string }) => ({ ok: false, text: error.stdout + error.stderr }),
  );
}

async function engineerAt(address: string): Promise<TestClient> {
  const { email, password } = product.signIn('Layout engineer');
  const client = new TestClient(address);
  await client.signIn(email, password);
  return client;
}

beforeAll(async () => {
  product = await Product.start();
  const client = await engineerAt(product.address);
  const board = (await client.post('/api/boards', { name: 'Kept in a backup' })).body;
  const document = channelDocument({ name: 'Ω ≤ 漢字' });
  const made = await client.post(`/api/revisions/${board.revisions[0].id}/channels`, { document });
  channelId = made.body.id as string;
}, 300_000);

afterAll(async () => {
  await product.stop();
  rmSync(folder, { recursive: true, force: true });
});

describe('a backup', () => {
  it('is made beside a running product and comes back whole, its audit chain sound', async () => {
    const before = (await (await engineerAt(product.address)).get(`/api/channels/${channelId}`)).body;
    expect(await command('backup', product.dataDirectory, archive)).toMatchObject({ ok: true });
    const back = await command('restore', restored, archive);
    expect(back.text).toContain('The audit chain is sound');
    const second = await Product.start({ TOLLGATE_DATA: restored });
    try {
      const after = (await (await engineerAt(second.address)).get(`/api/channels/${channelId}`)).body;
      expect(after).toEqual(before);
    } finally {
      await second.stop();
    }
  }, 180_000);

  it('is refused where one byte differs, and leaves no data directory behind', async () => {
    const bytes = readFileSync(archive);
    const middle = bytes.length >> 1;
    bytes[middle] = bytes[middle]! ^ 1;
    const altered = join(folder, 'altered.tgz');
    writeFileSync(altered, bytes);
    const reply = await command('restore', join(folder, 'fresh'), altered);
    expect(reply.ok).toBe(false);
    expect(reply.text).toContain('is not a whole backup');
    expect(() => readFileSync(join(folder, 'fresh', 'mode'))).toThrow('ENOENT');
  }, 60_000);

  it('goes into an empty data directory only', async () => {
    const reply = await command('restore', product.dataDirectory, archive);
    expect(reply).toMatchObject({ ok: false, text: expect.stringContaining('is not empty') as string });
  }, 60_000);
});
