import { z } from 'zod';
import {
  directoryEntrySchema,
  idSchema,
  inviteSchema,
  personChangeSchema,
  personSchema,
} from '../../../shared/contracts/api';
import { route } from '../../platform/routing';
import { inOrganisation, signedIn } from '../../policies';
import { invite } from './invitation.usecases';
import {
  changePerson,
  listDirectory,
  listPeople,
  type PeopleDependencies,
  removePerson,
} from './people.usecases';

const params = z.object({ personId: idSchema });

export function administrationRoutes(dependencies: PeopleDependencies) {
  return [
    route({
      method: 'GET',
      path: '/people',
      summary: 'Everybody in the organisation, and who is invited to it',
      policy: inOrganisation('people.view'),
      response: z.object({ items: z.array(personSchema) }),
      handler: async () => ({ items: await listPeople(dependencies) }),
    }),
    route({
      method: 'GET',
      path: '/people/directory',
      summary: 'Whom one may give a role in a product',
      policy: signedIn,
      response: z.object({ items: z.array(directoryEntrySchema) }),
      handler: async () => ({ items: await listDirectory(dependencies) }),
    }),
    route({
      method: 'POST',
      path: '/people/invitations',
      summary: 'Invite somebody by a letter with a link',
      policy: inOrganisation('people.invite'),
      body: inviteSchema,
      status: 201,
      response: personSchema,
      handler: ({ body, ...act }) => invite(dependencies, body, act),
    }),
    route({
      method: 'PATCH',
      path: '/people/:personId',
      summary: 'Set the role, the right to create products, or the access of a person',
      policy: inOrganisation('people.edit'),
      params,
      body: personChangeSchema,
      response: personSchema,
      handler: ({ params: { personId }, body, ...act }) => changePerson(dependencies, personId, body, act),
    }),
    route({
      method: 'DELETE',
      path: '/people/:personId',
      summary: 'Remove a person, or withdraw an invitation',
      policy: inOrganisation('people.remove'),
      params,
      handler: async ({ params: { personId }, ...act }) => {
        await removePerson(dependencies, personId, act);
        return undefined;
      },
    }),
  ];
}
