import { randomUUID } from 'node:crypto';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Role } from '@tollgate/contracts';
import { buildServer, type TollgateServer } from '../../server/src/app';
import { SteppingClock } from '../../server/src/platform/clock';
import { readConfig } from '../../server/src/platform/config/config';
import { theProduct } from '../../server/src/platform/work';
import { createPeopleRepository, hashPassword } from '../../server/src/features/people';
import { TestClient } from './client';
import { createDatabase, type TestDatabase } from './database';

export const password = 'a long enough password';

export interface TestPerson {
  readonly id: string;
  readonly email: string;
  readonly name: string;
}

/** A running server on a database and a data directory of its own. */
export class TestServer {
  private constructor(
    readonly server: TollgateServer,
    readonly clock: SteppingClock,
    readonly origin: string,
    readonly dataDirectory: string,
    private readonly database: TestDatabase,
  ) {}

  static async start(env: Record<string, string> = {}): Promise<TestServer> {
    const database = await createDatabase();
    const dataDirectory = await mkdtemp(join(tmpdir(), 'tg-data-'));
    const clock = new SteppingClock(new Date());
    const config = readConfig(
      {
        NODE_ENV: 'test',
        PORT: '0',
        TOLLGATE_DEMO: '0',
        TOLLGATE_WORKERS: '1',
        ...env,
        TOLLGATE_DATA: dataDirectory,
        TOLLGATE_DB: JSON.stringify(database.access),
      },
      2,
    );
    const server = buildServer(config, clock);
    const { port } = await server.start();
    return new TestServer(server, clock, `http://127.0.0.1:${port}`, dataDirectory, database);
  }

  async stop(): Promise<void> {
    await this.server.stop();
    await this.database.drop();
    await rm(this.dataDirectory, { recursive: true, force: true });
  }

  /** A person of these roles, made without the invitation by mail. */
  async makePerson(...roles: Role[]): Promise<TestPerson> {
    const id = randomUUID();
    const email = `${id.slice(0, 8)}@people.example`;
    const name = `Person ${id.slice(0, 4)}`;
    const repository = createPeopleRepository(this.server.sequelize);
    const passwordHash = await hashPassword(password, 12);
    await this.server.features.unitOfWork(theProduct, (work) =>
      repository.insert(work, {
        id,
        email,
        name,
        roles,
        passwordHash,
        active: true,
        createdAt: work.at,
        lastSignInAt: null,
      }),
    );
    return { id, email, name };
  }

  stranger(): TestClient {
    return new TestClient(this.origin);
  }

  async signedIn(...roles: Role[]): Promise<{ client: TestClient; person: TestPerson }> {
    const person = await this.makePerson(...roles);
    const client = this.stranger();
    const reply = await client.signIn(person.email, password);
    if (reply.status !== 200) throw new Error(`Sign-in failed: ${reply.text}`);
    return { client, person };
  }
}
