import type { Request, Response } from 'express';
import type { Action, Role } from '@tollgate/contracts';
import type * as z from 'zod';
import type { Actor } from '../work';

/** The person behind a request, as every route sees them. */
export interface Caller {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly roles: readonly Role[];
}

export interface Call<Params, Query, Body> {
  readonly params: Params;
  readonly query: Query;
  readonly body: Body;
  readonly request: Request;
  readonly response: Response;
  /** Present on every route that is not public; routes that are may look. */
  readonly caller: Caller | undefined;
  /** The board a `member` route belongs to. */
  readonly boardId: string;
}

/** A signed-in call: what routes with a scope other than public get. */
export type SignedCall<Params, Query, Body> = Call<Params, Query, Body> & { readonly caller: Caller };

export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

interface RouteShape<Params extends z.ZodType, Query extends z.ZodType, Body extends z.ZodType> {
  readonly method: Method;
  /** Express path below /api, such as /boards/:boardId. */
  readonly path: string;
  /** Row of the rights table that says who may. */
  readonly action: Action;
  readonly summary: string;
  readonly params?: Params;
  readonly query?: Query;
  readonly body?: Body;
  /** Media types of a raw body, which the handler reads itself. */
  readonly raw?: readonly string[];
  /** Schema of the reply, or the media type of a reply that is not JSON; none means 204. */
  readonly reply?: z.ZodType | string;
  readonly status?: number;
  /** Finds the board of a `member` route from its parameters; null where there is none. */
  readonly board?: (params: z.output<Params>) => Promise<string | null>;
}

type Handler<Params, Query, Body> = (call: SignedCall<Params, Query, Body>) => unknown;

export interface Route extends RouteShape<z.ZodType, z.ZodType, z.ZodType> {
  readonly handle: Handler<never, never, never>;
}

/**
 * Declares a route. What it names (rights row, schemas, board) is done before `handle` runs: authenticate, validate,
 * authorise. `handle` acts and returns what is presented; it may write to `response` itself where the reply is no JSON.
 */
export function route<Params extends z.ZodType, Query extends z.ZodType, Body extends z.ZodType>(
  shape: RouteShape<Params, Query, Body> & {
    handle: Handler<z.output<Params>, z.output<Query>, z.output<Body>>;
  },
): Route {
  return shape as unknown as Route;
}

/** The actor of a caller's unit of work. */
export function actorOf(caller: Caller): Actor {
  return { personId: caller.id, name: caller.name };
}

/** A route as the rights test and the API description name it. */
export function routeName(entry: Pick<Route, 'method' | 'path'>): string {
  return `${entry.method.toUpperCase()} /api${entry.path}`;
}
