/** Runs once when the web server starts: it does not serve on a wrong configuration, schema or login. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME === 'nodejs') {
    const { requireToServe } = await import('@/lib/ops/require-to-serve');
    await requireToServe();
  }
}
