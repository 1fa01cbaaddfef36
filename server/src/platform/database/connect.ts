import { Sequelize } from 'sequelize';
import type { DatabaseAccess } from '../config/config';
import { mariadbModule } from './mariadb-module';

/** Opens the pool. Times are UTC with milliseconds, names in the tables are snake_case, and no model makes its own times. */
export function connectDatabase(access: DatabaseAccess, poolSize: number): Sequelize {
  return new Sequelize(access.database, access.user, access.password, {
    dialect: 'mariadb',
    dialectModule: mariadbModule,
    host: access.host,
    port: access.port,
    timezone: '+00:00',
    logging: false,
    pool: { max: poolSize, min: 0, idle: 10_000, acquire: 5_000 },
    define: { underscored: true, timestamps: false, freezeTableName: true },
    dialectOptions: {
      connectTimeout: 2_000,
      bigIntAsNumber: true,
      insertIdAsNumber: true,
      allowPublicKeyRetrieval: true,
    },
    retry: { max: 1 },
  });
}

/** Whether an error means the database is away rather than that the statement was wrong. */
export function isDatabaseAway(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  if (/^SequelizeConnection|^SequelizeHostNotFound|^SequelizeAccessDenied/.test(error.name)) return true;
  const codes = [
    error,
    (error as { parent?: unknown }).parent,
    (error as { original?: unknown }).original,
  ].map((each) => (each as { code?: string } | undefined)?.code ?? '');
  return codes.some((code) =>
    /ECONNREFUSED|ECONNRESET|EPIPE|ER_SOCKET|ER_CONNECTION|PROTOCOL_CONNECTION_LOST|ER_GET_CONNECTION_TIMEOUT|ER_SERVER_SHUTDOWN/.test(
      code,
    ),
  );
}
