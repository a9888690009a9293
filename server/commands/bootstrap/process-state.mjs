import { readFileSync } from 'node:fs';
import process from 'node:process';

/**
 * Whether a process has ended and only its entry is left, because nobody has asked how it ended. In a container
 * without an init process such entries stay for good.
 *
 * @param {number} pid
 */
function isDefunct(pid) {
  try {
    // "PID (NAME) STATE ...", where the name may hold brackets and blanks of its own.
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    return stat.slice(stat.lastIndexOf(')') + 2).startsWith('Z');
  } catch {
    return false;
  }
}

/**
 * Whether a process of that id lives, whoever owns it.
 *
 * @param {number} pid
 */
export function isAlive(pid) {
  try {
    process.kill(pid, 0);
  } catch (error) {
    if (!(error instanceof Error) || !('code' in error) || error.code !== 'EPERM') return false;
  }
  return !isDefunct(pid);
}
