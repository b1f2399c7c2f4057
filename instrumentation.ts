/** Runs once when the web server starts: it does not serve on a wrong configuration, schema or login. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== 'nodejs') return;
  const { environment } = await import('@/lib/env');
  const { requireSchema } = await import('@/db/client');
  environment();
  await requireSchema();
}
