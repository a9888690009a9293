import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { useRoutes } from '../support/test-routes';

const folder = mkdtempSync(join(tmpdir(), 'tareline-pages-'));
mkdirSync(join(folder, 'media'));
writeFileSync(join(folder, 'index.html'), '<app-root ngCspNonce="CSP_NONCE"></app-root>');
writeFileSync(join(folder, 'main-ABCD2345.js'), '"script"');
writeFileSync(join(folder, 'media', 'mark.svg'), '<svg xmlns="http://www.w3.org/2000/svg"/>');
afterAll(() => rmSync(folder, { recursive: true }));

const html = { headers: { accept: 'text/html,application/xhtml+xml' } };

describe('built pages', () => {
  const server = useRoutes([], { pages: folder });

  it.each(['/', '/products', '/products/7/variants'])('answer %s with the document', async (path) => {
    const answer = await server().client.get(path, html);
    expect([answer.status, answer.headers['content-type']]).toEqual([200, 'text/html; charset=utf-8']);
    expect(answer.headers['cache-control']).toBe('no-store');
  });

  it('carry the nonce of their own response', async () => {
    const nonceOf = async () => {
      const { text, headers } = await server().client.get('/', html);
      const [, nonce] = /ngCspNonce="([^"]+)"/.exec(text) ?? [];
      expect(headers['content-security-policy']).toContain(`style-src 'self' 'nonce-${nonce}'`);
      return nonce;
    };
    expect(await nonceOf()).not.toBe(await nonceOf());
  });

  it('are protected by the policy, without inline styles or scripts', async () => {
    const { headers } = await server().client.get('/', html);
    const policy = headers['content-security-policy'];
    expect(policy).toContain("default-src 'none';script-src 'self';");
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).not.toMatch(/unsafe|upgrade/);
    expect(headers).toMatchObject({
      'x-content-type-options': 'nosniff',
      'x-frame-options': 'DENY',
      'referrer-policy': 'no-referrer',
      'cross-origin-opener-policy': 'same-origin',
    });
    expect(headers).not.toHaveProperty('x-powered-by');
    expect(headers).not.toHaveProperty('strict-transport-security');
  });

  it('bring their files, those with a hash in the name for good', async () => {
    const script = await server().client.get('/main-ABCD2345.js');
    expect([script.text, script.headers['cache-control']]).toEqual([
      '"script"',
      expect.stringContaining('immutable'),
    ]);
    const mark = await server().client.get('/media/mark.svg');
    expect(mark.headers).toMatchObject({ 'content-type': 'image/svg+xml', 'cache-control': 'no-cache' });
  });

  it('never show the document without its nonce', async () => {
    const answer = await server().client.get('/index.html', html);
    expect([answer.status, answer.headers.location]).toEqual([302, '/']);
  });

  it.each(['/missing-ABCD2345.js', '/../package.json', '/%2e%2e/package.json'])(
    'answer 404 for %s',
    async (path) => {
      expect((await server().client.get(path, html)).status).toBe(404);
    },
  );

  it('are for browsers: a program that asks for JSON gets a problem', async () => {
    const answer = await server().client.get('/products', { headers: { accept: 'application/json' } });
    expect([answer.status, answer.body]).toMatchObject([404, { code: 'not-found' }]);
  });
});

describe('pages that are not built', () => {
  const server = useRoutes([]);

  it('say so', async () => {
    const answer = await server().client.get('/', html);
    expect([answer.status, answer.text]).toEqual([404, expect.stringContaining('not built')]);
  });
});
