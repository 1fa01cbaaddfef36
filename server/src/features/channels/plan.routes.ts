import { api, type CompleteChannel, type PlanChannel } from '@tollgate/contracts';
import * as z from 'zod';
import { route, type Route } from '../../platform/http';
import type { BoardsRepository } from '../boards';
import type { ChannelsRepository } from './channels.repository';

/** The floor plan of a revision: what its channels draw, without the rest of their documents. */
export function planRoutes(repository: ChannelsRepository, boards: BoardsRepository): Route[] {
  return [
    route({
      method: 'get',
      path: '/revisions/:revisionId/plan',
      action: 'channel.read',
      summary:
        'What the channels of a revision draw on the floor plan: traces with a path, parts with a place',
      params: z.strictObject({ revisionId: api.id }),
      board: ({ revisionId }) => boards.boardOfRevision(revisionId),
      reply: api.planChannels,
      handle: async ({ params }) => ({
        items: (await repository.drawn(params.revisionId)).map(({ id, name, document }) =>
          presentPlan(id, name, JSON.parse(document) as CompleteChannel),
        ),
      }),
    }),
  ];
}

function presentPlan(id: string, name: string, { elements }: CompleteChannel): PlanChannel {
  return {
    id,
    name,
    traces: elements.flatMap((element) =>
      element.kind === 'trace' && element.path
        ? [{ layer: element.layer, widthM: element.widthM, path: element.path }]
        : [],
    ),
    parts: elements.flatMap(({ kind, plan }): PlanChannel['parts'] =>
      plan && kind !== 'trace' ? [{ kind, at: [plan.xM, plan.yM] }] : [],
    ),
  };
}
