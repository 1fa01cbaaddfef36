import express, {
  type Express,
  type NextFunction,
  type Request,
  type RequestHandler,
  type Response,
} from 'express';
import { bounds, problemsOf, rightOf, roleAllows } from '@tollgate/contracts';
import * as z from 'zod';
import { problems } from './problem';
import { routeName, type Call, type Caller, type Route } from './route';

/** What a mounted route asks of the features. */
export interface Guards {
  /** Whether a person is a member of a board. */
  isMember(personId: string, boardId: string): Promise<boolean>;
  readonly demonstration: boolean;
}

/** Puts every route on the app: one sentence each, limit, authenticate, validate, authorise, act, present. */
export function mountRoutes(app: Express, routes: readonly Route[], guards: Guards): void {
  const names = routes.map(routeName);
  const twin = names.find((name, i) => names.indexOf(name) !== i);
  if (twin) throw new Error(`Two routes are declared as ${twin}.`);
  for (const entry of routes) {
    const steps: RequestHandler[] = entry.raw
      ? []
      : [express.json({ limit: bounds.documentBytes + 4096, strict: true })];
    app[entry.method](`/api${entry.path}`, authenticate(entry, guards), ...steps, (request, response) =>
      answer(entry, guards, request, response),
    );
  }
}

function authenticate(entry: Route, guards: Guards): RequestHandler {
  const right = rightOf(entry.action);
  return (request: Request, _response: Response, next: NextFunction) => {
    if (right.scope === 'demo' && !guards.demonstration) return next(problems.notFound('The page'));
    if (right.scope === 'public' || right.scope === 'demo') return next();
    if (!callerOf(request)) return next(problems.signedOut());
    // A role that may never do this is told so before its body is read.
    next(
      roleAllows(entry.action, callerOf(request)!.roles) || right.scope === 'member'
        ? undefined
        : problems.forbidden(),
    );
  };
}

async function answer(entry: Route, guards: Guards, request: Request, response: Response): Promise<void> {
  const params = parsed(entry.params, request.params, '');
  const query = parsed(entry.query, request.query, '');
  const boardId = await authorise(entry, guards, params, callerOf(request));
  if (entry.raw) checkMediaType(request, entry.raw);
  const body = entry.raw ? undefined : parsed(entry.body, entry.body ? request.body : undefined, '');
  const call = { params, query, body, request, response, caller: callerOf(request), boardId } as Call<
    never,
    never,
    never
  >;
  const result = await entry.handle(call as never);
  if (response.headersSent || response.writableEnded || typeof entry.reply === 'string') return;
  if (entry.reply === undefined) response.status(204).end();
  else response.status(entry.status ?? 200).json(result);
}

async function authorise(
  entry: Route,
  guards: Guards,
  params: unknown,
  caller: Caller | undefined,
): Promise<string> {
  if (rightOf(entry.action).scope !== 'member' || !caller) return '';
  const boardId = entry.board ? await entry.board(params) : null;
  // Someone else's board and no board at all look the same.
  if (!boardId || !(await guards.isMember(caller.id, boardId))) throw problems.notFound();
  if (!roleAllows(entry.action, caller.roles)) throw problems.forbidden();
  return boardId;
}

function parsed(schema: z.ZodType | undefined, value: unknown, prefix: string): unknown {
  const result = (schema ?? nothing).safeParse(value ?? {});
  if (result.success) return result.data;
  const fields = problemsOf(result.error).map((field) => ({ ...field, path: `${prefix}${field.path}` }));
  throw problems.invalid(fields);
}

const nothing = z.looseObject({});

function checkMediaType(request: Request, allowed: readonly string[]): void {
  const type = (request.headers['content-type'] ?? '').split(';')[0]!.trim().toLowerCase();
  if (!allowed.includes(type))
    throw problems.wrongType(`Send the content as ${allowed.join(' or ')}, not as ${type || 'nothing'}.`);
}

/** The signed-in person of a request, put there by passport. */
export function callerOf(request: Request): Caller | undefined {
  return (request as Request & { user?: Caller }).user;
}
