import { createHash } from 'node:crypto';
import { join } from 'node:path';
import process from 'node:process';
import { connectDatabase, migrate, type Seed } from '../../db';
import { APPLICATION_ROLE } from '../../db/roles';
import type { SignIn } from '../../features/demo';
import type { Configuration } from '../../platform/configuration';
import type { Log } from '../../platform/log';
import { packageRoot } from '../../platform/package-root';
import { foreignDatabase } from '../database/foreign-database';
import { makePassable } from '../database/cluster';
import { openPrivateDatabase } from '../database/private-database';
import { fillEmptyDatabase, type WaysIn } from './fill-empty-database';

export interface PreparedDatabase extends WaysIn {
  readonly url: string;
  stop(): Promise<void>;
  /** The same, without waiting. */
  abandon(): void;
}

export interface PrepareOptions {
  readonly configuration: Configuration;
  readonly log: Log;
  readonly demo: Seed<readonly SignIn[]>;
}

/** A database that can be reached, before it was brought up to date. */
interface Source {
  readonly url: string;
  readonly ownerUrl: string;
  readonly applicationRole: string | undefined;
  readonly signInFile: string;
  stop(): Promise<void>;
  abandon(): void;
}

const ONE_ROLE =
  'DATABASE_URL is the only role given: the audit table is guarded by triggers alone, which its owner could ' +
  'remove; for a stronger guard name a second role by DATABASE_OWNER_URL';

function say(line: string): void {
  process.stderr.write(`tareline: ${line}\n`);
}

/** Where the demo's sign-ins of a database on another server are kept. */
export function foreignSignInFile(home: string, databaseUrl: string): string {
  const { host, pathname } = new URL(databaseUrl);
  const digest = createHash('sha256').update(`${host}${pathname}`).digest('hex').slice(0, 12);
  return join(home, `demo-sign-ins-${digest}.json`);
}

function foreignSource({ database }: Configuration): Source | undefined {
  const foreign = foreignDatabase(database);
  if (foreign === undefined) return undefined;
  if (foreign.applicationRole === undefined) say(ONE_ROLE);
  const home = join(packageRoot, '.data');
  makePassable(home);
  return {
    ...foreign,
    signInFile: foreignSignInFile(home, foreign.url),
    stop: () => Promise.resolve(),
    abandon: () => undefined,
  };
}

async function privateSource(): Promise<Source> {
  const database = await openPrivateDatabase(packageRoot);
  return {
    ...database,
    applicationRole: APPLICATION_ROLE,
    signInFile: join(database.home, 'demo-sign-ins.json'),
  };
}

async function fill(
  { url, signInFile }: Source,
  { configuration, demo, log }: PrepareOptions,
): Promise<WaysIn> {
  const database = connectDatabase({ url, log, name: 'tareline seed' });
  try {
    return await fillEmptyDatabase({ db: database.db, configuration, demo, signInFile, now: new Date() });
  } finally {
    await database.close();
  }
}

/**
 * The database of the server: a foreign one where DATABASE_URL names it, else the private one of this checkout;
 * brought up to date, and not without a way in.
 *
 * @throws SetupFailure, SchemaMismatchError
 */
export async function prepareDatabase(options: PrepareOptions): Promise<PreparedDatabase> {
  const source = foreignSource(options.configuration) ?? (await privateSource());
  try {
    if (await migrate(source)) say('the database was brought up to date');
    return { ...source, ...(await fill(source, options)) };
  } catch (error) {
    await source.stop();
    throw error;
  }
}
