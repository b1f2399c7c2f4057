import type { KyselyPlugin } from 'kysely';
import { closeDatabase, type database, openDatabase } from '@/db/client';

/** Runs `work` with a database that counts what is sent to it, transaction statements not included. */
export async function countQueries<T>(work: () => Promise<T>): Promise<{ result: T; queries: number }> {
  let queries = 0;
  const counter: KyselyPlugin = {
    transformQuery: ({ node }) => {
      queries += 1;
      return node;
    },
    transformResult: async ({ result }) => result,
  };
  const shared = globalThis as typeof globalThis & { selvedgeDatabase?: ReturnType<typeof database> };
  await closeDatabase();
  shared.selvedgeDatabase = openDatabase(String(process.env.DATABASE_URL), { max: 2 }).withPlugin(counter);
  try {
    const result = await work();
    return { result, queries };
  } finally {
    await closeDatabase();
  }
}
