import { spawnSync } from 'node:child_process';
import { chmodSync, existsSync, mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { Client } from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openPrivateDatabase, stopPrivateDatabase } from '../../../server/commands/database/private-database';

/** A folder that the database's own user can enter, or not. */
function makeCheckout(mode: number): string {
  const root = mkdtempSync(join(tmpdir(), 'tareline-checkout-'));
  chmodSync(root, mode);
  return root;
}

async function discard(root: string, home: string): Promise<void> {
  await stopPrivateDatabase(root);
  rmSync(root, { recursive: true, force: true });
  rmSync(home, { recursive: true, force: true });
}

async function ask(url: string, statement: string): Promise<Record<string, unknown>[]> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    return (await client.query<Record<string, unknown>>(statement)).rows;
  } finally {
    await client.end();
  }
}

const pidOf = (home: string) =>
  Number(readFileSync(join(home, 'postgres', 'postmaster.pid'), 'utf8').split('\n')[0]);

/** A process id that nobody has: of a process that has ended. */
function deadPid(): number {
  return spawnSync('true').pid;
}

describe('the private database of a checkout', () => {
  let root: string;
  beforeAll(() => {
    root = makeCheckout(0o755);
  });
  afterAll(() => discard(root, join(root, '.data')));
  const open = () => openPrivateDatabase(root);

  it('is made on loopback, with passwords, durable, for two roles', async () => {
    const { home, url, ownerUrl } = await open();
    expect(home).toBe(join(root, '.data'));
    const [settings] = await ask(
      ownerUrl,
      `select current_setting('listen_addresses') as addresses, current_setting('unix_socket_directories') as sockets,
        current_setting('fsync') as fsync, current_setting('password_encryption') as encryption`,
    );
    expect(settings).toEqual({
      addresses: '127.0.0.1',
      sockets: '',
      fsync: 'on',
      encryption: 'scram-sha-256',
    });
    for (const file of ['owner-password', 'application-password']) {
      expect(statSync(join(home, file)).mode & 0o777).toBe(0o600);
    }
    const [role] = await ask(
      url,
      'select current_user as name, rolsuper from pg_roles where rolname = current_user',
    );
    expect(role).toEqual({ name: 'tareline_app', rolsuper: false });
    const wrong = new URL(url);
    wrong.password = 'guessed';
    await expect(ask(wrong.href, 'select 1')).rejects.toThrow(/password authentication failed/);
  });

  it('keeps its rows, port and passwords over a stop', async () => {
    const first = await open();
    await ask(first.ownerUrl, 'create table kept as select 7 as value');
    await first.stop();
    expect(existsSync(join(first.home, 'postgres', 'postmaster.pid'))).toBe(false);
    const second = await open();
    expect(second.url).toBe(first.url);
    expect(await ask(second.ownerUrl, 'select value from kept')).toEqual([{ value: 7 }]);
  });

  it('is taken over where the process that started it was killed', async () => {
    const killed = await open();
    const pid = pidOf(killed.home);
    writeFileSync(join(killed.home, 'keeper'), String(deadPid()));
    const next = await open();
    expect(pidOf(next.home)).toBe(pid);
    await next.stop();
    await expect(ask(next.url, 'select 1')).rejects.toThrow(/ECONNREFUSED/);
  });

  it('is left running where another living process has started it', async () => {
    const { home } = await open();
    writeFileSync(join(home, 'keeper'), String(process.ppid));
    const guest = await open();
    await guest.stop();
    expect(await ask(guest.url, 'select 1 as one')).toEqual([{ one: 1 }]);
    rmSync(join(home, 'keeper'));
  });

  it('starts although its server was killed and left its file behind', async () => {
    const first = await open();
    await ask(first.ownerUrl, 'create table written as select 8 as value');
    process.kill(pidOf(first.home), 'SIGKILL');
    await expect.poll(() => ask(first.url, 'select 1').catch(() => 'gone')).toBe('gone');
    const second = await open();
    expect(await ask(second.ownerUrl, 'select value from written')).toEqual([{ value: 8 }]);
  });
});

describe('the private database of a checkout that the server cannot reach', () => {
  it.runIf(process.getuid?.() === 0)('lies elsewhere', async () => {
    const root = makeCheckout(0o700);
    const { home, url } = await openPrivateDatabase(root);
    try {
      expect(dirname(home)).toBe('/var/tmp');
      expect(await ask(url, 'select 1 as one')).toEqual([{ one: 1 }]);
    } finally {
      await discard(root, home);
    }
  });
});
