import { join } from 'node:path';
import { ensureBuilt } from '../../server/start/build';
import type { Child } from '../../server/start/children';
import { DATABASE } from '../../server/start/databases';
import type { ClusterAddress } from '../../server/start/databases';
import { remakeDatabase } from '../../server/start/demo-data';
import { freePort } from '../../server/start/ports';
import type { Cluster } from '../../server/start/postgres';
import { BUNDLED, serve } from '../../server/start/serve';
import { privateSettings } from '../../server/start/settings';
import { startTestCluster } from '../../server/start/test-cluster';

/** Where stories find the program; plain data, kept in the file named by BRIMLINE_E2E_ENV. */
export type AppPlace = {
  baseUrl: string;
  /** Page with the mail the program sent. */
  mailboxUrl: string;
  /** Owner of the schema: stories make their hospital through it. */
  ownerUrl: string;
  appUrl: string;
  /** Superuser on the program's own database: looks past row-level security. */
  superUrl: string;
  /** What server/clock.ts reads; written to move the server's clock. */
  clockFile: string;
  cluster: ClusterAddress;
};

/** A built Brimline on a cluster of its own, empty of hospitals. */
export type RunningApp = {
  place: AppPlace;
  folder: string;
  cluster: Cluster;
  stopServer(): Promise<void>;
  /** Starts the server again after `stopServer`, with the same settings. */
  startServer(): Promise<void>;
  /** Ends the server as a crash would. */
  killServer(): Promise<void>;
  stop(): Promise<void>;
};

function describePlace(cluster: Cluster, folder: string, port: number): AppPlace {
  const baseUrl = `http://127.0.0.1:${port}`;
  const superUrl = new URL(cluster.superUrl);
  superUrl.pathname = `/${DATABASE}`;
  return {
    baseUrl,
    mailboxUrl: `${baseUrl}/mailbox`,
    ownerUrl: cluster.ownerUrl(DATABASE),
    appUrl: cluster.appUrl(DATABASE),
    superUrl: superUrl.href,
    clockFile: join(folder, 'clock'),
    cluster: cluster.address,
  };
}

/** Starts cluster and server of this process; `changes` go over the server's settings. */
export async function startRunning(changes: NodeJS.ProcessEnv = {}): Promise<RunningApp> {
  await ensureBuilt();
  const { cluster, folder, destroy } = await startTestCluster();
  await remakeDatabase(cluster);
  const port = await freePort();
  const place = describePlace(cluster, folder, port);
  const env = {
    ...privateSettings(cluster, { nodeEnv: 'test', port }),
    BRIMLINE_CLOCK_FILE: place.clockFile,
    ...changes,
  };
  let server: Child | undefined = await serve(BUNDLED, env);
  const end = async (graceMs?: number) => {
    await server?.stop(graceMs);
    server = undefined;
  };
  return {
    place,
    folder,
    cluster,
    stopServer: () => end(),
    killServer: () => end(0),
    async startServer() {
      server ??= await serve(BUNDLED, env);
    },
    async stop() {
      await end();
      await destroy();
    },
  };
}
