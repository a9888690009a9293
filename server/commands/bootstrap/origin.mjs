import { readFileSync, renameSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';

/**
 * What something built was made from: the packages, and of each source its size and time of change. Equality with
 * what is found decides, not "newer than": a file brought back from an older revision is a change too.
 *
 * @typedef {{ lockDigest: string, sources: Record<string, string> }} Origin
 */

/**
 * @param {string} root
 * @param {string} source
 */
function stateOf(root, source) {
  const stat = statSync(join(root, source), { throwIfNoEntry: false });
  return stat === undefined ? 'missing' : `${stat.size} ${stat.mtimeMs}`;
}

/**
 * @param {string} originFile
 * @returns {Origin | undefined}
 */
export function readOrigin(originFile) {
  try {
    return JSON.parse(readFileSync(originFile, 'utf8'));
  } catch {
    return undefined;
  }
}

/**
 * Whether packages and sources are those that something was made from.
 *
 * @param {string} root
 * @param {Origin | undefined} origin
 * @param {string} lockDigest
 */
export function isUnchanged(root, origin, lockDigest) {
  if (origin?.lockDigest !== lockDigest) return false;
  return Object.entries(origin.sources).every(([source, state]) => state === stateOf(root, source));
}

/**
 * @param {string} root
 * @param {readonly string[]} sources from the root
 * @param {string} lockDigest
 * @param {number} started when the building began, in milliseconds
 * @returns {Origin}
 */
export function originOf(root, sources, lockDigest, started) {
  /** @type {Origin} */
  const origin = { lockDigest, sources: {} };
  for (const source of sources) {
    // What was changed while it was being read must be read again.
    const changed = (statSync(join(root, source), { throwIfNoEntry: false })?.mtimeMs ?? Infinity) >= started;
    origin.sources[source] = changed ? 'changed while building' : stateOf(root, source);
  }
  return origin;
}

/**
 * @param {string} file
 * @param {string | Uint8Array} content
 */
export function replaceFile(file, content) {
  const prepared = `${file}.${process.pid}`;
  writeFileSync(prepared, content);
  renameSync(prepared, file);
}
