import { pipeline } from 'node:stream/promises';
import { api } from '@tollgate/contracts';
import * as z from 'zod';
import { route, type Route } from '../../platform/http';
import type { FilesService } from './files.service';

const oneBoard = z.strictObject({ boardId: api.id });
const oneFile = z.strictObject({ boardId: api.id, fileId: api.id });
const ofBoard = (params: { boardId: string }) => Promise.resolve(params.boardId);

export function fileRoutes(files: FilesService): Route[] {
  return [
    route({
      method: 'get',
      path: '/boards/:boardId/files',
      action: 'file.read',
      summary: "The board's Touchstone files",
      params: oneBoard,
      board: ofBoard,
      reply: api.boardFiles,
      handle: async ({ boardId }) => ({ items: await files.list(boardId) }),
    }),
    route({
      method: 'post',
      path: '/boards/:boardId/files',
      action: 'file.upload',
      summary: 'Upload a Touchstone file as one raw body',
      params: oneBoard,
      query: api.uploadQuery,
      board: ofBoard,
      raw: ['application/octet-stream', 'text/plain'],
      reply: api.boardFile,
      status: 201,
      handle: ({ caller, boardId, query, request }) => files.upload(caller, boardId, query.name, request),
    }),
    route({
      method: 'get',
      path: '/boards/:boardId/files/:fileId',
      action: 'file.read',
      summary: 'The file as it was uploaded',
      params: oneFile,
      board: ofBoard,
      reply: 'application/octet-stream',
      handle: async ({ boardId, params, response }) => {
        const file = await files.one(boardId, params.fileId);
        response.attachment(file.name);
        response.type('application/octet-stream');
        response.setHeader('Content-Length', String(file.sizeBytes));
        await pipeline(files.content(file), response);
      },
    }),
  ];
}
