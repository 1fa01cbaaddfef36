import { api } from '@tollgate/contracts';
import * as z from 'zod';
import type { Clock } from '../../platform/clock';
import type { Config } from '../../platform/config/config';
import { problems, route, type Route } from '../../platform/http';
import type { ChannelsService } from '../channels';
import { checkSheet } from './check-sheet';

interface Needs {
  readonly config: Config;
  readonly clock: Clock;
  readonly channels: ChannelsService;
  readonly boardOf: (channelId: string) => Promise<string | null>;
}

export function sheetRoutes({ config, clock, channels, boardOf }: Needs): Route[] {
  return [
    route({
      method: 'get',
      path: '/channels/:channelId/sheet',
      action: 'channel.read',
      summary: 'The recorded check on paper: an unsigned PDF',
      params: z.strictObject({ channelId: api.id }),
      board: (params) => boardOf(params.channelId),
      reply: 'application/pdf',
      handle: async ({ caller, params, response }) => {
        const channel = await channels.read(params.channelId, caller);
        if (!channel.check)
          throw problems.conflict(
            'There is no check to print: mend what stands in its way first.',
            channel.checkProblems,
          );
        const pdf = checkSheet(channel, channel.check, clock.now(), config.demonstration);
        response.type('application/pdf');
        response.attachment(`${channel.name.replace(/[^\p{L}\p{N}._-]+/gu, '-')}.pdf`);
        pdf.pipe(response);
        pdf.end();
      },
    }),
  ];
}
