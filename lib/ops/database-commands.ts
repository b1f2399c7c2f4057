import { execFile, spawn } from 'node:child_process';
import { readFile, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { promisify } from 'node:util';
import { migrationNames } from '@/db/client/migrate';
import { LocalError } from '@/db/local';
import { type LocalDatabase, startLocalDatabase } from './local-database';
import { dataFolder, localSecrets, rememberedPorts, ROOT } from './local-files';
import { prepareDatabase } from './prepare-database';
import { takeRunLock } from './run-lock';
import { seedDemoSite } from './seed-demo-site';

/** The local database for the time of one command. */
async function withLocalDatabase(work: (local: LocalDatabase) => Promise<void>): Promise<void> {
  const unlock = await takeRunLock(dataFolder());
  try {
    const local = await startLocalDatabase(dataFolder());
    await work(local).finally(() => local.cluster.stop());
  } finally {
    await unlock();
  }
}

/** `npm run db:migrate`: MIGRATION_DATABASE_URL as its owner, else the local database. */
export async function migrate(): Promise<void> {
  const owner = process.env.MIGRATION_DATABASE_URL;
  if (!owner && process.env.DATABASE_URL) {
    throw new LocalError('Set MIGRATION_DATABASE_URL to the owner’s URL: the application role of DATABASE_URL may not migrate.');
  }
  if (owner) {
    const done = await prepareDatabase(owner);
    console.log(done.length ? `Migrated: ${done.join(', ')}` : 'Nothing to migrate.');
    return;
  }
  await withLocalDatabase(async () => console.log('The local database is up to date.'));
}

/** `npm run db:seed`: the demo site, in the local database only. */
export async function seed(): Promise<void> {
  if (process.env.DATABASE_URL) throw new LocalError('The demo site is for the local database only; DATABASE_URL is set.');
  await withLocalDatabase(async ({ ownerUrl }) => {
    const accounts = await seedDemoSite(ownerUrl, dataFolder());
    for (const { email, password } of accounts) console.log(`${email}  ${password}`);
  });
}

/** `npm run db:types`: table types and the schema's name, from the migrated local database. */
export async function generateTypes(): Promise<void> {
  await withLocalDatabase(({ ownerUrl }) => writeTypes(ownerUrl, path.join(ROOT, 'db/types/tables.ts')));
  const file = path.join(ROOT, 'db/types/schema-version.ts');
  const newest = (await migrationNames()).at(-1);
  await writeFile(file, (await readFile(file, 'utf8')).replace(/'[^']*'/, `'${newest}'`));
}

/** What the application may know of: not the migrator's own tables, not those behind the gate. */
export async function writeTypes(ownerUrl: string, outFile: string): Promise<void> {
  await promisify(execFile)(
    process.execPath,
    [
      path.join(ROOT, 'node_modules/kysely-codegen/dist/cli/bin.js'),
      '--dialect', 'postgres', '--url', ownerUrl, '--default-schema', 'public',
      '--exclude-pattern', '{kysely_*,gate.*,pgboss.*}', '--out-file', outFile,
    ],
    { cwd: ROOT },
  );
}

/** `npm run db:psql`: a prompt in the running local database, as its owner. */
export async function openPsql(args: readonly string[]): Promise<void> {
  const { postgres } = await rememberedPorts(dataFolder());
  const { ownerPassword } = await localSecrets(dataFolder());
  if (!postgres) throw new LocalError('There is no local database yet: "npm start" makes it.');
  const psql = spawn('psql', ['-h', '127.0.0.1', '-p', String(postgres), '-U', 'selvedge_owner', 'selvedge', ...args], {
    stdio: 'inherit',
    env: { ...process.env, PGPASSWORD: ownerPassword },
  });
  await new Promise<void>((resolve, reject) => {
    psql.once('error', () => reject(new LocalError('psql is not installed: apt-get install postgresql-client.')));
    psql.once('exit', (code) => {
      process.exitCode = code ?? 1;
      resolve();
    });
  });
}
