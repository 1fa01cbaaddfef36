import { randomUUID } from 'node:crypto';
import { Op, QueryTypes, type Sequelize } from 'sequelize';
import type { Clock } from '../clock';
import { isDatabaseAway } from '../database';
import { errorFacts, log } from '../log';
import { defineWorkModels, type JobRow } from '../work';

/** Does one job; throwing means it is tried again later. Must be safe to run twice. */
export type JobHandler = (payload: unknown) => Promise<void>;

const leaseMs = 60_000;
const mostAttempts = 12;

/**
 * Runs queued jobs, one at a time a node. A job is claimed by a locked read that skips what others hold (Sequelize 6 drops
 * `skipLocked` on MariaDB, hence raw SQL) and leased, so that a killed node's jobs come back.
 */
export class JobRunner {
  private timer: NodeJS.Timeout | undefined;
  private stopped = false;
  private busy: Promise<void> = Promise.resolve();
  private readonly jobs;

  constructor(
    private readonly sequelize: Sequelize,
    private readonly clock: Clock,
    private readonly handlers: ReadonlyMap<string, JobHandler>,
    private readonly pollMs = 1000,
  ) {
    this.jobs = defineWorkModels(sequelize).jobs;
  }

  start(): void {
    this.stopped = false;
    this.schedule(0);
  }

  /** Looks for work now: called after each commit. */
  wake(): void {
    if (this.timer) this.schedule(0);
  }

  async stop(): Promise<void> {
    this.stopped = true;
    clearTimeout(this.timer);
    this.timer = undefined;
    await this.busy;
  }

  /** Runs all that is due; what tests and the poll call. */
  async drain(): Promise<number> {
    for (let done = 0; ; done++) {
      const job = this.stopped && this.timer === undefined && done > 0 ? undefined : await this.claim();
      if (!job) return done;
      await this.run(job);
    }
  }

  private schedule(delayMs: number): void {
    clearTimeout(this.timer);
    this.timer = setTimeout(() => {
      this.busy = this.drain()
        .then(() => undefined)
        .catch((error: unknown) => {
          if (!isDatabaseAway(error)) log('error', 'jobs', errorFacts(error));
        })
        .finally(() => {
          if (!this.stopped) this.schedule(this.pollMs);
        });
    }, delayMs);
    this.timer.unref();
  }

  private async claim(): Promise<JobRow | undefined> {
    const now = this.clock.now();
    return this.sequelize.transaction(async (transaction) => {
      const [row] = await this.sequelize.query<{ id: string }>(
        `SELECT id FROM jobs WHERE (state = 'waiting' AND run_after <= :now) OR (state = 'running' AND lease_until < :now)
         ORDER BY run_after LIMIT 1 FOR UPDATE SKIP LOCKED`,
        { replacements: { now }, type: QueryTypes.SELECT, transaction },
      );
      if (!row) return undefined;
      const leaseUntil = new Date(now.getTime() + leaseMs);
      await this.jobs.update({ state: 'running', leaseUntil }, { where: { id: row.id }, transaction });
      const job = await this.jobs.findByPk(row.id, { transaction });
      return job?.get();
    });
  }

  private async run(job: JobRow): Promise<void> {
    const handler = this.handlers.get(job.kind);
    try {
      if (!handler) throw new Error(`No handler for jobs of kind ${job.kind}.`);
      await handler(JSON.parse(job.payload));
      // A finished job gives its key free, so that the next of its kind can be queued.
      await this.jobs.update({ state: 'done', leaseUntil: null, dedupeKey: null }, { where: { id: job.id } });
    } catch (error) {
      await this.putBack(job, error);
    }
  }

  private async putBack(job: JobRow, error: unknown): Promise<void> {
    if (isDatabaseAway(error)) return;
    const attempts = job.attempts + 1;
    const waitMs = Math.min(2 ** attempts * 1000, 3_600_000);
    const failed = attempts >= mostAttempts;
    log('warning', 'job failed', { kind: job.kind, id: job.id, attempts, ...errorFacts(error) });
    await this.jobs.update(
      {
        attempts,
        state: failed ? 'failed' : 'waiting',
        runAfter: new Date(this.clock.now().getTime() + waitMs),
        leaseUntil: null,
        dedupeKey: failed ? null : job.dedupeKey,
        lastError: error instanceof Error ? error.message : String(error),
      },
      { where: { id: job.id } },
    );
  }

  /** Queues a job outside a unit of work: for what the start and timers ask for. */
  async queue(kind: string, payload: unknown, dedupeKey: string, runAfter: Date): Promise<void> {
    await this.jobs.bulkCreate(
      [
        {
          id: randomUUID(),
          kind,
          payload: JSON.stringify(payload),
          state: 'waiting',
          attempts: 0,
          runAfter,
          dedupeKey,
          createdAt: this.clock.now(),
        },
      ],
      { ignoreDuplicates: true },
    );
  }

  /** Forgets finished jobs of before. */
  async sweep(before: Date): Promise<void> {
    await this.jobs.destroy({ where: { state: 'done', createdAt: { [Op.lt]: before } } });
  }
}
