import { describe, expect, it } from 'vitest';
import { requireNodeVersion } from './node-version.mjs';
import { SetupFailure } from './setup-failure.mjs';

describe('requireNodeVersion', () => {
  it.each([
    ['20.19.0', '>=20.19.0 <21'],
    ['20.20.2', '>=20.19.0 <21'],
    ['20.9.0', '>=20.8 <20.10'],
    ['22.0.0', '>=20'],
  ])('lets Node %s through for %s', (version, range) => {
    expect(() => requireNodeVersion(version, range)).not.toThrow();
  });

  it.each([
    ['20.18.9', '>=20.19.0 <21'],
    ['20.9.0', '>=20.19.0 <21'],
    ['21.0.0', '>=20.19.0 <21'],
    ['8.20.0', '>=20.19.0 <21'],
  ])('refuses Node %s for %s', (version, range) => {
    expect(() => requireNodeVersion(version, range)).toThrow(`needs Node ${range}, this is Node ${version}`);
  });

  it('refuses a range that it cannot read', () => {
    expect(() => requireNodeVersion('20.20.0', '^20.19.0')).toThrow(SetupFailure);
  });
});
