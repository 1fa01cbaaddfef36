import { api } from '@tollgate/contracts';
import type { Request } from 'express';
import * as z from 'zod';
import { problems, route, type Route } from '../../platform/http';
import type { BoardsRepository } from '../boards';
import type { DeskService } from './desk.service';
import type { StackupsRepository } from './stackups.repository';
import type { StackupsService } from './stackups.service';
import type { UseStackup } from './use-stackup';

interface Needs {
  readonly stackups: StackupsService;
  readonly use: UseStackup;
  readonly desk: DeskService;
  readonly repository: StackupsRepository;
  readonly boards: BoardsRepository;
}

const oneRevision = z.strictObject({ revisionId: api.id });
const oneStackup = z.strictObject({ stackupId: api.id });

export function stackupRoutes(needs: Needs): Route[] {
  const { stackups, use, repository, boards } = needs;
  const ofRevision = (params: { revisionId: string }) => boards.boardOfRevision(params.revisionId);
  return [
    route({
      method: 'get',
      path: '/revisions/:revisionId/stackups',
      action: 'stackup.read',
      summary: "The versions of a revision's stackup, newest first",
      params: oneRevision,
      board: ofRevision,
      reply: api.stackupVersions,
      handle: ({ caller, params }) => stackups.list(caller, params.revisionId),
    }),
    route({
      method: 'post',
      path: '/revisions/:revisionId/stackups',
      action: 'stackup.create',
      summary: 'Save the next version over the newest one, named by If-Match ("0" for none)',
      params: oneRevision,
      board: ofRevision,
      body: api.stackupCreate,
      reply: api.stackupVersion,
      status: 201,
      handle: ({ caller, params, body, request }) =>
        stackups.create(caller, params.revisionId, numberOf(request), body),
    }),
    route({
      method: 'post',
      path: '/revisions/:revisionId/stackups/copy',
      action: 'stackup.create',
      summary: 'The next version as a copy of one of another revision',
      params: oneRevision,
      board: ofRevision,
      body: api.stackupCopy,
      reply: api.stackupVersion,
      status: 201,
      handle: ({ caller, params, body, request }) =>
        stackups.copy(caller, params.revisionId, numberOf(request), body),
    }),
    route({
      method: 'post',
      path: '/revisions/:revisionId/stackups/use',
      action: 'stackup.use',
      summary: 'Write the newest stackup into drafts of the revision, each as its next version',
      params: oneRevision,
      board: ofRevision,
      body: api.stackupUse,
      reply: api.stackupUsed,
      handle: ({ caller, params, body }) => use(caller, params.revisionId, body.channelIds),
    }),
    route({
      method: 'get',
      path: '/stackups/:stackupId',
      action: 'stackup.read',
      summary: 'One version of a stackup with its layers',
      params: oneStackup,
      board: (params) => repository.boardOf(params.stackupId),
      reply: api.stackupVersion,
      handle: ({ params }) => stackups.read(params.stackupId),
    }),
    ...deskRoutes(needs),
  ];
}

/** What needs no board: whose stackups one may copy, and the cross-section desk. */
function deskRoutes({ stackups, desk }: Needs): Route[] {
  return [
    route({
      method: 'get',
      path: '/stackups',
      action: 'stackups.list',
      summary: "The newest stackup of every revision of one's boards",
      reply: api.stackupSources,
      handle: async ({ caller }) => ({ items: await stackups.sources(caller) }),
    }),
    route({
      method: 'post',
      path: '/stackups/cross-section',
      action: 'section.solve',
      summary: 'Impedance, delay and loss of a trace or pair on a stackup; nothing is saved',
      body: api.crossSectionRequest,
      reply: api.crossSection,
      handle: ({ caller, body }) => desk.section(caller, body),
    }),
    route({
      method: 'post',
      path: '/stackups/synthesis',
      action: 'section.solve',
      summary: 'The width, or the gap of a pair, for a wanted impedance',
      body: api.synthesisRequest,
      reply: api.synthesis,
      handle: ({ caller, body }) => desk.synthesis(caller, body),
    }),
  ];
}

function numberOf(request: Request): number {
  const match = /^"?(\d{1,9})"?$/.exec(request.headers['if-match'] ?? '');
  if (!match) throw problems.versionRequired();
  return Number(match[1]);
}
