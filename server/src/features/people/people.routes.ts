import { api } from '@tollgate/contracts';
import * as z from 'zod';
import { actorOf, route, type Route } from '../../platform/http';
import { presentDirectoryEntry, presentPerson } from './people.presenter';
import type { PeopleService } from './people.service';

const one = z.strictObject({ personId: api.id });

export function peopleRoutes(people: PeopleService): Route[] {
  return [
    route({
      method: 'get',
      path: '/people/directory',
      action: 'people.directory',
      summary: 'Names and roles, for choosing members',
      reply: api.directory,
      handle: async () => ({
        items: (await people.all()).filter((person) => person.active).map(presentDirectoryEntry),
      }),
    }),
    route({
      method: 'get',
      path: '/people',
      action: 'people.list',
      summary: 'Everyone',
      reply: api.people,
      handle: async () => ({ items: (await people.all()).map(presentPerson) }),
    }),
    route({
      method: 'post',
      path: '/people',
      action: 'people.change',
      summary: 'Invite someone; a link to choose a password is mailed',
      body: api.personCreate,
      reply: api.person,
      status: 201,
      handle: async ({ body, caller }) => presentPerson(await people.invite(actorOf(caller), body)),
    }),
    route({
      method: 'patch',
      path: '/people/:personId',
      action: 'people.change',
      summary: 'Change name, roles, or whether the person is active',
      params: one,
      body: api.personChange,
      reply: api.person,
      handle: async ({ params, body, caller }) =>
        presentPerson(await people.change(actorOf(caller), params.personId, body)),
    }),
    route({
      method: 'post',
      path: '/people/:personId/link',
      action: 'people.change',
      summary: 'Mail a one-time link to set a password',
      params: one,
      handle: ({ params, caller }) => people.sendLink(actorOf(caller), params.personId),
    }),
  ];
}
