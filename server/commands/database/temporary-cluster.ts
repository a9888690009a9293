import { mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import process from 'node:process';
import { APPLICATION_ROLE, ensureApplicationRole } from '../../db/roles';
import { isAlive } from '../bootstrap/process-state.mjs';
import {
  type Cluster,
  createCluster,
  findRunning,
  makePassable,
  OWNER_ROLE,
  startCluster,
  stopCluster,
  urlOf,
} from './cluster';
import { requirePrograms } from './programs';
import { newPassword } from './secret-file';
import { serverUser } from './system-user';

const PREFIX = 'tareline-test-';

/** Nothing here must outlive the run, so nothing waits for a disk. */
const FAST_AND_LOOSE = [
  'fsync = off',
  'synchronous_commit = off',
  'full_page_writes = off',
  'max_wal_senders = 0',
  'wal_level = minimal',
  'shared_buffers = 64MB',
  'autovacuum = off',
];

/** A server for one run of the tests. */
export interface TemporaryCluster {
  /** Connection URL of the owner for a database of that name. */
  ownerUrl(database: string): string;
  /** Connection URL of the application's role. */
  applicationUrl(database: string): string;
  /** Stops the server and removes its data. */
  remove(): Promise<void>;
  /** The same at once, for the moment in which the process ends. */
  removeNow(): void;
}

/** Runs that were killed had no time to clean up; their process ids in the names tell which. */
async function removeLeftovers(programs: Cluster['programs'], user: Cluster['user']): Promise<void> {
  const left = readdirSync(tmpdir()).filter((name) => name.startsWith(PREFIX));
  for (const name of left) {
    const pid = Number(name.slice(PREFIX.length).split('-', 1)[0]);
    if (pid === process.pid || isAlive(pid)) continue;
    const folder = join(tmpdir(), name);
    const cluster = { data: join(folder, 'postgres'), programs, user };
    await stopCluster(cluster);
    rmSync(folder, { recursive: true, force: true });
  }
}

/** @throws SetupFailure where there is no PostgreSQL and none can be installed */
export async function createTemporaryCluster(): Promise<TemporaryCluster> {
  const programs = requirePrograms();
  const user = serverUser();
  await removeLeftovers(programs, user);
  const folder = mkdtempSync(join(tmpdir(), `${PREFIX}${process.pid}-`));
  makePassable(folder);
  const cluster: Cluster = { data: join(folder, 'postgres'), programs, user };
  const ownerPassword = newPassword();
  const applicationPassword = newPassword();
  const removeFolder = () => rmSync(folder, { recursive: true, force: true, maxRetries: 5 });
  try {
    await createCluster(cluster, { ownerPassword, settings: FAST_AND_LOOSE });
    const { pid, port } = await startCluster(cluster);
    const ownerUrl = (database: string) => urlOf(port, OWNER_ROLE, ownerPassword, database);
    await ensureApplicationRole(ownerUrl('postgres'), applicationPassword);
    return {
      ownerUrl,
      applicationUrl: (database) => urlOf(port, APPLICATION_ROLE, applicationPassword, database),
      remove: async () => {
        await stopCluster(cluster);
        removeFolder();
      },
      removeNow: () => {
        process.kill(pid, 'SIGQUIT');
        removeFolder();
      },
    };
  } catch (error) {
    if (findRunning(cluster) !== undefined) await stopCluster(cluster);
    removeFolder();
    throw error;
  }
}
