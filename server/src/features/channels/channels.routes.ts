import { pipeline } from 'node:stream/promises';
import { api, channelResponse, checkView } from '@tollgate/contracts';
import type { Request } from 'express';
import * as z from 'zod';
import { problems, route, type Route } from '../../platform/http';
import type { BoardsRepository } from '../boards';
import type { ChannelsRepository } from './channels.repository';
import type { ChannelsService } from './channels.service';
import type { ExchangeService } from './exchange.service';

interface Needs {
  readonly channels: ChannelsService;
  readonly exchange: ExchangeService;
  readonly repository: ChannelsRepository;
  readonly boards: BoardsRepository;
}

const oneRevision = z.strictObject({ revisionId: api.id });
const oneChannel = z.strictObject({ channelId: api.id });

export function channelRoutes({ channels, exchange, repository, boards }: Needs): Route[] {
  const ofRevision = (params: { revisionId: string }) => boards.boardOfRevision(params.revisionId);
  const ofChannel = (params: { channelId: string }) => repository.boardOf(params.channelId);
  return [
    route({
      method: 'get',
      path: '/revisions/:revisionId/channels',
      action: 'channel.read',
      summary: 'The channels of a revision, without their documents',
      params: oneRevision,
      board: ofRevision,
      reply: api.channels,
      handle: async ({ params }) => ({ items: await channels.list(params.revisionId) }),
    }),
    route({
      method: 'post',
      path: '/revisions/:revisionId/channels',
      action: 'channel.create',
      summary: 'Make a channel of a document',
      params: oneRevision,
      board: ofRevision,
      body: api.channelCreate,
      reply: api.channel,
      status: 201,
      handle: async ({ caller, params, boardId, body }) => {
        await refuseArchived(boards, params.revisionId);
        return channels.read(
          await channels.create(caller, boardId, params.revisionId, body.document, body.linkId),
          caller,
        );
      },
    }),
    route({
      method: 'post',
      path: '/revisions/:revisionId/import',
      action: 'channel.create',
      summary: 'Import a channel file, alone or zipped with its parts',
      params: oneRevision,
      board: ofRevision,
      raw: ['application/json', 'application/zip'],
      reply: api.channel,
      status: 201,
      handle: async ({ caller, params, boardId, request }) => {
        await refuseArchived(boards, params.revisionId);
        return channels.read(await exchange.import(caller, boardId, params.revisionId, request), caller);
      },
    }),
    route({
      method: 'get',
      path: '/channels/:channelId',
      action: 'channel.read',
      summary: 'A channel with its document and check',
      params: oneChannel,
      board: ofChannel,
      reply: api.channel,
      handle: ({ caller, params }) => channels.read(params.channelId, caller),
    }),
    route({
      method: 'put',
      path: '/channels/:channelId',
      action: 'channel.change',
      summary: 'Save a document over the version named by If-Match',
      params: oneChannel,
      board: ofChannel,
      body: api.channelSave,
      reply: api.channel,
      handle: ({ caller, params, boardId, body, request }) =>
        channels.save(caller, params.channelId, boardId, versionOf(request), body.document),
    }),
    route({
      method: 'patch',
      path: '/channels/:channelId',
      action: 'channel.change',
      summary: 'Move to a link, or archive',
      params: oneChannel,
      board: ofChannel,
      body: api.channelChange,
      reply: api.channel,
      handle: ({ caller, params, boardId, body }) => channels.change(caller, params.channelId, boardId, body),
    }),
    ...resultRoutes({ channels, exchange, repository, boards }),
  ];
}

/** What a channel comes to, and how it leaves. */
function resultRoutes({ channels, exchange, repository }: Needs): Route[] {
  const ofChannel = (params: { channelId: string }) => repository.boardOf(params.channelId);
  return [
    route({
      method: 'post',
      path: '/channels/:channelId/check',
      action: 'channel.check',
      summary: 'Check a document without saving it; a newer check by the same person takes its place',
      params: oneChannel,
      board: ofChannel,
      body: api.checkRequest,
      reply: checkView,
      handle: async ({ caller, params, boardId, body, response }) => {
        response
          .type('application/json')
          .send(await channels.check(caller, params.channelId, boardId, body.document));
      },
    }),
    route({
      method: 'get',
      path: '/channels/:channelId/response',
      action: 'channel.read',
      summary: 'The whole response of the stored document, with its S matrices',
      params: oneChannel,
      board: ofChannel,
      reply: channelResponse,
      handle: async ({ caller, params, boardId, response }) => {
        response.type('application/json').send(await channels.response(caller, params.channelId, boardId));
      },
    }),
    route({
      method: 'get',
      path: '/channels/:channelId/export',
      action: 'channel.read',
      summary: 'The channel file, zipped with its parts where it has any',
      params: oneChannel,
      board: ofChannel,
      reply: 'application/octet-stream',
      handle: async ({ params, response }) => {
        const { fileName, type, body } = await exchange.export(params.channelId);
        response.attachment(fileName);
        response.type(type);
        if (typeof body === 'string') response.send(body);
        else await pipeline(body, response);
      },
    }),
  ];
}

async function refuseArchived(boards: BoardsRepository, revisionId: string): Promise<void> {
  const revision = await boards.revision(revisionId);
  if (revision?.archived)
    throw problems.conflict(`Revision ${revision.letter} is archived; take it out of the archive first.`);
}

function versionOf(request: Request): number {
  const match = /^"?(\d+)"?$/.exec(request.headers['if-match'] ?? '');
  if (!match) throw problems.versionRequired();
  return Number(match[1]);
}
