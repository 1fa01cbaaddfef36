import { api, rightOf } from '@tollgate/contracts';
import * as z from 'zod';
import type { Route } from './route';

type Json = Record<string, unknown>;

/** OpenAPI 3.1, whose schemas are JSON Schema: the same zod schemas that validate describe. */
export function describeApi(routes: readonly Route[], version: string): Json {
  const paths: Record<string, Json> = {};
  for (const entry of routes) {
    const path = `/api${entry.path}`.replace(/:(\w+)/g, '{$1}');
    paths[path] = { ...paths[path], [entry.method]: operation(entry) };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Tollgate',
      version,
      description:
        'Channels of a board held against their loss masks. Results are estimates, no compliance test.',
    },
    paths,
    components: {
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'tg-*' } },
      schemas: { Problem: schemaOf(api.problem, 'output') },
    },
  };
}

function operation(entry: Route): Json {
  const right = rightOf(entry.action);
  const open = right.scope === 'public' || right.scope === 'demo';
  return {
    summary: entry.summary,
    operationId: `${entry.method} ${entry.path}`.replace(/[^A-Za-z]+(\w)/g, (_all, letter: string) =>
      letter.toUpperCase(),
    ),
    'x-right': { action: entry.action, ...right },
    security: open ? [] : [{ session: [] }],
    parameters: [...parameters(entry.params, 'path'), ...parameters(entry.query, 'query')],
    ...requestBody(entry),
    responses: {
      [String(entry.status ?? (entry.reply === undefined ? 204 : 200))]: success(entry),
      default: {
        description: 'What is wrong, where, and how to mend it',
        content: { [api.problemMediaType]: { schema: { $ref: '#/components/schemas/Problem' } } },
      },
    },
  };
}

function success(entry: Route): Json {
  if (entry.reply === undefined) return { description: 'Done' };
  if (typeof entry.reply === 'string') return { description: 'The content', content: { [entry.reply]: {} } };
  return {
    description: 'The reply',
    content: { 'application/json': { schema: schemaOf(entry.reply, 'output') } },
  };
}

function requestBody(entry: Route): Json {
  if (entry.raw)
    return {
      requestBody: { required: true, content: Object.fromEntries(entry.raw.map((type) => [type, {}])) },
    };
  if (!entry.body) return {};
  return {
    requestBody: {
      required: true,
      content: { 'application/json': { schema: schemaOf(entry.body, 'input') } },
    },
  };
}

function parameters(schema: z.ZodType | undefined, place: 'path' | 'query'): Json[] {
  if (!schema) return [];
  const { properties = {}, required = [] } = schemaOf(schema, 'input') as {
    properties?: Record<string, Json>;
    required?: string[];
  };
  return Object.entries(properties).map(([name, inner]) => ({
    name,
    in: place,
    required: place === 'path' || required.includes(name),
    schema: inner,
  }));
}

function schemaOf(schema: z.ZodType, io: 'input' | 'output'): Json {
  const { $schema: _dialect, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: 'any' }) as Json;
  return rest;
}
