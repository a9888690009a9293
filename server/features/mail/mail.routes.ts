import { z } from 'zod';
import type { Db } from '../../db';
import { route } from '../../platform/routing';
import { inOrganisation } from '../../policies';
import { selectLetters } from './mail.repository';

const letterSchema = z.object({
  id: z.uuid(),
  recipient: z.string(),
  subject: z.string(),
  text: z.string(),
  createdAt: z.iso.datetime(),
  sentAt: z.iso.datetime().nullable(),
  attempts: z.int(),
  lastError: z.string().nullable(),
});

const MOST_LETTERS = 200;

export function mailRoutes({ db }: { db: Db }) {
  return [
    route({
      method: 'GET',
      path: '/mail',
      summary: 'The outgoing mail, newest first',
      policy: inOrganisation('mail.view'),
      query: z.object({ limit: z.coerce.number().int().min(1).max(MOST_LETTERS).default(MOST_LETTERS) }),
      response: z.object({ letters: z.array(letterSchema) }),
      handler: async ({ query }) => {
        const letters = await selectLetters(db, query.limit);
        return {
          letters: letters.map((letter) => ({
            ...letter,
            createdAt: letter.createdAt.toISOString(),
            sentAt: letter.sentAt?.toISOString() ?? null,
          })),
        };
      },
    }),
  ];
}
