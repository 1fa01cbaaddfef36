import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import express, { type Express, type RequestHandler } from 'express';
import type { Sequelize } from 'sequelize';
import { migrations } from '../migrations';
import { createFeatures, type Features } from './features';
import type { Clock } from './platform/clock';
import type { Config } from './platform/config/config';
import { connectDatabase, isDatabaseAway, migrateUp } from './platform/database';
import {
  createSessionStore,
  errorHandler,
  forgeryCheck,
  hostCheck,
  mountRoutes,
  securityHeaders,
  serveClient,
  sessionLifetime,
  sessionMiddleware,
  unknownRoute,
} from './platform/http';
import { errorFacts, log } from './platform/log';

export interface TollgateServer {
  readonly app: Express;
  readonly sequelize: Sequelize;
  readonly features: Features;
  /** Migrates, seeds what every installation has, and listens. */
  start(): Promise<{ port: number }>;
  stop(): Promise<void>;
}

/** The whole server from its settings and its clock; nothing runs before `start`. */
export function buildServer(config: Config, clock: Clock): TollgateServer {
  const sequelize = connectDatabase(config.database, config.poolSize);
  const features = createFeatures(config, clock, sequelize);
  const app = express();
  let listener: Server | undefined;
  const boundPort = () => (listener?.address() as AddressInfo | null)?.port ?? config.port;

  app.disable('x-powered-by');
  app.set('query parser', 'simple');
  app.use(securityHeaders(config), hostCheck(config, boundPort));
  app.use('/api', (_request, response, next) => {
    response.setHeader('Cache-Control', 'no-store');
    next();
  });
  const sessions = express
    .Router()
    .use(
      sessionMiddleware(config, createSessionStore(sequelize)),
      sessionLifetime(clock),
      features.passport.initialize() as RequestHandler,
      features.passport.session() as RequestHandler,
      forgeryCheck,
    );
  // Health and descriptions answer without a session, so that they answer without the database too.
  app.use('/api', (request, response, next) => {
    const apart = ['/health', '/openapi.json', '/schemas/channel.json'].includes(request.path);
    if (apart) next();
    else sessions(request, response, next);
  });
  mountRoutes(app, features.routes, { isMember: features.isMember, demonstration: config.demonstration });
  app.use('/api', unknownRoute);
  if (config.webDirectory) serveClient(app, config.webDirectory);
  app.use(unknownRoute, errorHandler);

  return {
    app,
    sequelize,
    features,
    async start() {
      await features.prepare();
      await whenDatabaseAnswers(() => migrateUp(sequelize, migrations));
      await features.seed();
      listener = await listen(app, config);
      features.begin();
      return { port: boundPort() };
    },
    async stop() {
      const closed = new Promise<void>((resolve) => (listener ? listener.close(() => resolve()) : resolve()));
      listener?.closeIdleConnections();
      // Event streams never end by themselves; whatever else is under way gets a moment.
      const last = setTimeout(() => listener?.closeAllConnections(), 500);
      await closed;
      clearTimeout(last);
      await features.end();
      await sequelize.close();
    },
  };
}

function listen(app: Express, config: Config): Promise<Server> {
  return new Promise((resolve, reject) => {
    const server = app.listen(config.port, config.host, (error?: Error) =>
      error ? reject(error) : resolve(server),
    );
  });
}

/** Waits for a database that is still starting or restarting; any other error is one. */
async function whenDatabaseAnswers<Result>(act: () => Promise<Result>): Promise<Result> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await act();
    } catch (error) {
      if (attempt >= 60 || !isDatabaseAway(error)) throw error;
      log('warning', 'waiting for the database', { attempt, ...errorFacts(error), stack: undefined });
      await new Promise((resolve) => setTimeout(resolve, 500));
    }
  }
}
