import { environment } from '@/lib/env';

/**
 * The network address a request came from, for slowing down repeated sign-in failures.
 * Anyone can write a forwarding header, so it is believed only as far as our own proxies reach: with n trusted
 * proxies in front, the n-th entry from the right was written by the outermost of them. Without a trusted proxy
 * every request counts as one address: failures then slow an account down for everybody, but cannot be dodged
 * by making up addresses.
 */
export function clientAddress(
  forwardedFor: string | null | undefined,
  trustedProxies: number = environment().trustedProxies,
): string {
  if (!Number.isInteger(trustedProxies) || trustedProxies < 1) return 'direct';
  const hops = (forwardedFor ?? '').split(',').map((hop) => hop.trim()).filter(Boolean);
  return hops.at(-trustedProxies) ?? 'direct';
}
