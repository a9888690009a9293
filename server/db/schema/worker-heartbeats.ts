import { pgTable, text } from 'drizzle-orm/pg-core';
import { writtenAt } from './columns';

/** Who works on the queue. One that stays silent is dead, and what it had begun is begun anew. */
export const workerHeartbeats = pgTable('worker_heartbeats', {
  workerId: text().primaryKey(),
  startedAt: writtenAt(),
  beatAt: writtenAt(),
});
