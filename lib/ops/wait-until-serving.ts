import { setTimeout as pause } from 'node:timers/promises';
import { LocalError } from '@/db/local';

/** Waits until the address answers at all; any status counts, a page behind a sign-in answers with a redirect. */
export async function waitUntilServing(address: string, signal?: AbortSignal, patienceMs = 120_000): Promise<void> {
  const end = Date.now() + patienceMs;
  for (;;) {
    signal?.throwIfAborted();
    try {
      await fetch(address, { redirect: 'manual', signal: AbortSignal.timeout(30_000) });
      return;
    } catch {
      if (Date.now() > end) throw new LocalError(`Nothing answered at ${address} within ${patienceMs / 1000} seconds.`);
      await pause(100);
    }
  }
}
