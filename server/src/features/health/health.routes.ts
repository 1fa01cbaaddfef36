import { api } from '@tollgate/contracts';
import type { Sequelize } from 'sequelize';
import type { Config } from '../../platform/config/config';
import { route, type Route } from '../../platform/http';
import { version } from '../../version';

export function healthRoutes(sequelize: Sequelize, config: Config): Route[] {
  return [
    route({
      method: 'get',
      path: '/health',
      action: 'health.read',
      summary: 'Whether server and database answer; 503 without the database',
      reply: api.health,
      handle: async ({ response }) => {
        const up = await sequelize.query('SELECT 1').then(
          () => true,
          () => false,
        );
        if (!up) response.status(503);
        response.json({
          status: up ? 'ok' : 'degraded',
          database: up ? 'up' : 'down',
          version,
          demonstration: config.demonstration,
        });
      },
    }),
  ];
}
