import { QueryTypes, type Sequelize } from 'sequelize';
import type { AuditEvent } from '@tollgate/contracts';

interface Row {
  seq: number;
  at: Date;
  name: string | null;
  what: string;
  subject: string;
  body: string;
}

export interface EventFilter {
  readonly before?: number;
  readonly take: number;
  readonly what?: string;
  readonly who?: string;
}

export function createEventsRepository(sequelize: Sequelize) {
  return {
    /** Latest first. */
    async list(filter: EventFilter): Promise<AuditEvent[]> {
      const rows = await sequelize.query<Row>(
        `SELECT e.seq, e.at, p.name, e.what, e.subject, e.body FROM events e LEFT JOIN people p ON p.id = e.person_id
         WHERE (:before IS NULL OR e.seq < :before) AND (:what IS NULL OR e.what LIKE :what) AND (:who IS NULL OR e.person_id = :who)
         ORDER BY e.seq DESC LIMIT :take`,
        {
          replacements: {
            before: filter.before ?? null,
            what: filter.what ? `${filter.what.replace(/[%_\\]/g, '\\$&')}%` : null,
            who: filter.who ?? null,
            take: filter.take,
          },
          type: QueryTypes.SELECT,
        },
      );
      return rows.map((row) => ({
        seq: Number(row.seq),
        at: new Date(row.at).toISOString(),
        who: row.name,
        what: row.what,
        subject: row.subject,
        detail: (JSON.parse(row.body) as { detail: string }).detail,
      }));
    },
  };
}
