import { z } from 'zod';
import { idSchema, saveDraftSchema, scenarioDraftSchema } from '../../../shared/contracts/api';
import type { Db } from '../../db';
import { route } from '../../platform/routing';
import { inProduct } from '../../policies';
import { discardDraft, saveDraft } from './drafts.usecases';

const LARGEST_VERSION = 2 ** 31 - 1;

const params = z.object({ scenarioId: idSchema });
const path = '/scenarios/:scenarioId/draft';

/** Everybody has a draft of their own; nobody else's can be reached. */
export function draftRoutes(dependencies: { db: Db }) {
  return [
    route({
      method: 'PUT',
      path,
      summary: "Keeps the caller's unsaved work on a scenario; answered by 409 where another window did",
      policy: inProduct('draft.edit', 'scenarioId'),
      params,
      body: saveDraftSchema,
      response: scenarioDraftSchema,
      handler: ({ params: { scenarioId }, body, caller: { personId } }) =>
        saveDraft(dependencies, { scenarioId, personId }, body),
    }),
    route({
      method: 'DELETE',
      path,
      summary: "Throws away the caller's draft, where a version is stated only that one",
      policy: inProduct('draft.edit', 'scenarioId'),
      params,
      query: z.object({ version: z.coerce.number().int().min(1).max(LARGEST_VERSION).optional() }),
      handler: async ({ params: { scenarioId }, query: { version }, caller: { personId } }) => {
        await discardDraft(dependencies, { scenarioId, personId }, version);
        return undefined;
      },
    }),
  ];
}
