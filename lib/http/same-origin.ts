import { environment } from '@/lib/env';
import { ServiceError } from '@/lib/domain/errors';

/**
 * A request that carries the session cookie and changes something must name our own origin. Browsers set the
 * header themselves on every such request, so its absence is refused like a foreign one.
 */
export function requireSameOrigin(headers: Headers, ownOrigin: string = environment().publicUrl): void {
  const fetchSite = headers.get('sec-fetch-site');
  if (headers.get('origin') !== ownOrigin || (fetchSite !== null && fetchSite !== 'same-origin')) {
    throw new ServiceError('wrong-origin');
  }
}
