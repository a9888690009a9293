import { z } from 'zod';
import { outgoingMailSchema } from '../../../shared/contracts/api';
import type { Db } from '../../db';
import { route } from '../../platform/routing';
import { inOrganisation } from '../../policies';
import { listLetters } from './mail.usecases';

export function mailRoutes(dependencies: { readonly db: Db }) {
  return [
    route({
      method: 'GET',
      path: '/mail',
      summary: 'The outgoing mail, newest first',
      policy: inOrganisation('mail.view'),
      response: z.object({ items: z.array(outgoingMailSchema) }),
      handler: async () => ({ items: await listLetters(dependencies) }),
    }),
  ];
}
