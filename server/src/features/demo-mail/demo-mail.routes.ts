import { readdir, readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { api, type CaughtMail } from '@tollgate/contracts';
import * as z from 'zod';
import type { Config } from '../../platform/config/config';
import { problems, route, type Route } from '../../platform/http';

const mostShown = 200;

/** Mail that the local catcher has written to the data directory; in the demonstration only. */
export function demoMailRoutes(config: Config): Route[] {
  const folder = join(config.dataDirectory, 'mail');

  async function read(name: string): Promise<CaughtMail> {
    return api.caughtMail.parse(JSON.parse(await readFile(join(folder, name), 'utf8')));
  }

  async function names(): Promise<string[]> {
    const found = await readdir(folder).catch((error: NodeJS.ErrnoException) => {
      if (error.code === 'ENOENT') return [];
      throw error;
    });
    return found
      .filter((name) => name.endsWith('.json'))
      .sort()
      .reverse()
      .slice(0, mostShown);
  }

  return [
    route({
      method: 'get',
      path: '/demo/mail',
      action: 'demo-mail.read',
      summary: 'Mail caught on this machine, latest first',
      reply: api.caughtMails,
      handle: async () => ({ items: await Promise.all((await names()).map(read)) }),
    }),
    route({
      method: 'get',
      path: '/demo/mail/:mailId',
      action: 'demo-mail.read',
      summary: 'One caught mail',
      params: z.strictObject({
        mailId: z.string().regex(/^[A-Za-z0-9-]{1,80}$/, 'Not a mail of the catcher.'),
      }),
      reply: api.caughtMail,
      handle: async ({ params }) => {
        const all = await Promise.all((await names()).map(read));
        const mail = all.find((each) => each.id === params.mailId);
        if (!mail) throw problems.notFound('This mail');
        return mail;
      },
    }),
  ];
}
