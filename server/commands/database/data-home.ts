import { createHash } from 'node:crypto';
import { existsSync, lstatSync, realpathSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { SetupFailure } from '../bootstrap/setup-failure.mjs';
import { makePassable } from './cluster';
import { canEnter, type SystemUser } from './system-user';

const FALLBACK_PARENT = '/var/tmp';

/** Another user of the machine could have made a folder of that name first. */
function requireOwn(folder: string): void {
  const state = lstatSync(folder, { throwIfNoEntry: false });
  if (state === undefined || (state.isDirectory() && state.uid === process.getuid?.())) return;
  throw new SetupFailure(`${folder} belongs to somebody else; remove it`);
}

/**
 * The folder of a checkout's private database: inside the checkout, or, where the server's user cannot reach
 * that (a checkout below root's home), in /var/tmp under a name made from the checkout's path.
 *
 * @param root of the checkout
 */
export function dataHome(root: string, user: SystemUser | undefined): string {
  const inside = join(root, '.data');
  const digest = createHash('sha256').update(realpathSync(root)).digest('hex').slice(0, 12);
  const outside = join(FALLBACK_PARENT, `tareline-${digest}`);
  const holds = (home: string) => existsSync(join(home, 'postgres'));
  const home = holds(inside) || (!holds(outside) && canEnter(user, root)) ? inside : outside;
  requireOwn(home);
  makePassable(home);
  return home;
}
