import { describe, expect, it } from 'vitest';
import { ConfigurationError, readConfiguration, servesThisMachineOnly } from './configuration';

describe('readConfiguration', () => {
  it('serves on loopback at port 4300 with a database of its own where nothing is said', () => {
    expect(readConfiguration({})).toEqual({
      http: { host: '127.0.0.1', port: 4300, origin: undefined, trustedProxies: [] },
      database: { url: undefined, ownerUrl: undefined },
      mail: undefined,
      administratorEmail: undefined,
      logLevel: 'info',
    });
  });

  it('takes an empty variable for one that is not set', () => {
    expect(readConfiguration({ PORT: '', HOST: '', DATABASE_URL: '' })).toEqual(readConfiguration({}));
  });

  it('trusts a proxy on the same machine where an origin is stated', () => {
    const { http } = readConfiguration({
      HOST: '0.0.0.0',
      PORT: '80',
      PUBLIC_ORIGIN: 'https://Tareline.example/',
    });
    expect(http).toEqual({
      host: '0.0.0.0',
      port: 80,
      origin: 'https://tareline.example',
      trustedProxies: ['loopback'],
    });
  });

  it('trusts the proxies that are named', () => {
    const { http } = readConfiguration({ TRUSTED_PROXIES: '10.0.0.0/8, 192.0.2.7' });
    expect(http.trustedProxies).toEqual(['10.0.0.0/8', '192.0.2.7']);
  });

  it('sends mail where a server and a sender are named', () => {
    const environment = { SMTP_URL: 'smtp://mail.example', MAIL_FROM: 'tareline@example.com' };
    expect(readConfiguration(environment).mail).toEqual({
      smtpUrl: 'smtp://mail.example',
      from: 'tareline@example.com',
    });
  });

  it.each(['127.0.0.1', '127.8.8.8', 'localhost', '::1'])('takes %s for loopback', (HOST) => {
    expect(readConfiguration({ HOST }).http.host).toBe(HOST);
  });

  it.each([
    [{ HOST: '192.0.2.1' }, /set PUBLIC_ORIGIN/],
    [{ HOST: '127.0.0.1.example' }, /set PUBLIC_ORIGIN/],
    [{ PORT: '-1' }, /PORT must be/],
    [{ PORT: '4e3' }, /PORT must be/],
    [{ PUBLIC_ORIGIN: 'https://a.example/path' }, /PUBLIC_ORIGIN must be an address without a path/],
    [{ DATABASE_OWNER_URL: 'postgres://a@b/c' }, /DATABASE_OWNER_URL is of no use/],
    [{ SMTP_URL: 'smtp://a' }, /MAIL_FROM must be set/],
    [{ ADMINISTRATOR_EMAIL: 'somebody' }, /ADMINISTRATOR_EMAIL must be an e-mail address/],
  ])('refuses %j', (environment, message) => {
    expect(() => readConfiguration(environment)).toThrow(ConfigurationError);
    expect(() => readConfiguration(environment)).toThrow(message);
  });

  it('names every fault, not only the first', () => {
    expect(() => readConfiguration({ PORT: 'x', LOG_LEVEL: 'loud' })).toThrow(/PORT[^]*LOG_LEVEL/);
  });
});

describe('servesThisMachineOnly', () => {
  it.each([
    [{}, true],
    [{ HOST: '::1' }, true],
    [{ PUBLIC_ORIGIN: 'http://localhost:8080' }, true],
    [{ PUBLIC_ORIGIN: 'https://[::1]' }, true],
    [{ PUBLIC_ORIGIN: 'https://tareline.example' }, false],
    [{ PUBLIC_ORIGIN: 'https://localhost.example' }, false],
    [{ HOST: '0.0.0.0', PUBLIC_ORIGIN: 'https://tareline.example' }, false],
    // Whoever reaches the host comes in, whatever browsers are to use.
    [{ HOST: '0.0.0.0', PUBLIC_ORIGIN: 'https://localhost' }, false],
  ])('of %j is %s', (environment, expected) => {
    expect(servesThisMachineOnly(readConfiguration(environment).http)).toBe(expected);
  });
});
