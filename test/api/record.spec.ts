import { QueryTypes } from 'sequelize';
import { migrations } from '../../server/migrations';
import { systemClock } from '../../server/src/platform/clock';
import { connectDatabase, migrateDown, migrateUp } from '../../server/src/platform/database';
import { createUnitOfWork, theProduct, verifyChain } from '../../server/src/platform/work';
import { createDatabase } from '../support/database';
import { TestServer } from '../support/server';

describe('the schema', () => {
  it('goes up, down and up again', async () => {
    const database = await createDatabase();
    const sequelize = connectDatabase(database.access, 3);
    const up = await migrateUp(sequelize, migrations);
    expect(up.length).toBe(migrations.length);
    expect((await migrateDown(sequelize, migrations)).length).toBe(migrations.length);
    const left = await sequelize.query<{ name: string }>(
      'SELECT table_name AS name FROM information_schema.tables WHERE table_schema = DATABASE()',
      {
        type: QueryTypes.SELECT,
      },
    );
    expect(left.map((row) => row.name)).toEqual(['migrations']);
    expect((await migrateUp(sequelize, migrations)).length).toBe(migrations.length);
    expect(await migrateUp(sequelize, migrations)).toEqual([]);
    await sequelize.close();
    await database.drop();
  }, 60_000);
});

describe('a unit of work', () => {
  let server: TestServer;
  beforeAll(async () => {
    server = await TestServer.start({ TOLLGATE_DB_POOL: '4' });
  }, 60_000);
  afterAll(() => server.stop());

  it('leaves nothing when it throws', async () => {
    const before = await verifyChain(server.server.sequelize);
    await expect(
      server.server.features.unitOfWork(theProduct, (work) => {
        work.event({ what: 'test.lost', subject: 'x' });
        work.job({ kind: 'sweep', payload: {} });
        return Promise.reject(new Error('changed my mind'));
      }),
    ).rejects.toThrow('changed my mind');
    expect((await verifyChain(server.server.sequelize)).head).toEqual(before.head);
  });

  it('chains the events of many at once into one unbroken row', async () => {
    const before = await verifyChain(server.server.sequelize);
    await Promise.all(
      Array.from({ length: 12 }, (_unused, i) =>
        server.server.features.unitOfWork(theProduct, (work) => {
          work.event({ what: 'test.noted', subject: String(i) });
          return Promise.resolve();
        }),
      ),
    );
    const after = await verifyChain(server.server.sequelize);
    expect(after.sound).toBe(true);
    expect(after.events).toBe(before.events + 12);
  });

  it('queues a job of one key once', async () => {
    for (let i = 0; i < 2; i++) {
      await server.server.features.unitOfWork(theProduct, (work) => {
        work.job({
          kind: 'close-draft',
          payload: { channelId: 'none', personId: 'none' },
          dedupeKey: 'one',
          runAfter: new Date(Date.now() + 3_600_000),
        });
        return Promise.resolve();
      });
    }
    const [row] = await server.server.sequelize.query<{ n: number }>(
      "SELECT COUNT(*) AS n FROM jobs WHERE dedupe_key = 'one'",
      { type: QueryTypes.SELECT },
    );
    expect(Number(row!.n)).toBe(1);
  });

  it('cannot be undone behind the chain: events refuse change and removal', async () => {
    await expect(
      server.server.sequelize.query("UPDATE events SET what = 'nothing' WHERE seq = 1"),
    ).rejects.toThrow('never changed');
    await expect(server.server.sequelize.query('DELETE FROM events')).rejects.toThrow('never changed');
  });

  it('that was tampered with past the triggers is found and named', async () => {
    const { sequelize } = server.server;
    await sequelize.query('DROP TRIGGER events_refuse_update');
    await sequelize.query(
      "UPDATE events SET body = REPLACE(body, 'test.noted', 'test.other') WHERE what = 'test.noted' ORDER BY seq LIMIT 1",
    );
    const verdict = await verifyChain(sequelize);
    expect(verdict.sound).toBe(false);
    expect(verdict.fault!.reason).toContain('altered');
  });
});

describe('writes on a pool of one connection', () => {
  it('finish: none of them steps outside its transaction', async () => {
    const database = await createDatabase();
    const wide = connectDatabase(database.access, 3);
    await migrateUp(wide, migrations);
    await wide.close();
    const sequelize = connectDatabase(database.access, 1);
    const unitOfWork = createUnitOfWork(sequelize, systemClock);
    await unitOfWork(theProduct, (work) => {
      work.event({ what: 'test.noted', subject: 'x' });
      work.mail({ to: 'a@people.example', subject: 's', text: 't', html: 'h' });
      work.job({ kind: 'sweep', payload: {} });
      work.change({ what: 'test.noted' });
      return Promise.resolve();
    });
    expect((await verifyChain(sequelize)).events).toBe(1);
    await sequelize.close();
    await database.drop();
  }, 60_000);
});
