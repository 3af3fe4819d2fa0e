import { chownSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { run } from './children';
import { findDataFolder, makeEmptyFolder } from './data-folder';
import type { DataFolder } from './data-folder';
import { makeRoles, openDatabases, SUPERUSER } from './databases';
import type { ClusterAddress, Databases } from './databases';
import { isDisposable, stateFolder } from './paths';
import type { Purpose } from './paths';
import { choosePort, rememberedPort, rememberPort } from './ports';
import { findPostmaster } from './postmaster';
import { ensurePostgres, installedMajors, majorFor, programsOf } from './postgres-programs';
import { keepSecrets } from './secrets';
import type { Secrets } from './secrets';
import { Told } from './tell';

/** A private PostgreSQL, listening on 127.0.0.1 only. */
export type Cluster = Databases & {
  address: ClusterAddress;
  /** Stops and starts it on the same port; `immediate` as after a crash, with recovery at the start. */
  restart(how?: 'fast' | 'immediate'): Promise<void>;
  /** Ends it; does nothing when it is not running. */
  stop(how?: 'fast' | 'immediate'): Promise<void>;
  /** Starts it again after `stop`. */
  start(): Promise<void>;
  /** Stops it and removes its data; for tests and screenshots only. */
  destroy(): Promise<void>;
};

/** Where a cluster's files and programs are: enough to stop it. */
type Place = { data: DataFolder; programs: string };

type Site = Place & { purpose: Purpose; secrets: Secrets };

const START_ATTEMPTS = 3;

async function initdb(site: Site): Promise<void> {
  const { data, purpose } = site;
  const folder = makeEmptyFolder(data);
  const passwords = `${folder.path}.password`;
  rmSync(passwords, { force: true });
  writeFileSync(passwords, `${site.secrets.superuser}\n`, { mode: 0o600 });
  if (data.account.uid !== undefined && data.account.gid !== undefined) {
    chownSync(passwords, data.account.uid, data.account.gid);
  }
  const made = await run(
    join(site.programs, 'initdb'),
    [
      ...['-D', folder.path, '-U', SUPERUSER, '--pwfile', passwords, '--auth=scram-sha-256'],
      ...['--encoding=UTF8', '--locale=C.UTF-8', '--data-checksums'],
      ...(isDisposable(purpose) || purpose === 'bench' ? ['--no-sync'] : []),
    ],
    { ...data.account, cwd: '/' },
  );
  rmSync(passwords, { force: true });
  if (made.code !== 0) throw new Told(`The database could not be made:\n${made.stderr}`);
  folder.putInPlace();
}

/** Options of the server. The socket folder of Debian is closed to plain users, so there is no socket. */
function serverOptions(purpose: Purpose, port: number): string {
  const settings = [
    "unix_socket_directories=''",
    'listen_addresses=127.0.0.1',
    `port=${port}`,
    'max_connections=200',
  ];
  // survives a killed process all the same, only not a power cut
  if (isDisposable(purpose)) settings.push('fsync=off', 'full_page_writes=off');
  return settings.map((setting) => `-c ${setting}`).join(' ');
}

async function pgCtl(site: Place, ...args: string[]) {
  return run(join(site.programs, 'pg_ctl'), ['-D', site.data.path, '-w', '-t', '60', ...args], {
    ...site.data.account,
    cwd: '/',
  });
}

const startOn = (site: Site, port: number) =>
  pgCtl(site, '-l', join(site.data.path, 'server.log'), '-o', serverOptions(site.purpose, port), 'start');

/** Starts a stopped cluster; another port is tried when someone took it in between. */
async function startServer(site: Site): Promise<number> {
  const folder = stateFolder(site.purpose);
  let said = '';
  for (let attempt = 0; attempt < START_ATTEMPTS; attempt += 1) {
    const port = await choosePort(folder, 'postgres');
    const started = await startOn(site, port);
    if (started.code === 0) return port;
    said = started.stderr + started.stdout;
  }
  const log = await run('tail', ['-n', '20', join(site.data.path, 'server.log')], {
    ...site.data.account,
    cwd: '/',
  });
  throw new Told(`PostgreSQL does not start.\n${said}\n${log.stdout}`);
}

async function stopServer(site: Place, how: 'fast' | 'immediate'): Promise<void> {
  if ((await findPostmaster(site.data)) === null) return;
  const stopped = await pgCtl(site, '-m', how, 'stop');
  // pg_ctl takes a zombie for a server that does not shut down
  if (stopped.code !== 0 && (await findPostmaster(site.data)) !== null) {
    throw new Error(`PostgreSQL does not stop: ${stopped.stderr.trim()}`);
  }
}

/** A cluster left running by a killed start program is taken over, if it is ours and answers. */
async function adopt(site: Site, port: number): Promise<void> {
  const databases = openDatabases({ port, programs: site.programs, secrets: site.secrets });
  for (let attempt = 0; ; attempt += 1) {
    try {
      const where = await databases.query('show data_directory;');
      if (where !== site.data.path)
        throw new Told(`Port ${port} belongs to another PostgreSQL, in ${where}.`);
      return;
    } catch (error) {
      // it may still be recovering
      if (error instanceof Told || attempt >= 50) throw error;
      await sleep(200);
    }
  }
}

async function bringUp(site: Site): Promise<number> {
  const running = await findPostmaster(site.data);
  if (!running) return startServer(site);
  await adopt(site, running.port);
  rememberPort(stateFolder(site.purpose), 'postgres', running.port);
  return running.port;
}

async function findSite(purpose: Purpose): Promise<Site> {
  await ensurePostgres();
  const data = await findDataFolder(purpose);
  const programs = programsOf(majorFor(data.path, data.major, installedMajors()));
  return { purpose, data, programs, secrets: keepSecrets(stateFolder(purpose), data.major === null) };
}

function makeHandle(site: Site, port: number): Cluster {
  const address: ClusterAddress = { port, programs: site.programs, secrets: site.secrets };
  const stop = (how: 'fast' | 'immediate' = 'fast') => stopServer(site, how);
  const start = async () => {
    if (await findPostmaster(site.data)) return;
    const started = await startOn(site, port);
    if (started.code !== 0)
      throw new Error(`PostgreSQL does not start again: ${started.stderr}${started.stdout}`);
  };
  return {
    ...openDatabases(address),
    address,
    stop,
    start,
    async restart(how = 'fast') {
      await stop(how);
      await start();
    },
    destroy: () => removeCluster(site.purpose),
  };
}

/** Stops the cluster of a disposable purpose, running or not, and removes it with all its state. */
export async function removeCluster(purpose: Purpose): Promise<void> {
  if (!isDisposable(purpose)) throw new Error(`The ${purpose} cluster is not for throwing away.`);
  // without PostgreSQL on the machine there is nothing to stop
  const data = await findDataFolder(purpose).catch(() => null);
  if (data?.major) await stopServer({ data, programs: programsOf(data.major) }, 'immediate');
  // not always in the state folder: see findDataFolder
  if (data) rmSync(dirname(data.path), { recursive: true, force: true });
  rmSync(stateFolder(purpose), { recursive: true, force: true });
}

/**
 * Makes the private cluster of a purpose if there is none, starts or adopts it and makes the roles.
 * One process at a time per purpose: the caller holds the purpose's lock.
 * Throws Told with what to do when PostgreSQL is missing, of another major, or does not start.
 */
export async function startCluster(purpose: Purpose): Promise<Cluster> {
  const site = await findSite(purpose);
  if (site.data.major === null) await initdb(site);
  const cluster = makeHandle(site, await bringUp(site));
  await makeRoles(cluster, site.secrets);
  return cluster;
}

/** The databases of a cluster another process has running; null when it does not run. */
export async function findRunningCluster(purpose: Purpose): Promise<Databases | null> {
  const port = rememberedPort(stateFolder(purpose), 'postgres');
  const site = await findSite(purpose);
  if (port === undefined || !(await findPostmaster(site.data))) return null;
  return openDatabases({ port, programs: site.programs, secrets: site.secrets });
}
