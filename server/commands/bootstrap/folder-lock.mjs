import { mkdirSync, mkdtempSync, readdirSync, renameSync, rmdirSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import process from 'node:process';
import { setTimeout as wait } from 'node:timers/promises';
import { isAlive } from './process-state.mjs';

const POLL_MS = 100;

/** @param {unknown} error */
function codeOf(error) {
  return error instanceof Error && 'code' in error ? error.code : undefined;
}

/**
 * The lock is a folder that holds one empty file named after its owner's process id. A folder prepared aside
 * is renamed into place: that succeeds only where there is no lock folder, or an empty one, so the lock never
 * exists without its owner's name.
 *
 * @param {string} lock
 * @returns {boolean} whether this process owns the lock now
 */
function tryAcquire(lock) {
  const prepared = mkdtempSync(`${lock}-`);
  writeFileSync(join(prepared, String(process.pid)), '');
  try {
    renameSync(prepared, lock);
    return true;
  } catch (error) {
    rmSync(prepared, { recursive: true });
    if (codeOf(error) === 'ENOTEMPTY' || codeOf(error) === 'EEXIST') return false;
    throw error;
  }
}

/**
 * Takes the names of dead owners out of the lock. Removing the one file that names a dead process can never
 * hit a lock that a living process has taken in the meantime.
 *
 * @param {string} lock
 * @returns {number | undefined} the living owner, if there is one
 */
function livingOwner(lock) {
  /** @type {string[]} */
  let owners = [];
  try {
    owners = readdirSync(lock);
  } catch (error) {
    if (codeOf(error) !== 'ENOENT') throw error;
  }
  for (const owner of owners) {
    // A lock that carries this process's own id while it is still waiting was left by an earlier holder of it.
    if (Number(owner) !== process.pid && isAlive(Number(owner))) return Number(owner);
    rmSync(join(lock, owner), { force: true });
  }
  return undefined;
}

/** @param {string} lock */
function release(lock) {
  rmSync(join(lock, String(process.pid)), { force: true });
  try {
    rmdirSync(lock);
  } catch (error) {
    // Another process may own the folder already: an emptied one is free to be taken.
    if (codeOf(error) !== 'ENOTEMPTY' && codeOf(error) !== 'EEXIST' && codeOf(error) !== 'ENOENT')
      throw error;
  }
}

/**
 * Runs work while holding a lock between processes; waits for a living owner and takes over from a dead one.
 *
 * @template T
 * @param {string} lock path of the lock folder
 * @param {string} purpose what is waited for, shown once while waiting
 * @param {() => T | Promise<T>} work
 * @returns {Promise<T>}
 */
export async function withFolderLock(lock, purpose, work) {
  mkdirSync(dirname(lock), { recursive: true });
  let told = false;
  while (!tryAcquire(lock)) {
    const owner = livingOwner(lock);
    if (owner === undefined) continue;
    if (!told)
      process.stderr.write(`tareline: ${purpose} is under way in process ${owner}, waiting (${lock})\n`);
    told = true;
    await wait(POLL_MS);
  }
  try {
    return await work();
  } finally {
    release(lock);
  }
}
