import { api } from '@tollgate/contracts';
import { route, type Route } from '../../platform/http';
import type { MasksRepository } from './masks.repository';

export function maskRoutes(masks: MasksRepository): Route[] {
  return [
    route({
      method: 'get',
      path: '/mask-sets',
      action: 'masks.list',
      summary: 'Mask sets, the latest revision of each',
      reply: api.maskSets,
      handle: async () => ({ items: await masks.latest() }),
    }),
  ];
}
