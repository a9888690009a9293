import type { TestProject } from 'vitest/node';
import { migrate } from '../../../server/db';
import { APPLICATION_ROLE, ensureDatabase } from '../../../server/db/roles';
import { createTemporaryCluster } from '../../../server/commands/database/temporary-cluster';

/** The database that every test's own is a copy of. */
export const TEMPLATE = 'tareline_template';

/** How to reach the database server of this run: roles and passwords in URLs that name no database of use. */
export interface ProvidedCluster {
  readonly ownerUrl: string;
  readonly applicationUrl: string;
}

declare module 'vitest' {
  export interface ProvidedContext {
    cluster: ProvidedCluster;
  }
}

/** Starts one database server for the run and migrates the template; removes both in the end. */
export default async function setUp(project: TestProject): Promise<() => Promise<void>> {
  const cluster = await createTemporaryCluster();
  const onExit = () => cluster.removeNow();
  const onSignal = () => process.exit(143);
  // A run that is stopped from outside does not reach the teardown.
  process.once('exit', onExit);
  process.once('SIGTERM', onSignal);
  try {
    const ownerUrl = cluster.ownerUrl('postgres');
    await ensureDatabase(ownerUrl, TEMPLATE);
    await migrate({ ownerUrl: cluster.ownerUrl(TEMPLATE), applicationRole: APPLICATION_ROLE });
    project.provide('cluster', { ownerUrl, applicationUrl: cluster.applicationUrl('postgres') });
  } catch (error) {
    await cluster.remove();
    process.off('exit', onExit);
    throw error;
  }
  return async () => {
    await cluster.remove();
    process.off('exit', onExit);
    process.off('SIGTERM', onSignal);
  };
}
