import { z } from 'zod';
import {
  idSchema,
  listedRevisionSchema,
  saveScenarioSchema,
  scenarioRevisionSchema,
} from '../../../shared/contracts/api';
import { route } from '../../platform/routing';
import { inProduct } from '../../policies';
import { readRevision, readRevisions, saveRevision } from './revisions.usecases';
import type { ScenarioDependencies } from './scenarios.usecases';

const LARGEST_NUMBER = 2 ** 31 - 1;

const params = z.object({ scenarioId: idSchema });
const path = '/scenarios/:scenarioId/revisions';

export function revisionRoutes(dependencies: ScenarioDependencies) {
  return [
    route({
      method: 'GET',
      path,
      summary: 'The revisions of a scenario, newest first, without their studies',
      policy: inProduct('scenario.view', 'scenarioId'),
      params,
      response: z.object({ items: z.array(listedRevisionSchema) }),
      handler: async ({ params: { scenarioId } }) => ({
        items: await readRevisions(dependencies, scenarioId),
      }),
    }),
    route({
      method: 'POST',
      path,
      summary: 'Saves a study as the next revision; answered by 409 with the newer one where it is overtaken',
      policy: inProduct('scenario.edit', 'scenarioId'),
      params,
      body: saveScenarioSchema,
      status: 201,
      response: scenarioRevisionSchema,
      handler: ({ params: { scenarioId }, body, caller, requestId }) =>
        saveRevision(dependencies, { personId: caller.personId, requestId }, scenarioId, body),
    }),
    route({
      method: 'GET',
      path: `${path}/:number`,
      summary: 'A revision of a scenario with its study',
      policy: inProduct('scenario.view', 'scenarioId'),
      params: params.extend({ number: z.coerce.number().int().min(1).max(LARGEST_NUMBER) }),
      response: scenarioRevisionSchema,
      handler: ({ params: { scenarioId, number } }) => readRevision(dependencies, scenarioId, number),
    }),
  ];
}
