import { api } from '@tollgate/contracts';
import * as z from 'zod';
import { route, type Route } from '../../platform/http';
import type { BoardsRepository } from './boards.repository';
import type { BoardsService } from './boards.service';

const oneBoard = z.strictObject({ boardId: api.id });
const oneMember = z.strictObject({ boardId: api.id, personId: api.id });
const ofBoard = (params: { boardId: string }) => Promise.resolve(params.boardId);

export function boardRoutes(boards: BoardsService): Route[] {
  return [
    route({
      method: 'get',
      path: '/boards',
      action: 'boards.list',
      summary: 'Boards of which one is a member, each with its latest revision',
      reply: api.boards,
      handle: async ({ caller }) => ({ items: await boards.list(caller) }),
    }),
    route({
      method: 'post',
      path: '/boards',
      action: 'boards.create',
      summary: 'Make a board with a revision A',
      body: api.boardCreate,
      reply: api.board,
      status: 201,
      handle: ({ caller, body }) => boards.create(caller, body),
    }),
    route({
      method: 'get',
      path: '/boards/:boardId',
      action: 'board.read',
      summary: 'A board with revisions and members',
      params: oneBoard,
      board: ofBoard,
      reply: api.board,
      handle: ({ caller, boardId }) => boards.readBoard(boardId, caller),
    }),
    route({
      method: 'patch',
      path: '/boards/:boardId',
      action: 'board.change',
      summary: 'Rename, describe or archive a board',
      params: oneBoard,
      board: ofBoard,
      body: api.boardChange,
      reply: api.board,
      handle: ({ caller, boardId, body }) => boards.change(caller, boardId, body),
    }),
    route({
      method: 'put',
      path: '/boards/:boardId/members/:personId',
      action: 'board.members',
      summary: 'Make someone a member',
      params: oneMember,
      board: ofBoard,
      reply: api.board,
      handle: ({ caller, boardId, params }) => boards.addMember(caller, boardId, params.personId),
    }),
    route({
      method: 'delete',
      path: '/boards/:boardId/members/:personId',
      action: 'board.members',
      summary: 'Take a member off the board',
      params: oneMember,
      board: ofBoard,
      handle: ({ caller, boardId, params }) => boards.removeMember(caller, boardId, params.personId),
    }),
  ];
}

export function revisionRoutes(boards: BoardsService, repository: BoardsRepository): Route[] {
  const oneRevision = z.strictObject({ revisionId: api.id });
  const oneLink = z.strictObject({ linkId: api.id });
  const ofRevision = (params: { revisionId: string }) => repository.boardOfRevision(params.revisionId);
  const ofLink = (params: { linkId: string }) => repository.boardOfLink(params.linkId);
  return [
    route({
      method: 'post',
      path: '/boards/:boardId/revisions',
      action: 'revision.create',
      summary: 'Make a revision, empty or as a copy of another',
      params: oneBoard,
      board: ofBoard,
      body: api.revisionCreate,
      reply: api.revision,
      status: 201,
      handle: ({ caller, boardId, body }) => boards.createRevision(caller, boardId, body),
    }),
    route({
      method: 'get',
      path: '/revisions/:revisionId',
      action: 'revision.read',
      summary: 'A revision with its links',
      params: oneRevision,
      board: ofRevision,
      reply: api.revision,
      handle: ({ caller, params }) => boards.readRevision(params.revisionId, caller),
    }),
    route({
      method: 'patch',
      path: '/revisions/:revisionId',
      action: 'revision.change',
      summary: 'Set the release date, or archive',
      params: oneRevision,
      board: ofRevision,
      body: api.revisionChange,
      reply: api.revision,
      handle: ({ caller, params, boardId, body }) =>
        boards.changeRevision(caller, params.revisionId, boardId, body),
    }),
    route({
      method: 'post',
      path: '/revisions/:revisionId/links',
      action: 'link.change',
      summary: 'Make a link, which groups lanes',
      params: oneRevision,
      board: ofRevision,
      body: api.linkCreate,
      reply: api.link,
      status: 201,
      handle: ({ caller, params, boardId, body }) =>
        boards.createLink(caller, params.revisionId, boardId, body.name),
    }),
    route({
      method: 'patch',
      path: '/links/:linkId',
      action: 'link.change',
      summary: 'Rename or archive a link',
      params: oneLink,
      board: ofLink,
      body: api.linkChange,
      reply: api.link,
      handle: ({ caller, params, boardId, body }) => boards.changeLink(caller, params.linkId, boardId, body),
    }),
  ];
}
