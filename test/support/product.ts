import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

export interface SignIn {
  readonly role: string;
  readonly name: string;
  readonly email: string;
  readonly password: string;
}

/** The product as `npm start` runs it, in a demonstration of its own. */
export class Product {
  private constructor(
    readonly address: string,
    readonly dataDirectory: string,
    private readonly child: ChildProcess,
    private readonly printed: () => string,
  ) {}

  static async start(env: Record<string, string> = {}): Promise<Product> {
    const dataDirectory = mkdtempSync(join(tmpdir(), 'tg-product-'));
    const port = await freePort();
    const child = spawn(process.execPath, ['tools/start/start.mjs'], {
      env: {
        ...process.env,
        NODE_ENV: 'production',
        PORT: String(port),
        TOLLGATE_DATA: dataDirectory,
        ...env,
      },
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    let text = '';
    child.stdout.on('data', (part: Buffer) => (text += part.toString()));
    child.stderr.on('data', (part: Buffer) => (text += part.toString()));
    const product = new Product(`http://127.0.0.1:${port}`, dataDirectory, child, () => text);
    await product.untilHealthy().catch(async (error: unknown) => {
      await product.stop();
      throw error;
    });
    return product;
  }

  /** What it has printed so far. */
  get output(): string {
    return this.printed();
  }

  signIn(role: string, nth = 0): SignIn {
    const all = JSON.parse(readFileSync(join(this.dataDirectory, 'demo-sign-ins.json'), 'utf8')) as SignIn[];
    return all.filter((each) => each.role === role)[nth]!;
  }

  /** Process ids of what it runs. */
  get run(): { database: { pid: number }; server: { pid: number } } {
    return JSON.parse(readFileSync(join(this.dataDirectory, 'run.json'), 'utf8')) as {
      database: { pid: number };
      server: { pid: number };
    };
  }

  async untilHealthy(): Promise<void> {
    for (let attempt = 0; attempt < 900; attempt++) {
      const up = await fetch(`${this.address}/api/health`).then(
        (reply) => reply.ok,
        () => false,
      );
      if (up) return;
      if (this.child.exitCode !== null) break;
      await new Promise((resolve) => setTimeout(resolve, 200));
    }
    throw new Error(`The product did not come up:\n${this.output}`);
  }

  async stop(): Promise<void> {
    const over = this.child.exitCode !== null || this.child.signalCode !== null;
    const ended = over ? undefined : new Promise((resolve) => this.child.once('exit', resolve));
    this.child.kill('SIGTERM');
    await ended;
    // The database may still be writing its last words.
    rmSync(this.dataDirectory, { recursive: true, force: true, maxRetries: 10, retryDelay: 200 });
  }
}

function freePort(): Promise<number> {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address() as { port: number };
      probe.close(() => resolve(port));
    });
  });
}
