import { type ChildProcess, spawn } from 'node:child_process';
import { rmSync, statSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { freshBundle } from '../../../server/commands/bootstrap/bundle.mjs';
import { installPackages } from '../../../server/commands/bootstrap/packages.mjs';
import { foreignSignInFile } from '../../../server/commands/start/prepare-database';
import { packageRoot } from '../../../server/platform/package-root';
import { HttpClient } from '../support/http-client';
import { createTestDatabase, type TestDatabase } from '../support/test-database';

let bundle: string;
beforeAll(async () => {
  const digest = await installPackages(packageRoot);
  await freshBundle(packageRoot, 'engine-worker', 'server/jobs/worker/engine-worker.ts', digest, 'inside');
  bundle = await freshBundle(packageRoot, 'start', 'server/commands/start.ts', digest, 'outside');
});

let testDatabase: TestDatabase;
beforeEach(async () => {
  testDatabase = await createTestDatabase('template0');
});
afterEach(() => testDatabase.drop());

interface Ended {
  readonly status: number | null;
  readonly output: string;
  readonly errors: string;
}

/** The start command under way. */
class Start {
  private output = '';
  private errors = '';
  readonly process: ChildProcess;
  readonly ended: Promise<Ended>;

  constructor(environment: Record<string, string>) {
    this.process = spawn(process.execPath, [bundle], {
      env: { PATH: process.env.PATH, PORT: '0', ADMINISTRATOR_EMAIL: 'ada@example.com', ...environment },
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    this.process.stdout?.on('data', (chunk: Buffer) => (this.output += chunk.toString()));
    this.process.stderr?.on('data', (chunk: Buffer) => (this.errors += chunk.toString()));
    this.ended = new Promise((resolve) => {
      this.process.on('close', (status) => resolve({ status, output: this.output, errors: this.errors }));
    });
  }

  /** Where it is ready, once it says so. */
  address(): Promise<string> {
    return new Promise((resolve, reject) => {
      const look = () => {
        const [, address] = /ready at (\S+)\n/.exec(this.output) ?? [];
        if (address !== undefined) resolve(address);
      };
      this.process.stdout?.on('data', look);
      void this.ended.then(({ errors }) => reject(new Error(`ended before it was ready: ${errors}`)));
      look();
    });
  }
}

const started: Start[] = [];
function start(environment: Record<string, string>): Start {
  const command = new Start(environment);
  started.push(command);
  return command;
}
afterEach(async () => {
  for (const { process: child, ended } of started.splice(0)) {
    child.kill('SIGKILL');
    await ended;
  }
});

const onTwoRoles = () => ({ DATABASE_URL: testDatabase.url, DATABASE_OWNER_URL: testDatabase.ownerUrl });

describe('the start command with a foreign database', () => {
  it.each(['SIGTERM', 'SIGINT'] as const)('migrates it, serves, and stops in order on %s', async (signal) => {
    const command = start(onTwoRoles());
    const client = new HttpClient(await command.address());
    expect((await client.get('/api/health/ready')).status).toBe(200);
    command.process.kill(signal);
    const { status, errors } = await command.ended;
    expect(status).toBe(0);
    expect(errors).not.toContain('only role');
  });

  it('says what guards the audit table where there is one role only', async () => {
    const command = start({ DATABASE_URL: testDatabase.ownerUrl });
    await command.address();
    command.process.kill('SIGTERM');
    expect((await command.ended).errors).toMatch(
      /^tareline: DATABASE_URL is the only role given: .*triggers alone/m,
    );
  });

  it('takes the port that it is given', async () => {
    const first = start(onTwoRoles());
    const port = new URL(await first.address()).port;
    first.process.kill('SIGTERM');
    await first.ended;
    const second = start({ ...onTwoRoles(), PORT: port });
    expect(await second.address()).toBe(`http://127.0.0.1:${port}`);
  });

  it('never writes passwords of the database into its log', async () => {
    const command = start({ ...onTwoRoles(), LOG_LEVEL: 'debug' });
    await command.address();
    command.process.kill('SIGTERM');
    const { output, errors } = await command.ended;
    for (const url of [testDatabase.url, testDatabase.ownerUrl]) {
      expect(output + errors).not.toContain(new URL(url).password);
    }
  });
});

describe('what the start command prints for an empty database', () => {
  const printed = async (environment: Record<string, string>): Promise<string> => {
    const command = start({ ...onTwoRoles(), ...environment });
    await command.address();
    command.process.kill('SIGTERM');
    return (await command.ended).output;
  };

  it('is the sign-ins of the demo, the same at every start, kept for the present user alone', async () => {
    const file = foreignSignInFile(join(packageRoot, '.data'), testDatabase.url);
    try {
      const demo = { ADMINISTRATOR_EMAIL: '' };
      const lines = (output: string) => output.trim().split('\n').slice(1);
      const first = lines(await printed(demo));
      expect(first).toHaveLength(5);
      expect(first[0]).toMatch(/^maren@quernholm\.example {2}(?:[a-z]{4}-){4}[a-z]{4} {2}administrator$/);
      expect(statSync(file).mode & 0o777).toBe(0o600);
      expect(lines(await printed(demo))).toEqual(first);
    } finally {
      rmSync(file, { force: true });
    }
  });

  it('is a link for the first administrator where other machines reach the server, and never in the log', async () => {
    const command = start({
      ...onTwoRoles(),
      ...{ ADMINISTRATOR_EMAIL: '', PUBLIC_ORIGIN: 'https://tareline.example', LOG_LEVEL: 'debug' },
    });
    await command.address();
    command.process.kill('SIGTERM');
    const { output, errors } = await command.ended;
    expect(output).toContain('administrator@tareline.example');
    const [, token] = /^https:\/\/tareline\.example\/invitation\/([\w-]{43})$/m.exec(output) ?? [];
    expect(token).toBeDefined();
    expect(errors).not.toContain(token);
  });
});

describe('the start command refuses in one line', () => {
  let taken: Server;
  let port: number;
  beforeAll(async () => {
    taken = createServer();
    await new Promise<void>((resolve) => taken.listen(0, '127.0.0.1', resolve));
    ({ port } = taken.address() as AddressInfo);
  });
  afterAll(() => taken.close());

  async function refusal(environment: Record<string, string>): Promise<string> {
    const { status, output, errors } = await start(environment).ended;
    expect([status, output]).toEqual([3, '']);
    expect(errors.trimEnd().split('\n')).toHaveLength(1);
    return errors;
  }

  it('a port that is taken, with the remedy', async () => {
    const line = await refusal({ ...onTwoRoles(), PORT: String(port) });
    expect(line).toMatch(new RegExp(`port ${port} on 127\\.0\\.0\\.1 is taken; .*PORT=\\d+ npm start`));
  });

  it.each([
    ['a host that others reach, without https', { HOST: '0.0.0.0' }, /set PUBLIC_ORIGIN/],
    [
      'a host that others reach, with a plain origin',
      { HOST: '0.0.0.0', PUBLIC_ORIGIN: 'http://a.example' },
      /https/,
    ],
    ['a port that is none', { PORT: '70000' }, /PORT must be a number/],
    [
      'an address that is no database',
      { DATABASE_URL: 'mysql://a' },
      /DATABASE_URL must be a URL that begins with postgres/,
    ],
  ])('%s', async (_what, environment, expected) => {
    expect(await refusal({ ...onTwoRoles(), ...environment })).toMatch(expected);
  });
});
