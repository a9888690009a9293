import { z } from 'zod';
import {
  idSchema,
  runEventSchema,
  runListSchema,
  runMapSchema,
  runSchema,
} from '../../../shared/contracts/api';
import { type Db, type EventFeed, inTransaction } from '../../db';
import type { Engine } from '../../jobs';
import { JsonText, route, streamRoute } from '../../platform/routing';
import { inProduct, signedIn } from '../../policies';
import { createRunStreams } from './event-stream';
import { mapText } from './map-text';
import { listedRun, runText } from './run-view';
import { noMap, noRun } from './runs.errors';
import { findMap, findRun, listRuns } from './runs.repository';
import { cancelRun, requestRun } from './runs.usecases';

export interface RunsDependencies {
  readonly db: Db;
  readonly engine: Engine;
  readonly events: EventFeed;
}

const runParams = z.object({ runId: idSchema });
/** Numbers of revisions begin at 1 and fit their column. */
const revisionNumber = z.coerce.number().int().min(1).max(2_147_483_647);

async function runAnswer(db: Db, runId: string): Promise<JsonText> {
  const run = await findRun(db, runId);
  if (run === undefined) throw noRun();
  return new JsonText(runText(run));
}

/** Runs of saved revisions: asking for them, following them, reading their answers. */
export function runsRoutes({ db, engine, events }: RunsDependencies) {
  const openStream = createRunStreams(events);
  return [
    route({
      method: 'POST',
      path: '/scenarios/:scenarioId/revisions/:number/runs',
      summary: 'Computes a saved revision, also where it was computed before',
      policy: inProduct('run.start', 'scenarioId'),
      params: z.object({ scenarioId: idSchema, number: revisionNumber }),
      status: 202,
      response: runSchema,
      handler: async ({ params: { scenarioId, number }, caller: { personId }, requestId }) => {
        const engineVersion = await engine.version();
        const runId = await inTransaction(db, (tx) =>
          requestRun(tx, { scenarioId, revision: number, engineVersion, personId, requestId }),
        );
        return runAnswer(db, runId);
      },
    }),
    route({
      method: 'GET',
      path: '/scenarios/:scenarioId/runs',
      summary: 'The runs of all revisions of a scenario, newest first',
      policy: inProduct('run.view', 'scenarioId'),
      params: z.object({ scenarioId: idSchema }),
      response: runListSchema,
      handler: async ({ params }) => ({ items: (await listRuns(db, params.scenarioId)).map(listedRun) }),
    }),
    route({
      method: 'GET',
      path: '/runs/:runId',
      summary: 'A run with its state and, when it is done, its result',
      policy: inProduct('run.view', 'runId'),
      params: runParams,
      response: runSchema,
      handler: ({ params }) => runAnswer(db, params.runId),
    }),
    route({
      method: 'POST',
      path: '/runs/:runId/cancel',
      summary: 'Cancels a run that waits or computes',
      policy: inProduct('run.cancel', 'runId'),
      params: runParams,
      response: runSchema,
      handler: async ({ params: { runId }, caller: { personId }, requestId }) => {
        await cancelRun(db, runId, { personId, requestId });
        return runAnswer(db, runId);
      },
    }),
    route({
      method: 'GET',
      path: '/runs/:runId/map',
      summary: 'The map of a run that is done',
      policy: inProduct('run.view', 'runId'),
      params: runParams,
      response: runMapSchema,
      handler: async ({ params }) => {
        const map = await findMap(db, params.runId);
        if (map === undefined) throw noMap();
        return new JsonText(await mapText(map));
      },
    }),
    streamRoute({
      path: '/events',
      summary: 'What happens to runs in the products that the caller may view, as it happens',
      policy: signedIn,
      events: {
        ...{ queued: runEventSchema, started: runEventSchema, progress: runEventSchema },
        ...{ done: runEventSchema, failed: runEventSchema, cancelled: runEventSchema },
      },
      open: ({ caller, signal }, after) => openStream({ caller, after, signal }),
    }),
  ];
}
