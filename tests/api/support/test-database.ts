import { randomUUID } from 'node:crypto';
import { Client } from 'pg';
import { inject } from 'vitest';
import { TEMPLATE } from './cluster-setup';

/** A database of its own for one test file. */
export interface TestDatabase {
  /** The application's role. */
  readonly url: string;
  readonly ownerUrl: string;
  drop(): Promise<void>;
}

function withDatabase(url: string, database: string): string {
  const changed = new URL(url);
  changed.pathname = `/${database}`;
  return changed.href;
}

async function asAdministrator(statement: string): Promise<void> {
  const client = new Client({ connectionString: inject('cluster').ownerUrl });
  await client.connect();
  try {
    await client.query(statement);
  } finally {
    await client.end();
  }
}

/** @param template what it is a copy of; `template0` for an empty one */
export async function createTestDatabase(template = TEMPLATE): Promise<TestDatabase> {
  const name = `test_${randomUUID().replaceAll('-', '')}`;
  const { ownerUrl, applicationUrl } = inject('cluster');
  await asAdministrator(`create database ${name} template ${template}`);
  return {
    url: withDatabase(applicationUrl, name),
    ownerUrl: withDatabase(ownerUrl, name),
    drop: () => asAdministrator(`drop database if exists ${name} with (force)`),
  };
}
