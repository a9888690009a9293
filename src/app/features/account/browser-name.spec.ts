import { describe, expect, it } from 'vitest';
import { browserName } from './browser-name';

describe('browserName', () => {
  it('names browser and system', () => {
    expect(browserName('Mozilla/5.0 (X11; Linux x86_64; rv:140.0) Gecko/20100101 Firefox/140.0')).toBe(
      'Firefox on Linux',
    );
    expect(
      browserName(
        'Mozilla/5.0 (Windows NT 10.0; Win64; x64) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/140.0 Safari/537.36 Edg/140.0',
      ),
    ).toBe('Edge on Windows');
  });

  it('shows what it does not know', () => {
    expect(browserName('curl/8.5')).toBe('curl/8.5');
    expect(browserName('')).toBe('Unknown program');
  });
});
