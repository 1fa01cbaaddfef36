import type { Response } from 'express';
import { api, type StreamEvent } from '@tollgate/contracts';
import { Op, type Sequelize } from 'sequelize';
import { isDatabaseAway } from '../../platform/database';
import { route, type Route } from '../../platform/http';
import { errorFacts, log } from '../../platform/log';
import { defineWorkModels, type ChangeRow } from '../../platform/work';

const pollMs = 1000;
const heartbeatMs = 15_000;
/** Sequence numbers are given before the commit: a lower one may appear after a higher; so many are looked at again. */
const overlap = 100;

type Listener = (change: ChangeRow & { seq: number }) => void;

/** Reads the feed once a second for all listeners of this node; nothing is shared between nodes but the database. */
export class ChangeFeed {
  private readonly listeners = new Set<Listener>();
  private readonly seen = new Set<number>();
  private last = -1;
  private timer: NodeJS.Timeout | undefined;

  constructor(private readonly sequelize: Sequelize) {}

  /** @param since where the listener stands: what comes later is told, possibly twice */
  listen(listener: Listener, since: number): () => void {
    this.listeners.add(listener);
    if (this.last < 0) this.last = since;
    this.timer ??= setInterval(() => void this.poll(), pollMs).unref();
    return () => {
      this.listeners.delete(listener);
      if (this.listeners.size === 0) this.stop();
    };
  }

  async since(seq: number): Promise<(ChangeRow & { seq: number })[]> {
    const { changes } = defineWorkModels(this.sequelize);
    const rows = await changes.findAll({
      where: { seq: { [Op.gt]: seq } },
      order: [['seq', 'ASC']],
      limit: 1000,
    });
    return rows.map((row) => ({ ...row.get(), seq: Number(row.get().seq) }));
  }

  async latest(): Promise<number> {
    const { changes } = defineWorkModels(this.sequelize);
    return Number((await changes.max('seq')) ?? 0);
  }

  /** Forgets what is older; nobody who looks on now needs it. */
  async sweep(before: Date): Promise<void> {
    const { changes } = defineWorkModels(this.sequelize);
    await changes.destroy({ where: { at: { [Op.lt]: before } } });
  }

  stop(): void {
    clearInterval(this.timer);
    this.timer = undefined;
    this.last = -1;
    this.seen.clear();
  }

  private async poll(): Promise<void> {
    try {
      const rows = await this.since(Math.max(0, this.last - overlap));
      const fresh = rows.filter((row) => !this.seen.has(row.seq));
      for (const row of fresh) this.seen.add(row.seq);
      for (const seq of this.seen) if (seq < this.last - overlap) this.seen.delete(seq);
      this.last = Math.max(this.last, ...rows.map((row) => row.seq));
      for (const row of fresh) for (const listener of this.listeners) listener(row);
    } catch (error) {
      // The database is away: listeners stay, and hear what they missed when it is back.
      if (!isDatabaseAway(error)) log('error', 'change feed', errorFacts(error));
    }
  }
}

export function streamRoutes(
  feed: ChangeFeed,
  isMember: (personId: string, boardId: string) => Promise<boolean>,
): Route[] {
  return [
    route({
      method: 'get',
      path: '/stream',
      action: 'stream.read',
      summary: "Server-sent events: what changed on the person's boards",
      query: api.streamQuery,
      reply: 'text/event-stream',
      handle: async ({ caller, query, request, response }) => {
        const since = Number(request.headers['last-event-id'] ?? query.since ?? NaN);
        await serve(response, feed, Number.isInteger(since) ? since : await feed.latest(), (boardId) =>
          isMember(caller.id, boardId),
        );
      },
    }),
  ];
}

async function serve(
  response: Response,
  feed: ChangeFeed,
  since: number,
  mayHear: (boardId: string) => Promise<boolean>,
): Promise<void> {
  response.writeHead(200, {
    'Content-Type': 'text/event-stream',
    'Cache-Control': 'no-store',
    'X-Accel-Buffering': 'no',
  });
  response.write(`retry: 2000\nid: ${since}\nevent: start\ndata: {}\n\n`);
  let chain = Promise.resolve();
  const told = new Set<number>();
  const tell: Listener = (change) => {
    if (change.seq <= since || told.has(change.seq)) return;
    told.add(change.seq);
    chain = chain
      .then(async () => {
        if (change.boardId && !(await mayHear(change.boardId))) return;
        response.write(`id: ${change.seq}\ndata: ${JSON.stringify(present(change))}\n\n`);
      })
      .catch((error: unknown) => log('warning', 'stream', errorFacts(error)));
  };
  const stopListening = feed.listen(tell, since);
  const heartbeat = setInterval(() => response.write(': here\n\n'), heartbeatMs);
  response.on('close', () => {
    stopListening();
    clearInterval(heartbeat);
  });
  for (const change of await feed.since(since)) tell(change);
}

function present(change: ChangeRow & { seq: number }): StreamEvent {
  return {
    seq: change.seq,
    what: change.what,
    boardId: change.boardId,
    revisionId: change.revisionId,
    channelId: change.channelId,
    version: change.version,
    who: change.personId,
  };
}
