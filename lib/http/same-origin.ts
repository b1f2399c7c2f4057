import { ServiceError } from '@/lib/domain/errors';

/**
 * A request that carries the session cookie and changes something must name our own origin. Browsers set the
 * header themselves on every such request, so its absence is refused like a foreign one.
 */
export function requireSameOrigin(headers: Headers, ownUrl: string | undefined = process.env.NEXTAUTH_URL): void {
  if (!ownUrl) throw new Error('NEXTAUTH_URL is not set: the address under which people open the product.');
  const fetchSite = headers.get('sec-fetch-site');
  if (headers.get('origin') !== new URL(ownUrl).origin || (fetchSite !== null && fetchSite !== 'same-origin')) {
    throw new ServiceError('wrong-origin');
  }
}
