import { channelJsonSchema } from '@tollgate/contracts';
import * as z from 'zod';
import { describeApi, route, type Route } from '../../platform/http';
import { version } from '../../version';

/** The description of the API by itself, and the JSON Schema of the channel file. */
export function apiDocsRoutes(all: () => readonly Route[]): Route[] {
  const document = z.record(z.string(), z.unknown());
  return [
    route({
      method: 'get',
      path: '/openapi.json',
      action: 'api.describe',
      summary: 'This description, OpenAPI 3.1',
      reply: document,
      handle: () => describeApi(all(), version),
    }),
    route({
      method: 'get',
      path: '/schemas/channel.json',
      action: 'api.describe',
      summary: 'JSON Schema of the channel file',
      reply: document,
      handle: () => channelJsonSchema(),
    }),
  ];
}
