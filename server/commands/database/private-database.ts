import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { APPLICATION_ROLE, ensureApplicationRole, ensureDatabase } from '../../db/roles';
import { withFolderLock } from '../bootstrap/folder-lock.mjs';
import { isAlive } from '../bootstrap/process-state.mjs';
import {
  type Cluster,
  createCluster,
  findRunning,
  OWNER_ROLE,
  type RunningServer,
  signalStop,
  startCluster,
  stopCluster,
  urlOf,
} from './cluster';
import { dataHome } from './data-home';
import { isPortFree } from './free-port';
import { requirePrograms } from './programs';
import { keptPassword } from './secret-file';
import { serverUser } from './system-user';

const DATABASE = 'tareline';

/** A database that is ready for connections. */
export interface ReadyDatabase {
  /** For migrations. */
  readonly ownerUrl: string;
  /** For server and workers. */
  readonly url: string;
  /** Where secrets of this installation are kept, for the present user's eyes only. */
  readonly home: string;
  /** Ends what was started for this process; without effect where the server is somebody else's. */
  stop(): Promise<void>;
  /** The same, without waiting. */
  abandon(): void;
}

interface Files {
  readonly home: string;
  readonly data: string;
  readonly ownerPassword: string;
  readonly applicationPassword: string;
  readonly port: string;
  readonly keeper: string;
}

function filesIn(home: string): Files {
  return {
    home,
    data: join(home, 'postgres'),
    ownerPassword: join(home, 'owner-password'),
    applicationPassword: join(home, 'application-password'),
    port: join(home, 'port'),
    keeper: join(home, 'keeper'),
  };
}

function readNumber(file: string): number | undefined {
  return existsSync(file) ? Number(readFileSync(file, 'utf8')) : undefined;
}

/** The major version that made the data, undefined where there are none yet. */
function madeBy(data: string): number | undefined {
  return readNumber(join(data, 'PG_VERSION'));
}

function locate(root: string): { files: Files; cluster: Cluster } {
  // As root the packages must be there before the user that they make.
  let programs = requirePrograms();
  const user = serverUser();
  const files = filesIn(dataHome(root, user));
  const major = madeBy(files.data);
  if (major !== undefined && major !== programs.major) programs = requirePrograms(major);
  return { files, cluster: { data: files.data, programs, user } };
}

async function rememberedPort(file: string): Promise<number | undefined> {
  const port = readNumber(file);
  return port !== undefined && (await isPortFree(port)) ? port : undefined;
}

/**
 * Whether this process is the one that stops the server in the end: it is, unless a living process is already.
 * So a server that outlived the process which started it is taken over.
 */
function becomeKeeper(file: string): boolean {
  const keeper = readNumber(file);
  if (keeper !== undefined && keeper !== process.pid && isAlive(keeper)) return false;
  writeFileSync(file, String(process.pid));
  return true;
}

/**
 * The private database of a checkout, made, started and given its roles as far as that is still to be done.
 *
 * @param root of the checkout
 * @throws SetupFailure that says what to do
 */
export async function openPrivateDatabase(root: string): Promise<ReadyDatabase> {
  const { files, cluster } = locate(root);
  return withFolderLock(join(files.home, 'lock'), 'preparing the database', async () => {
    const ownerPassword = keptPassword(files.ownerPassword);
    const applicationPassword = keptPassword(files.applicationPassword);
    if (madeBy(files.data) === undefined) {
      await createCluster(cluster, { ownerPassword, settings: [] });
    }
    const server = findRunning(cluster) ?? (await startCluster(cluster, await rememberedPort(files.port)));
    writeFileSync(files.port, String(server.port));
    const keeps = becomeKeeper(files.keeper);
    await ensureDatabase(urlOf(server.port, OWNER_ROLE, ownerPassword, 'postgres'), DATABASE);
    const ownerUrl = urlOf(server.port, OWNER_ROLE, ownerPassword, DATABASE);
    await ensureApplicationRole(ownerUrl, applicationPassword);
    return {
      ownerUrl,
      url: urlOf(server.port, APPLICATION_ROLE, applicationPassword, DATABASE),
      home: files.home,
      ...endings(cluster, server, files, keeps),
    };
  });
}

function endings(cluster: Cluster, server: RunningServer, files: Files, keeps: boolean) {
  return {
    stop: async () => {
      if (!keeps) return;
      await stopCluster(cluster);
      rmSync(files.keeper, { force: true });
    },
    abandon: () => {
      if (keeps) signalStop(server);
    },
  };
}

/** Stops the private database of a checkout, whoever started it. Tells whether one ran. */
export async function stopPrivateDatabase(root: string): Promise<boolean> {
  const { files, cluster } = locate(root);
  if (madeBy(files.data) === undefined || findRunning(cluster) === undefined) return false;
  await stopCluster(cluster);
  rmSync(files.keeper, { force: true });
  return true;
}
