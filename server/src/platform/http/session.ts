import { randomBytes } from 'node:crypto';
import connectSequelize from 'connect-session-sequelize';
import session, { type SessionData, type Store } from 'express-session';
import type { NextFunction, Request, RequestHandler, Response } from 'express';
import { DataTypes, Op, type Sequelize, type Transaction } from 'sequelize';
import type { Clock } from '../clock';
import type { Config } from '../config/config';

declare module 'express-session' {
  interface SessionData {
    csrfToken: string;
    /** When the person signed in: 7 days at most, however busy. */
    signedInAt: number;
    passport: { user: string };
  }
}

const idleMs = 12 * 3600 * 1000;
const longestMs = 7 * 24 * 3600 * 1000;

/** Sessions live in MariaDB, with the person in a column so that a person's other sessions can be ended. */
export function createSessionStore(sequelize: Sequelize): Store {
  sequelize.define('sessions', {
    sid: { type: DataTypes.STRING(64), primaryKey: true },
    expires: DataTypes.DATE(3),
    data: DataTypes.TEXT('long'),
    personId: DataTypes.CHAR(36),
  });
  const SequelizeStore = connectSequelize(session.Store);
  return new SequelizeStore({
    db: sequelize,
    table: 'sessions',
    expiration: idleMs,
    checkExpirationInterval: -1,
    extendDefaultFields: (defaults, data: SessionData) => ({
      ...defaults,
      personId: data.passport?.user ?? null,
    }),
  });
}

export function sessionMiddleware(config: Config, store: Store): RequestHandler {
  return session({
    name: config.cookieName,
    secret: config.sessionSecret,
    store,
    resave: false,
    saveUninitialized: false,
    rolling: true,
    cookie: { httpOnly: true, sameSite: 'lax', secure: config.url.startsWith('https:'), maxAge: idleMs },
  });
}

/** Ends a session that has reached its longest life. */
export function sessionLifetime(clock: Clock) {
  return (request: Request, _response: Response, next: NextFunction): void => {
    const since = request.session.signedInAt;
    if (since === undefined || clock.now().getTime() - since < longestMs) return next();
    request.session.regenerate(next);
  };
}

/** The session's synchroniser token, made when it is first asked for. */
export function csrfTokenOf(request: Request): string {
  request.session.csrfToken ??= randomBytes(24).toString('base64url');
  return request.session.csrfToken;
}

/** Ends a person's sessions, all but one where it is named. */
export async function endSessions(
  sequelize: Sequelize,
  personId: string,
  transaction: Transaction,
  except?: string,
): Promise<void> {
  await sequelize.models['sessions']!.destroy({
    where: { personId, ...(except ? { sid: { [Op.ne]: except } } : {}) },
    transaction,
  });
}

/** Removes sessions that have run out; by the machine's clock, which is the one their cookies go by. */
export async function sweepSessions(sequelize: Sequelize): Promise<void> {
  await sequelize.models['sessions']!.destroy({ where: { expires: { [Op.lt]: new Date() } } });
}
