import type { Actor } from '@/lib/domain/access';
import { ServiceError } from '@/lib/domain/errors';

interface Bucket {
  tokens: number;
  at: number;
}

/** Callers remembered at most; the one that was quiet longest is forgotten first, and starts with a full bucket. */
const MOST_CALLERS = 10_000;

export interface RateLimit {
  /** Counts one call. @throws ServiceError too-many, with the seconds to wait */
  count(actor: Actor): void;
}

function keyOf(actor: Actor): string {
  return actor.kind === 'token' ? `token/${actor.tokenId}` : `${actor.kind}/${actor.siteId}/${actor.userId ?? ''}`;
}

/**
 * A bucket of `burst` calls a caller that refills at `perMinute`. It lives in this process: with several of them the
 * limit is that many times as large, which is still a limit.
 */
export function rateLimit(
  { burst, perMinute }: { readonly burst: number; readonly perMinute: number },
  clock: () => number = Date.now,
): RateLimit {
  const buckets = new Map<string, Bucket>();
  const perMs = perMinute / 60_000;
  return {
    count(actor) {
      const now = clock();
      const key = keyOf(actor);
      const known = buckets.get(key) ?? { tokens: burst, at: now };
      const tokens = Math.min(burst, known.tokens + Math.max(0, now - known.at) * perMs);
      buckets.delete(key);
      buckets.set(key, { tokens: tokens < 1 ? tokens : tokens - 1, at: now });
      if (buckets.size > MOST_CALLERS) buckets.delete(buckets.keys().next().value!);
      if (tokens < 1) throw new ServiceError('too-many', { retryAfterSeconds: Math.ceil((1 - tokens) / perMs / 1000) });
    },
  };
}

/** Shared by the routes that write: far above what a person or an honest program does, far below what fills a disk. */
export const writeLimit = rateLimit({ burst: 120, perMinute: 240 });

/** Pieces of a file: the longest file is a few hundred of them, one after the other. */
export const pieceLimit = rateLimit({ burst: 600, perMinute: 1200 });
