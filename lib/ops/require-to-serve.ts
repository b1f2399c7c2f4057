import { requireSchema } from '@/db/client';
import { environment } from '@/lib/env';

/** Ends the web server in words, rather than let it answer every request with an error. */
export async function requireToServe(): Promise<void> {
  try {
    environment();
    await requireSchema();
  } catch (error) {
    console.error((error as Error).message);
    process.exit(1);
  }
}
