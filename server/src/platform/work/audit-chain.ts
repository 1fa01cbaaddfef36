import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import type { NewEvent } from './event';
import type { EventRow, WorkModels } from './models';

/** Hash before the first event. */
export const genesisHash = '0'.repeat(64);

interface Head {
  seq: number;
  hash: string;
}

/** The bytes of an event that are hashed and stored: RFC 8785 JSON. */
function eventBody(
  seq: number,
  previousHash: string,
  at: Date,
  personId: string | null,
  event: NewEvent,
): string {
  return canonicalize({
    seq,
    previousHash,
    at: at.toISOString(),
    who: personId,
    what: event.what,
    subject: event.subject,
    from: event.from ?? null,
    to: event.to ?? null,
    detail: event.detail ?? '',
  })!;
}

function hashOf(body: string): string {
  return createHash('sha256').update(body, 'utf8').digest('hex');
}

/**
 * Appends events to the chain: the last step of a unit of work, because the head row stays locked until its commit.
 */
export async function appendEvents(
  sequelize: Sequelize,
  models: WorkModels,
  transaction: Transaction,
  at: Date,
  personId: string | null,
  events: readonly NewEvent[],
): Promise<void> {
  const [head] = await sequelize.query<Head>('SELECT seq, hash FROM audit_head WHERE id = 1 FOR UPDATE', {
    type: QueryTypes.SELECT,
    transaction,
  });
  if (!head) throw new Error('The audit head is missing: the migrations have not run.');
  let { seq, hash } = { seq: Number(head.seq), hash: head.hash };
  const rows = events.map((event): EventRow => {
    seq += 1;
    const body = eventBody(seq, hash, at, personId, event);
    const row = {
      seq,
      at,
      personId,
      what: event.what,
      subject: event.subject,
      boardId: event.boardId ?? null,
      body,
      previousHash: hash,
      hash: hashOf(body),
    };
    hash = row.hash;
    return row;
  });
  await models.events.bulkCreate(rows, { transaction });
  await sequelize.query('UPDATE audit_head SET seq = :seq, hash = :hash WHERE id = 1', {
    replacements: { seq, hash },
    transaction,
  });
}

export interface ChainVerdict {
  readonly sound: boolean;
  readonly events: number;
  readonly head: Head;
  /** The first row that does not fit, and why. */
  readonly fault?: { readonly seq: number; readonly reason: string };
}

/** Walks the whole chain: every hash from its stored bytes, every link to the one before, and the head. */
export async function verifyChain(sequelize: Sequelize): Promise<ChainVerdict> {
  let last: Head = { seq: 0, hash: genesisHash };
  for (;;) {
    const rows = await sequelize.query<{ seq: number; body: string; previous_hash: string; hash: string }>(
      'SELECT seq, body, previous_hash, hash FROM events WHERE seq > :after ORDER BY seq LIMIT 1000',
      { replacements: { after: last.seq }, type: QueryTypes.SELECT },
    );
    if (rows.length === 0) break;
    for (const row of rows) {
      const reason = faultOf({ ...row, seq: Number(row.seq) }, last);
      if (reason)
        return { sound: false, events: last.seq, head: last, fault: { seq: Number(row.seq), reason } };
      last = { seq: Number(row.seq), hash: row.hash };
    }
  }
  const [head] = await sequelize.query<Head>('SELECT seq, hash FROM audit_head WHERE id = 1', {
    type: QueryTypes.SELECT,
  });
  if (!head || Number(head.seq) !== last.seq || head.hash !== last.hash) {
    return {
      sound: false,
      events: last.seq,
      head: last,
      fault: { seq: last.seq + 1, reason: 'the head names an event that is not there' },
    };
  }
  return { sound: true, events: last.seq, head: last };
}

function faultOf(
  row: { seq: number; body: string; previous_hash: string; hash: string },
  last: Head,
): string | undefined {
  if (row.seq !== last.seq + 1) return `event ${last.seq + 1} is missing`;
  if (row.previous_hash !== last.hash) return 'it does not follow from the event before it';
  if (hashOf(row.body) !== row.hash) return 'its content was altered after it was written';
  return undefined;
}
