import { randomUUID } from 'node:crypto';
import type { Sequelize, Transaction } from 'sequelize';
import type { Clock } from '../clock';
import { appendEvents } from './audit-chain';
import type { NewEvent } from './event';
import { defineWorkModels, type ChangeRow, type JobRow, type OutboxRow, type WorkModels } from './models';

/** Who acts: a person, or the product itself (a job, the start). */
export interface Actor {
  readonly personId: string | null;
  readonly name: string;
}

export const theProduct: Actor = { personId: null, name: 'Tollgate' };

export interface NewMail {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

export interface NewJob {
  readonly kind: string;
  readonly payload: unknown;
  readonly runAfter?: Date;
  /** A waiting job of the same key is not queued again. */
  readonly dedupeKey?: string;
}

/** A line for those who look at the board right now; kept for a day, no part of the record. */
export type NewChange = Partial<Pick<ChangeRow, 'boardId' | 'revisionId' | 'channelId' | 'version'>> & {
  what: string;
};

/** What a write needs; without one nothing can be written. */
export interface Work {
  readonly transaction: Transaction;
  readonly actor: Actor;
  readonly at: Date;
  event(event: NewEvent): void;
  mail(mail: NewMail): void;
  job(job: NewJob): void;
  change(change: NewChange): void;
}

export type UnitOfWork = <Result>(actor: Actor, act: (work: Work) => Promise<Result>) => Promise<Result>;

interface Gathered {
  events: NewEvent[];
  mails: NewMail[];
  jobs: NewJob[];
  changes: NewChange[];
}

/**
 * One unit of work: transaction, the writes of `act`, its outbox rows and jobs, then its events, then commit. What the
 * caller is told has been committed; what throws leaves nothing. Deadlocks are tried again, so `act` must hold no
 * outside effects.
 */
export function createUnitOfWork(
  sequelize: Sequelize,
  clock: Clock,
  committed: () => void = () => undefined,
): UnitOfWork {
  const models = defineWorkModels(sequelize);
  return async (actor, act) => {
    for (let attempt = 1; ; attempt++) {
      try {
        const result = await sequelize.transaction(async (transaction) => {
          const at = clock.now();
          const gathered: Gathered = { events: [], mails: [], jobs: [], changes: [] };
          const outcome = await act(workOf(transaction, actor, at, gathered));
          await writeSideRows(models, transaction, actor, at, gathered);
          if (gathered.events.length) {
            await appendEvents(sequelize, models, transaction, at, actor.personId, gathered.events);
          }
          return outcome;
        });
        committed();
        return result;
      } catch (error) {
        if (attempt >= 5 || !isDeadlock(error)) throw error;
      }
    }
  };
}

function workOf(transaction: Transaction, actor: Actor, at: Date, gathered: Gathered): Work {
  return {
    transaction,
    actor,
    at,
    event: (event) => void gathered.events.push(event),
    mail: (mail) => void gathered.mails.push(mail),
    job: (job) => void gathered.jobs.push(job),
    change: (change) => void gathered.changes.push(change),
  };
}

async function writeSideRows(
  models: WorkModels,
  transaction: Transaction,
  actor: Actor,
  at: Date,
  gathered: Gathered,
): Promise<void> {
  const mails = gathered.mails.map((mail) => outboxRow(mail, at));
  const jobs = [
    ...gathered.jobs.map((job) => jobRow(job, at)),
    ...mails.map((mail) => jobRow({ kind: 'mail', payload: { outboxId: mail.id } }, at)),
  ];
  if (mails.length) await models.outbox.bulkCreate(mails, { transaction });
  // UNIQUE(dedupe_key) lets the second of a kind pass without a row.
  if (jobs.length) await models.jobs.bulkCreate(jobs, { transaction, ignoreDuplicates: true });
  if (gathered.changes.length) {
    const rows = gathered.changes.map((change) => ({ at, personId: actor.personId, ...change }));
    await models.changes.bulkCreate(rows, { transaction });
  }
}

function outboxRow(mail: NewMail, at: Date): OutboxRow {
  const id = randomUUID();
  return {
    id,
    recipient: mail.to,
    subject: mail.subject,
    textBody: mail.text,
    htmlBody: mail.html,
    messageId: `<${id}@tollgate.invalid>`,
    state: 'waiting',
    attempts: 0,
    lastError: null,
    createdAt: at,
    sentAt: null,
  };
}

function jobRow(job: NewJob, at: Date): JobRow {
  return {
    id: randomUUID(),
    kind: job.kind,
    payload: JSON.stringify(job.payload),
    state: 'waiting',
    attempts: 0,
    runAfter: job.runAfter ?? at,
    leaseUntil: null,
    dedupeKey: job.dedupeKey ?? null,
    lastError: null,
    createdAt: at,
  };
}

function isDeadlock(error: unknown): boolean {
  const code = (error as { parent?: { code?: string } } | undefined)?.parent?.code ?? '';
  return code === 'ER_LOCK_DEADLOCK' || code === 'ER_LOCK_WAIT_TIMEOUT';
}
