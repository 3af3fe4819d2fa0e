import { existsSync, mkdirSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { installPackages, installWords, isRoot } from './debian';
import { Told } from './tell';

const LIBRARY = '/usr/lib/postgresql';
const CREATE_CLUSTER = '/etc/postgresql-common/createcluster.d';
const NO_MAIN = 'create_main_cluster = false';

/** Folder of the server programs of one major version. */
export const programsOf = (major: number): string => join(LIBRARY, String(major), 'bin');

/** Installed majors of the PostgreSQL server, highest first. */
export function installedMajors(): number[] {
  if (!existsSync(LIBRARY)) return [];
  return readdirSync(LIBRARY)
    .map(Number)
    .filter((major) => Number.isInteger(major) && existsSync(join(programsOf(major), 'initdb')))
    .sort((a, b) => b - a);
}

/** Debian's package would make and start a cluster of its own on port 5432; nobody asked for one. */
function forbidMainCluster(): void {
  mkdirSync(CREATE_CLUSTER, { recursive: true });
  writeFileSync(join(CREATE_CLUSTER, 'no-main.conf'), `${NO_MAIN}\n`);
}

/** Installs Debian's PostgreSQL server if there is none; as a plain user throws Told with what to run. */
export async function ensurePostgres(): Promise<void> {
  if (installedMajors().length > 0) return;
  if (!isRoot()) {
    throw new Told(
      installWords(
        "PostgreSQL's server",
        ['postgresql'],
        [`sudo install -d ${CREATE_CLUSTER}`, `echo '${NO_MAIN}' | sudo tee ${CREATE_CLUSTER}/no-main.conf`],
      ),
    );
  }
  forbidMainCluster();
  await installPackages("PostgreSQL's server", ['postgresql']);
  if (installedMajors().length === 0)
    throw new Told(`PostgreSQL was installed, but no server is under ${LIBRARY}.`);
}

/**
 * The major to run a data folder with: its own, or the highest installed for a new one (`made` null).
 * Throws Told with the dump and restore commands when a folder's own major is not installed.
 */
export function majorFor(data: string, made: number | null, installed: readonly number[]): number {
  const highest = installed[0];
  if (highest === undefined) throw new Told("PostgreSQL's server is missing.");
  if (made === null || installed.includes(made)) return made ?? highest;
  throw new Told(
    [
      `The database in ${data} was made by PostgreSQL ${made}, but only PostgreSQL ${installed.join(', ')} is installed here.`,
      `A newer server cannot open it. To keep the data, on a machine that has PostgreSQL ${made}:`,
      '',
      `  sudo apt-get install postgresql-${made}`,
      `  ${programsOf(made)}/pg_ctl -D ${data} -o "-c port=5499 -c listen_addresses=127.0.0.1 -c unix_socket_directories=''" start`,
      `  ${programsOf(made)}/pg_dump -h 127.0.0.1 -p 5499 -U brimline_super -Fc -f brimline.dump brimline`,
      `  ${programsOf(made)}/pg_ctl -D ${data} stop`,
      '',
      `(the password is "superuser" in secrets.json beside it). Then move the folder away, start here once, and:`,
      '',
      `  ${programsOf(highest)}/pg_restore --clean --if-exists -h 127.0.0.1 -p PORT -U brimline_super -d brimline brimline.dump`,
      '',
      'If the data may go, delete the folder and start again.',
    ].join('\n'),
  );
}
