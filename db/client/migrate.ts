import { readdir } from 'node:fs/promises';
import path from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { type Kysely, type Migration, type MigrationProvider, Migrator } from 'kysely';

const FOLDER = fileURLToPath(new URL('../../migrations/', import.meta.url));

const provider: MigrationProvider = {
  async getMigrations() {
    const migrations: Record<string, Migration> = {};
    for (const name of await migrationNames()) {
      const file = pathToFileURL(path.join(FOLDER, `${name}.ts`)).href;
      migrations[name] = (await import(/* @vite-ignore */ file)) as Migration;
    }
    return migrations;
  },
};

/** Names of the migrations in this source tree, oldest first. */
export async function migrationNames(): Promise<string[]> {
  const files = await readdir(FOLDER);
  return files.filter((file) => file.endsWith('.ts')).map((file) => file.slice(0, -3)).sort();
}

/** Brings the schema up to this source tree, as the owner. Throws the first failure; returns what was run. */
export async function migrateToLatest(owner: Kysely<unknown>): Promise<string[]> {
  const migrator = new Migrator({ db: owner, provider });
  const { error, results } = await migrator.migrateToLatest();
  if (error) {
    const failed = results?.find((result) => result.status === 'Error')?.migrationName ?? 'before the first';
    throw new Error(`Migration failed (${failed})`, { cause: error });
  }
  return (results ?? []).map((result) => result.migrationName);
}
