import type { Request, Response } from 'express';
import { api, roleAllows, type Role } from '@tollgate/contracts';
import type { Clock } from '../../platform/clock';
import type { Config } from '../../platform/config/config';
import { csrfTokenOf, problems, route, type Caller, type Route } from '../../platform/http';
import type { PeopleService } from '../people';
import type { createPassport } from './passport';
import type { Throttle } from './throttle';

interface Needs {
  readonly config: Config;
  readonly clock: Clock;
  readonly people: PeopleService;
  readonly passport: ReturnType<typeof createPassport>;
  readonly throttle: Throttle;
}

export function sessionRoutes({ config, clock, people, passport, throttle }: Needs): Route[] {
  async function present(request: Request, caller: Caller | undefined) {
    const roles: readonly Role[] = caller?.roles ?? [];
    return {
      csrfToken: csrfTokenOf(request),
      person: caller ? { id: caller.id, name: caller.name, email: caller.email, roles: [...roles] } : null,
      demonstration: config.demonstration,
      unclaimed: caller ? false : await people.isUnclaimed(),
      can: {
        createBoards: caller !== undefined && roleAllows('boards.create', roles),
        managePeople: caller !== undefined && roleAllows('people.change', roles),
      },
    };
  }

  /** passport renews the session at sign-in; what was known of the stranger's is gone. */
  function signIn(request: Request, response: Response): Promise<Caller> {
    return new Promise((resolve, reject) => {
      const answered = (error: unknown, person: Caller | false | undefined) => {
        if (error) return reject(asError(error));
        if (!person) return reject(problems.wrongCredentials());
        request.logIn(person, (failure: unknown) => (failure ? reject(asError(failure)) : resolve(person)));
      };
      (
        passport.authenticate('local', answered) as (
          request: Request,
          response: Response,
          next: (error?: unknown) => void,
        ) => void
      )(request, response, (error) => reject(asError(error)));
    });
  }

  return [
    route({
      method: 'get',
      path: '/session',
      action: 'session.read',
      summary: 'Who is signed in, and the token that unsafe requests carry',
      reply: api.session,
      handle: ({ request, caller }) => present(request, caller),
    }),
    route({
      method: 'post',
      path: '/session',
      action: 'session.sign-in',
      summary: 'Sign in',
      body: api.signIn,
      reply: api.session,
      handle: async ({ request, response }) => {
        const caller = await signIn(request, response);
        request.session.signedInAt = clock.now().getTime();
        const person = await people.byId(caller.id);
        if (person) await people.recordSignIn(person);
        return present(request, caller);
      },
    }),
    route({
      method: 'delete',
      path: '/session',
      action: 'session.sign-out',
      summary: 'Sign out',
      handle: ({ request, response }) =>
        new Promise<void>((resolve, reject) => {
          request.session.destroy((error: unknown) => (error ? reject(asError(error)) : resolve()));
          response.clearCookie(config.cookieName);
        }),
    }),
    route({
      method: 'put',
      path: '/account/password',
      action: 'password.change',
      summary: 'Change the own password; ends the other sessions',
      body: api.passwordChange,
      handle: async ({ request, body, caller }) => {
        await throttle.admit('password', caller.id, request.ip ?? '');
        try {
          await people.changePassword(caller.id, body.currentPassword, body.newPassword, request.sessionID);
        } catch (error) {
          await throttle.failed('password', caller.id, request.ip ?? '');
          throw error;
        }
      },
    }),
    ...linkRoutes({ people, throttle }),
  ];
}

function asError(error: unknown): Error {
  return error instanceof Error ? error : new Error(String(error));
}

/** What a person without a session may do with a link, or to get one. */
function linkRoutes({ people, throttle }: Pick<Needs, 'people' | 'throttle'>): Route[] {
  return [
    route({
      method: 'post',
      path: '/password-resets',
      action: 'password.ask-reset',
      summary: 'Ask for a link to set a new password; the answer is the same for unknown addresses',
      body: api.resetRequest,
      handle: async ({ request, body }) => {
        await throttle.admit('reset', body.email, request.ip ?? '');
        await throttle.failed('reset', body.email, request.ip ?? '');
        await people.askReset(body.email);
      },
    }),
    route({
      method: 'post',
      path: '/password-resets/complete',
      action: 'password.complete-reset',
      summary: 'Set a password by a one-time link',
      body: api.resetCompletion,
      handle: async ({ request, body }) => {
        await counted(throttle, request, () => people.completeReset(body.token, body.newPassword));
      },
    }),
    route({
      method: 'post',
      path: '/first-administrator',
      action: 'administrator.claim',
      summary: 'Become the first administrator by the link on the console',
      body: api.administratorClaim,
      handle: async ({ request, body }) => {
        await counted(throttle, request, () => people.claimAdministrator(body));
      },
    }),
  ];
}

/** Guessing links counts as failing. */
async function counted(throttle: Throttle, request: Request, act: () => Promise<unknown>): Promise<void> {
  const address = request.ip ?? '';
  await throttle.admit('link', 'any', address);
  try {
    await act();
  } catch (error) {
    await throttle.failed('link', 'any', address);
    throw error;
  }
}
