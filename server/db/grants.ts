import { type ClientBase, escapeIdentifier } from 'pg';

/** Tables whose rows the application adds and reads, and never changes. */
const ADDED_ONLY = ['audit'];

/**
 * Gives the application's role what it needs, and no more: no change of the schema, none of the audit table.
 * Names every right anew, so that a table which a migration has made is covered, and a right that was given by
 * hand goes away.
 */
export async function grantToApplication(client: ClientBase, role: string): Promise<void> {
  const app = escapeIdentifier(role);
  const statements = [
    `revoke all on all tables in schema public from ${app}`,
    `grant usage on schema public, drizzle, graphile_worker to ${app}`,
    `grant select, insert, update, delete on all tables in schema public, graphile_worker to ${app}`,
    ...ADDED_ONLY.map((table) => `revoke update, delete on ${escapeIdentifier(table)} from ${app}`),
    `grant usage, select on all sequences in schema public, graphile_worker to ${app}`,
    `grant execute on all functions in schema graphile_worker to ${app}`,
    `grant select on all tables in schema drizzle to ${app}`,
  ];
  for (const statement of statements) await client.query(statement);
  await openQueueRows(client, app);
}

/**
 * The queue's tables show no rows to anybody but their owner (row level security without any policy); the
 * application's role works with them too.
 */
async function openQueueRows(client: ClientBase, app: string): Promise<void> {
  const { rows } = await client.query<{ name: string }>(`
    select relname as name from pg_class
    where relnamespace = 'graphile_worker'::regnamespace and relrowsecurity`);
  for (const { name } of rows) {
    const table = `graphile_worker.${escapeIdentifier(name)}`;
    await client.query(`drop policy if exists application on ${table}`);
    await client.query(`create policy application on ${table} to ${app} using (true) with check (true)`);
  }
}
