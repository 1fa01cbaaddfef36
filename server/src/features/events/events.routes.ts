import { api } from '@tollgate/contracts';
import type { Sequelize } from 'sequelize';
import { route, type Route } from '../../platform/http';
import { defineWorkModels } from '../../platform/work';
import { createEventsRepository } from './events.repository';

export function eventsRoutes(sequelize: Sequelize): Route[] {
  const repository = createEventsRepository(sequelize);
  const { outbox } = defineWorkModels(sequelize);
  return [
    route({
      method: 'get',
      path: '/events',
      action: 'events.list',
      summary: 'The audit trail, latest first',
      query: api.eventQuery,
      reply: api.auditEvents,
      handle: async ({ query }) => {
        const items = await repository.list(query);
        return { items, nextBefore: items.length === query.take ? items[items.length - 1]!.seq : null };
      },
    }),
    route({
      method: 'get',
      path: '/outbox',
      action: 'outbox.list',
      summary: 'Mail that waits, and the latest that went',
      reply: api.outbox,
      handle: async () => {
        const rows = await outbox.findAll({ order: [['createdAt', 'DESC']], limit: 100 });
        return {
          items: rows
            .map((row) => row.get())
            .map(({ id, recipient, subject, state, attempts, lastError, createdAt, sentAt }) => ({
              id,
              to: recipient,
              subject,
              state,
              attempts,
              lastError,
              createdAt: createdAt.toISOString(),
              sentAt: sentAt?.toISOString() ?? null,
            })),
        };
      },
    }),
  ];
}
