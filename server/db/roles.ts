import { Client, escapeIdentifier, escapeLiteral } from 'pg';

export const APPLICATION_ROLE = 'tareline_app';

/** The name of the role that a connection URL signs in as. */
export function roleOf(url: string): string {
  return decodeURIComponent(new URL(url).username);
}

/** Makes the application's role on a server of our own, or sets its password anew. */
export async function ensureApplicationRole(adminUrl: string, password: string): Promise<void> {
  const client = new Client({ connectionString: adminUrl });
  await client.connect();
  try {
    const { rowCount } = await client.query('select from pg_roles where rolname = $1', [APPLICATION_ROLE]);
    const verb = rowCount === 0 ? 'create' : 'alter';
    await client.query(
      `${verb} role ${escapeIdentifier(APPLICATION_ROLE)} login password ${escapeLiteral(password)}`,
    );
  } finally {
    await client.end();
  }
}

/** Makes a database, unless it is there. */
export async function ensureDatabase(adminUrl: string, name: string): Promise<void> {
  const client = new Client({ connectionString: adminUrl });
  await client.connect();
  try {
    const { rowCount } = await client.query('select from pg_database where datname = $1', [name]);
    if (rowCount === 0) await client.query(`create database ${escapeIdentifier(name)}`);
  } finally {
    await client.end();
  }
}
