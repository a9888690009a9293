import { createHash } from 'node:crypto';
import { join } from 'node:path';
import process from 'node:process';
import { connectDatabase, migrate, type Seed, seedIfEmpty } from '../../db';
import { APPLICATION_ROLE } from '../../db/roles';
import { type Configuration, isLoopback } from '../../platform/configuration';
import type { Log } from '../../platform/log';
import { packageRoot } from '../../platform/package-root';
import { foreignDatabase } from '../database/foreign-database';
import { makePassable } from '../database/cluster';
import { openPrivateDatabase } from '../database/private-database';
import { keepSignIns, keptSignIns, type SignIn } from './sign-ins';

export interface PreparedDatabase {
  readonly url: string;
  readonly signIns: readonly SignIn[];
  stop(): Promise<void>;
  /** The same, without waiting. */
  abandon(): void;
}

export interface PrepareOptions {
  readonly configuration: Configuration;
  readonly log: Log;
  /** Fills an empty database with a demo; undefined for none. */
  readonly demo: Seed<readonly SignIn[]> | undefined;
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

function foreignSource({ database }: Configuration): Source | undefined {
  const foreign = foreignDatabase(database);
  if (foreign === undefined) return undefined;
  if (foreign.applicationRole === undefined) say(ONE_ROLE);
  const home = join(packageRoot, '.data');
  makePassable(home);
  const { host, pathname } = new URL(foreign.url);
  const digest = createHash('sha256').update(`${host}${pathname}`).digest('hex').slice(0, 12);
  return {
    ...foreign,
    signInFile: join(home, `demo-sign-ins-${digest}.json`),
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

/** A demo's passwords are printed: no such account where other machines can reach the server. */
async function seedDemo(source: Source, { configuration, demo, log }: PrepareOptions): Promise<void> {
  if (demo === undefined || !isLoopback(configuration.http.host)) return;
  const database = connectDatabase({ url: source.url, log, name: 'tareline seed' });
  try {
    const signIns = await seedIfEmpty(database.db, demo);
    if (signIns !== undefined) keepSignIns(source.signInFile, signIns);
  } finally {
    await database.close();
  }
}

/**
 * The database of the server: a foreign one where DATABASE_URL names it, else the private one of this checkout;
 * brought up to date, and filled with the demo where it is empty.
 *
 * @throws SetupFailure, SchemaMismatchError
 */
export async function prepareDatabase(options: PrepareOptions): Promise<PreparedDatabase> {
  const source = foreignSource(options.configuration) ?? (await privateSource());
  try {
    if (await migrate(source)) say('the database was brought up to date');
    await seedDemo(source, options);
  } catch (error) {
    await source.stop();
    throw error;
  }
  return { ...source, signIns: keptSignIns(source.signInFile) };
}
