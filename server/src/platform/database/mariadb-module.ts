import * as mariadb from 'mariadb';

/**
 * The driver as Sequelize 6 expects it. Sequelize deletes the `meta` property of result arrays, which driver 3 defines
 * as not deletable; the wrapper hands out results whose `meta` can be deleted.
 */
type Query = (...args: unknown[]) => Promise<unknown>;

function loosened(result: unknown): unknown {
  if (!Array.isArray(result) || !('meta' in result)) return result;
  const copy: unknown[] & { meta?: unknown } = Array.from(result as unknown[]);
  copy.meta = result.meta;
  return copy;
}

function wrap(connection: mariadb.Connection): mariadb.Connection {
  const query = connection.query.bind(connection) as Query;
  (connection as unknown as { query: Query }).query = async (...args) => loosened(await query(...args));
  return connection;
}

export const mariadbModule = {
  ...mariadb,
  createConnection: async (options: mariadb.ConnectionConfig) =>
    wrap(await mariadb.createConnection(options)),
};
