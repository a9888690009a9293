import { z } from 'zod';
import { auditPageSchema } from '../../../shared/contracts/api';
import type { Db } from '../../db';
import { route } from '../../platform/routing';
import { inOrganisation } from '../../policies';
import { readAudit } from './audit.usecases';

const query = z.object({
  before: z
    .string()
    .regex(/^\d{1,15}$/, { error: 'must be the id of an entry' })
    .transform(Number)
    .optional(),
});

export function auditRoutes(dependencies: { readonly db: Db }) {
  return [
    route({
      method: 'GET',
      path: '/audit',
      summary: 'Who did what to what, the newest first',
      policy: inOrganisation('audit.view'),
      query,
      response: auditPageSchema,
      handler: ({ query: { before } }) => readAudit(dependencies, before),
    }),
  ];
}
