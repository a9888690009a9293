import { type ChildProcess, spawn } from 'node:child_process';
import process from 'node:process';
import { createInterface } from 'node:readline';
import { freshBundle } from '../../../server/commands/bootstrap/bundle.mjs';
import { installPackages } from '../../../server/commands/bootstrap/packages.mjs';
import type { TestDatabase } from '../../api/support/test-database';
import { ROOT } from '../../commands/support/example-studies';

/** The server as `npm start` runs it, without the pages. */
export interface ServerProcess {
  readonly address: string;
  /** Ends it as a power cut would. */
  kill(): Promise<void>;
  /** Ends it in order. */
  stop(): Promise<number | null>;
}

async function buildServer(): Promise<string> {
  const lockDigest = await installPackages(ROOT);
  await freshBundle(ROOT, 'engine-worker', 'server/jobs/worker/engine-worker.ts', lockDigest, 'inside');
  return freshBundle(ROOT, 'start', 'server/commands/start.ts', lockDigest, 'outside');
}

function ended(child: ChildProcess): Promise<number | null> {
  return new Promise((resolve) => {
    if (child.exitCode !== null || child.signalCode !== null) resolve(child.exitCode);
    else child.once('exit', resolve);
  });
}

/** Starts the server in a process of its own, from the bundles that people run, and waits until it is ready. */
export async function startServerProcess({ url, ownerUrl }: TestDatabase): Promise<ServerProcess> {
  const file = await buildServer();
  const child = spawn(process.execPath, [file], {
    cwd: ROOT,
    env: {
      PATH: process.env.PATH,
      DATABASE_URL: url,
      DATABASE_OWNER_URL: ownerUrl,
      PORT: '0',
      // No demo, whose runs would come first.
      ADMINISTRATOR_EMAIL: 'ada@example.com',
      LOG_LEVEL: 'warn',
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const messages: string[] = [];
  child.stderr.on('data', (chunk: Buffer) => messages.push(chunk.toString()));
  const onExit = () => child.kill('SIGKILL');
  process.once('exit', onExit);
  const end = async (signal: NodeJS.Signals) => {
    child.kill(signal);
    const status = await ended(child);
    process.off('exit', onExit);
    return status;
  };
  for await (const line of createInterface(child.stdout)) {
    const address = /http:\S+/.exec(line)?.[0];
    if (address === undefined) continue;
    return {
      address,
      kill: async () => void (await end('SIGKILL')),
      stop: () => end('SIGTERM'),
    };
  }
  throw new Error(`the server did not start: ${messages.join('')}`);
}
