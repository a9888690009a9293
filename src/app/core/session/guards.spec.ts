import { describe, expect, it } from 'vitest';
import { ownPath } from './guards';

describe('ownPath', () => {
  it('comes back to where the person was', () => {
    expect(ownPath('/scenarios/1?revision=2')).toBe('/scenarios/1?revision=2');
  });

  it.each([null, '', 'https://elsewhere.example', '//elsewhere.example', '/\\elsewhere.example'])(
    'leads nowhere else: %s',
    (then) => {
      expect(ownPath(then)).toBe('/');
    },
  );
});
