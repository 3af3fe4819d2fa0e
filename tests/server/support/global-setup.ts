import type { TestProject } from 'vitest/node';
import type { ClusterAddress } from '../../../server/start/databases';
import { migrateDatabase } from '../../../server/start/demo-data';
import { removeAbandoned, startTestCluster } from '../../../server/start/test-cluster';
import type { TestCluster } from '../../../server/start/test-cluster';

declare module 'vitest' {
  export interface ProvidedContext {
    cluster: ClusterAddress;
  }
}

/** Migrated once; every database of the tests is a copy of it. */
export const TEMPLATE = 'brimline_template';
export const SHARED = 'brimline_shared';

let running: TestCluster | undefined;

export async function setup(project: TestProject): Promise<void> {
  await removeAbandoned();
  running = await startTestCluster();
  const { cluster } = running;
  await cluster.createDatabase(TEMPLATE);
  await migrateDatabase(cluster.ownerUrl(TEMPLATE));
  await cluster.createDatabase(SHARED, TEMPLATE);
  project.provide('cluster', cluster.address);
}

export async function teardown(): Promise<void> {
  await running?.destroy();
}
