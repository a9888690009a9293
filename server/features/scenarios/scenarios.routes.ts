import { z } from 'zod';
import { idSchema, newScenarioSchema, renameSchema, scenarioSchema } from '../../../shared/contracts/api';
import { type ProductAccess, route } from '../../platform/routing';
import { inProduct } from '../../policies';
import { draftRoutes } from './drafts.routes';
import { revisionRoutes } from './revisions.routes';
import {
  changeScenarioName,
  createScenario,
  deleteScenario,
  readScenario,
  type ScenarioDependencies,
} from './scenarios.usecases';

const params = z.object({ scenarioId: idSchema });
const path = '/scenarios/:scenarioId';

interface Reading {
  readonly caller: { readonly personId: string };
  readonly product: ProductAccess | undefined;
}

const readerOf = ({ caller, product }: Reading) => ({ personId: caller.personId, role: product?.role });

/** Scenarios with their revisions and drafts. */
export function scenarioRoutes(dependencies: ScenarioDependencies) {
  return [
    route({
      method: 'POST',
      path: '/variants/:variantId/scenarios',
      summary: 'Adds a scenario to a variant, with a whole study as its first revision',
      policy: inProduct('scenario.edit', 'variantId'),
      params: z.object({ variantId: idSchema }),
      body: newScenarioSchema,
      status: 201,
      response: scenarioSchema,
      handler: async ({ params: { variantId }, body, requestId, ...call }) => {
        const actor = { personId: call.caller.personId, requestId };
        const scenarioId = await createScenario(dependencies, actor, variantId, body);
        return readScenario(dependencies, readerOf(call), scenarioId);
      },
    }),
    route({
      method: 'GET',
      path,
      summary: "A scenario with its newest revision and the caller's own draft",
      policy: inProduct('scenario.view', 'scenarioId'),
      params,
      response: scenarioSchema,
      handler: ({ params: { scenarioId }, ...call }) =>
        readScenario(dependencies, readerOf(call), scenarioId),
    }),
    route({
      method: 'PATCH',
      path,
      summary: 'Gives a scenario another name',
      policy: inProduct('scenario.edit', 'scenarioId'),
      params,
      body: renameSchema,
      response: scenarioSchema,
      handler: async ({ params: { scenarioId }, body, ...call }) => {
        await changeScenarioName(dependencies, scenarioId, body);
        return readScenario(dependencies, readerOf(call), scenarioId);
      },
    }),
    route({
      method: 'DELETE',
      path,
      summary: 'Takes a scenario out of its variant, unless a review stands on it',
      policy: inProduct('scenario.edit', 'scenarioId'),
      params,
      handler: async ({ params: { scenarioId }, caller: { personId }, requestId }) => {
        await deleteScenario(dependencies, { personId, requestId }, scenarioId);
        return undefined;
      },
    }),
    ...revisionRoutes(dependencies),
    ...draftRoutes(dependencies),
  ];
}
