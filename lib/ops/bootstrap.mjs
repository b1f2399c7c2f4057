// The first thing every command runs. Only node: modules here: nothing may be installed yet.
// It makes sure of Node, the packages and Debian's programs, then runs the command itself, in TypeScript, in this process.
import { execFileSync, spawnSync } from 'node:child_process';
import { existsSync, readFileSync, readdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('../..', import.meta.url));
const [command = 'start', ...args] = process.argv.slice(2);

/** What each command needs from Debian. PostgreSQL is not needed when the database is someone else's. */
const NEEDS = {
  start: ['postgresql'],
  dev: ['postgresql'],
  test: ['postgresql', 'chromium'],
  'test-long': ['postgresql'],
  measure: ['postgresql', 'chromium'],
  mutate: [],
  check: [],
  'db-migrate': ['postgresql'],
  'db-seed': ['postgresql'],
  'db-types': ['postgresql'],
  'db-psql': ['postgresql'],
};

function stop(message) {
  console.error(`\n${message}\n`);
  process.exit(1);
}

function requireNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if ((major === 20 && minor >= 20) || (major === 22 && minor >= 12) || major > 22) return;
  stop(`Selvedge needs Node 20.20 or newer (20.x), or 22.12 or newer. This is Node ${process.versions.node}.`);
}

/** Packages by folder, without those that only some machines get. */
function lockedVersions(file) {
  const { packages = {} } = JSON.parse(readFileSync(file, 'utf8'));
  return Object.entries(packages).filter(([folder, entry]) => folder && !entry.optional && !entry.link);
}

function packagesAreInstalled() {
  try {
    const installed = new Map(
      lockedVersions(path.join(root, 'node_modules/.package-lock.json')).map(([folder, { version }]) => [folder, version]),
    );
    return lockedVersions(path.join(root, 'package-lock.json')).every(
      ([folder, { version }]) => installed.get(folder) === version,
    );
  } catch {
    return false;
  }
}

function installPackages() {
  if (packagesAreInstalled()) return;
  console.log('Installing packages …');
  const npm = spawnSync('npm', ['ci', '--include=dev', '--no-audit', '--no-fund'], {
    cwd: root,
    stdio: ['ignore', process.stderr, 'inherit'],
  });
  if (npm.error) stop(`npm could not be started: ${npm.error.message}`);
  if (npm.status !== 0) {
    stop('The packages could not be installed (npm’s words are above). Check the network to the npm registry and the disk space, then try again.');
  }
}

function hasPostgres() {
  if (process.env.SELVEDGE_PG_BIN) return true;
  try {
    return readdirSync('/usr/lib/postgresql').some(
      (version) => Number(version) >= 15 && Number(version) <= 17 && existsSync(`/usr/lib/postgresql/${version}/bin/postgres`),
    );
  } catch {
    return false;
  }
}

function requireRoot(what, packages) {
  if (process.getuid?.() === 0) return;
  stop(`${what} is not here, and only root may install it. As root: apt-get install ${packages.join(' ')}`);
}

function aptInstall(what, packages) {
  requireRoot(what, packages);
  if (!existsSync('/usr/bin/apt-get')) stop(`${what} is not here, and this is not a Debian machine: install it by hand.`);
  console.log(`Installing ${what} from Debian …`);
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  try {
    execFileSync('apt-get', ['-q', 'update'], { env, stdio: ['ignore', 'ignore', 'inherit'] });
    execFileSync('apt-get', ['-qy', '--no-install-recommends', 'install', ...packages], {
      env,
      stdio: ['ignore', 'ignore', 'inherit'],
    });
  } catch {
    stop(`${what} could not be installed (apt’s words are above). Try by hand: apt-get install ${packages.join(' ')}`);
  }
}

/** Debian's package would make and start a cluster of its own; we use one of ours and leave the machine's habits as they were. */
function installPostgres() {
  requireRoot('PostgreSQL', ['postgresql']);
  aptInstall('PostgreSQL’s cluster tools', ['postgresql-common']);
  const file = '/etc/postgresql-common/createcluster.conf';
  const before = existsSync(file) ? readFileSync(file, 'utf8') : null;
  if (before !== null) writeFileSync(file, `${before}\ncreate_main_cluster = false\n`);
  try {
    const listed = execFileSync('apt-cache', ['search', '--names-only', '^postgresql-1[567]$'], { encoding: 'utf8' });
    const newest = listed.split('\n').map((line) => line.split(' ')[0]).filter(Boolean).sort().at(-1);
    if (!newest) stop('Debian’s package lists here offer no PostgreSQL 15 to 17: install it by hand.');
    aptInstall('PostgreSQL', [newest]);
  } finally {
    if (before !== null) writeFileSync(file, before);
  }
}

function installDebianPrograms(needs) {
  const ownDatabase = !process.env.DATABASE_URL || command.startsWith('test') || command === 'measure';
  if (needs.includes('postgresql') && ownDatabase && !hasPostgres()) installPostgres();
  if (needs.includes('chromium') && !process.env.SELVEDGE_CHROMIUM && !existsSync('/usr/bin/chromium')) {
    aptInstall('Chromium', ['chromium']);
  }
}

if (!(command in NEEDS)) stop(`"${command}" is not a command. Known: ${Object.keys(NEEDS).join(', ')}.`);
requireNode();
process.chdir(root);
installPackages();
installDebianPrograms(NEEDS[command]);

const { register } = await import('tsx/esm/api');
register();
const { runCommand } = await import('./run-command.ts');
await runCommand(command, args);
