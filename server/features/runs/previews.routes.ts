import {
  previewAnswerSchema,
  previewMapAnswerSchema,
  previewMapSchema,
  previewSchema,
} from '../../../shared/contracts/api';
import type { Db } from '../../db';
import type { Engine } from '../../jobs';
import { JsonText, route } from '../../platform/routing';
import { signedIn } from '../../policies';
import { createPreviewSlots } from './preview-slots';
import { previewAnswer, previewMap } from './previews.usecases';

/** Drafts computed while a hand moves something: in threads of this process, not through the queue. */
export function previewRoutes({ db, engine }: { db: Db; engine: Engine }) {
  const dependencies = { db, engine, slots: createPreviewSlots() };
  return [
    route({
      method: 'POST',
      path: '/preview',
      summary: 'Computes a draft; a newer preview under the same name cancels an older one',
      policy: signedIn,
      body: previewSchema,
      response: previewAnswerSchema,
      handler: async ({ body: { study, supersedes }, caller: { personId }, signal }) =>
        new JsonText(await previewAnswer(dependencies, { study, supersedes, personId, signal })),
    }),
    route({
      method: 'POST',
      path: '/preview/map',
      summary: 'Computes the map of a draft, as fine as asked for or as a stated time allows',
      policy: signedIn,
      body: previewMapSchema,
      response: previewMapAnswerSchema,
      handler: async ({ body, caller: { personId }, signal }) => {
        const { study, supersedes, columns, rows, within } = body;
        const until = within === undefined ? undefined : Date.now() + within;
        const request = { study, supersedes, personId, signal };
        return new JsonText(await previewMap(dependencies, request, { columns, rows, until }));
      },
    }),
  ];
}
