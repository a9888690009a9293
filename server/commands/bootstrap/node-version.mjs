import { SetupFailure } from './setup-failure.mjs';

/**
 * @param {string} version
 * @returns {number[]} major, minor and patch
 */
function parts(version) {
  const [major = 0, minor = 0, patch = 0] = version.split('.').map((part) => Number.parseInt(part, 10));
  return [major, minor, patch];
}

/**
 * @param {string} left
 * @param {string} right
 * @returns {number} negative where left is the older version, zero where they are equal
 */
function compare(left, right) {
  const a = parts(left);
  const b = parts(right);
  const differing = a.findIndex((part, i) => part !== b[i]);
  return differing < 0 ? 0 : a[differing] - b[differing];
}

/**
 * Refuses a Node version outside a range of the form that package.json uses: terms `>=A.B.C` and `<A.B.C`,
 * separated by blanks, all of which must hold.
 *
 * @param {string} version such as 20.19.0
 * @param {string} range
 * @throws {SetupFailure} where the version lies outside the range, or the range has another form
 */
export function requireNodeVersion(version, range) {
  for (const term of range.trim().split(/\s+/)) {
    const [, operator, bound] = /^(>=|<)(\d+(?:\.\d+){0,2})$/.exec(term) ?? [];
    if (operator === undefined || bound === undefined) {
      throw new SetupFailure(`package.json: engines.node has the unknown term "${term}"`);
    }
    const order = compare(version, bound);
    if (operator === '>=' ? order < 0 : order >= 0) {
      throw new SetupFailure(`needs Node ${range}, this is Node ${version}`);
    }
  }
}
