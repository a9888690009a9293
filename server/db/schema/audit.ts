import { bigint, index, jsonb, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { writtenAt } from './columns';

/**
 * Who did what to what. Rows are added and read, never changed: the application's role has no right to, and a
 * trigger refuses it to any role. No foreign keys, since it must outlive what it speaks of.
 */
export const audit = pgTable(
  'audit',
  {
    id: bigint({ mode: 'number' }).primaryKey().generatedAlwaysAsIdentity(),
    at: writtenAt(),
    /** Null where the server acted by itself, or nobody was signed in. */
    personId: uuid(),
    /** The name of what was done, such as `membership.set`. */
    action: text().notNull(),
    /** The kind of thing, such as `product`. */
    objectKind: text().notNull(),
    objectId: text().notNull(),
    data: jsonb().$type<Record<string, unknown>>().notNull().default({}),
    requestId: text(),
  },
  ({ objectKind, objectId, personId }) => [
    index('audit_object').on(objectKind, objectId),
    index('audit_person').on(personId),
  ],
);
