// The start command: everything that the server needs, then the server, until a signal ends it.
//
// Exit status: 0 stopped by a signal, 1 stopped at once by a second one, 3 it could not be set up.

import process from 'node:process';
import { ENGINE_VERSION } from '../../shared/engine/analysis/engine-version';
import { demoSeed } from '../features/demo';
import { requireFreeAddress, serve } from '../main';
import { type Configuration, readConfiguration } from '../platform/configuration';
import { createLog, type Log, standardError } from '../platform/log';
import { stopOnSignals } from '../platform/shutdown';
import { firstAdministratorLines } from './start/fill-empty-database';
import { prepareDatabase } from './start/prepare-database';
import { signInLines } from './start/sign-ins';
import { reportFailure } from './report-failure';

/** What is running so far, the last one first. */
const started: { stop: () => Promise<void>; abandon: () => void }[] = [];

async function stopAll(): Promise<void> {
  for (const { stop } of started) await stop();
}

async function start(configuration: Configuration, log: Log): Promise<void> {
  const demo = demoSeed({ engineVersion: ENGINE_VERSION });
  const database = await prepareDatabase({ configuration, log, demo });
  started.unshift(database);
  const server = await serve({ configuration, databaseUrl: database.url, log });
  started.unshift({ stop: () => server.stop(), abandon: () => undefined });

  const { signIns, firstAdministrator } = database;
  const lines = [
    `Tareline is ready at ${server.address}`,
    ...signInLines(signIns),
    ...(firstAdministrator === undefined ? [] : firstAdministratorLines(server.address, firstAdministrator)),
  ];
  process.stdout.write(`\n${lines.join('\n')}\n\n`);
}

try {
  const configuration = readConfiguration(process.env);
  const log = createLog(configuration.logLevel, standardError);
  await requireFreeAddress(configuration.http);
  const starting = start(configuration, log);
  stopOnSignals({
    log,
    // What is half started is let come up first: then it is known, and can be stopped.
    stop: () => starting.catch(() => undefined).then(stopAll),
    force: () => started.forEach(({ abandon }) => abandon()),
  });
  await starting.catch(async (error: unknown) => {
    await stopAll();
    throw error;
  });
} catch (error) {
  process.exitCode = reportFailure(error);
}
