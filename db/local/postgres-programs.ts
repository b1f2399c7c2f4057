import { execFile } from 'node:child_process';
import { accessSync, constants, readdirSync } from 'node:fs';
import path from 'node:path';
import { promisify } from 'node:util';
import { LocalError } from './local-error';

const execFileAsync = promisify(execFile);
const DEBIAN_FOLDER = '/usr/lib/postgresql';
const OLDEST = 15;
const NEWEST = 17;

function runnable(file: string): boolean {
  try {
    accessSync(file, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

/**
 * Folder of initdb, pg_ctl and postgres: Debian's own package, the newest of 15 to 17.
 * Programs of the same name elsewhere on the PATH are of unknown make and are not used.
 */
export function findPostgresPrograms(): string {
  const chosen = process.env.SELVEDGE_PG_BIN;
  if (chosen) {
    if (runnable(path.join(chosen, 'postgres'))) return chosen;
    throw new LocalError(`SELVEDGE_PG_BIN is "${chosen}", but there is no "postgres" program in it.`);
  }
  let versions: string[] = [];
  try {
    versions = readdirSync(DEBIAN_FOLDER);
  } catch {
    // Not installed: the message below says what to do.
  }
  const newest = versions
    .map(Number)
    .filter((version) => version >= OLDEST && version <= NEWEST)
    .sort((a, b) => b - a)
    .map((version) => path.join(DEBIAN_FOLDER, String(version), 'bin'))
    .find((folder) => runnable(path.join(folder, 'postgres')) && runnable(path.join(folder, 'initdb')));
  if (newest) return newest;
  throw new LocalError(
    `PostgreSQL ${OLDEST} to ${NEWEST} was not found under ${DEBIAN_FOLDER}. Install it as root ` +
      '("apt-get install postgresql-15"), or set DATABASE_URL, SMTP_URL and NEXTAUTH_URL to use services of your own.',
  );
}

const asRoot = () => process.getuid?.() === 0;

/** PostgreSQL refuses to run as root, so root hands its programs to Debian's postgres account. */
export function asPostgres(program: string, args: readonly string[]): [string, string[]] {
  return asRoot() ? ['runuser', ['-u', 'postgres', '--', program, ...args]] : [program, [...args]];
}

export async function runAsPostgres(program: string, args: readonly string[]): Promise<string> {
  const [file, rest] = asPostgres(program, args);
  // LC_ALL: messages are read below, and a missing locale must not stop initdb. cwd: always there for that account.
  const { stdout } = await execFileAsync(file, rest, { cwd: '/', env: { ...process.env, LC_ALL: 'C.UTF-8' } });
  return stdout;
}

/** Ids of the account that must own the data folder; null when that is ourselves. */
export async function postgresAccount(): Promise<{ uid: number; gid: number } | null> {
  if (!asRoot()) return null;
  const id = async (flag: string) => Number((await execFileAsync('id', [flag, 'postgres'])).stdout);
  return { uid: await id('-u'), gid: await id('-g') };
}
