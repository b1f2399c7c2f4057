import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { safeReturnPath } from '@/lib/auth/safe-return-path';
import { clientAddress } from '@/lib/http/client-address';

const HOME = '/today';

describe('safeReturnPath', () => {
  it.each(['/bench', '/bookings?filter=a%2Fb&x=//y', '/plans/1#sheet', '/', '/site/people?next=https://other.example'])(
    'goes back to %s',
    (path) => expect(safeReturnPath(path, HOME)).toBe(path),
  );

  it.each([
    undefined,
    null,
    ['/bench', '/bench'],
    '',
    'bench',
    '//evil.example',
    '///evil.example',
    '/\\evil.example',
    '\\\\evil.example',
    '/\t/evil.example',
    '/\n/evil.example',
    '\t//evil.example',
    'https://evil.example',
    'https:/evil.example',
    'javascript:alert(1)',
    '/.//evil.example',
    '/..//evil.example',
    '/x/..//evil.example',
    '/sign-in',
    '/sign-in?callbackUrl=/sign-in',
    '/set-password#x',
    '/api/auth/signout',
    '/bench/../api/auth/signout',
    `/${'x'.repeat(3000)}`,
  ])('goes home instead of %j', (path) => expect(safeReturnPath(path, HOME)).toBe(HOME));

  it('stays on our origin for whatever a browser makes of it', () => {
    const piece = fc.constantFrom('/', '\\', '//', '.', '..', '@', ':', '?', '#', 'evil.example', 'https:', '\t', '\n', '%2f', '%5c', 'a', ' ');
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 8 }).map((parts) => parts.join('')), (path) => {
        const target = new URL(safeReturnPath(path, HOME), 'http://own.example');
        expect(target.origin).toBe('http://own.example');
      }),
      { seed: 20261201, numRuns: 5000 },
    );
  });
});

describe('clientAddress', () => {
  it('believes a forwarding header only as far as our own proxies reach', () => {
    const forged = '6.6.6.6, 203.0.113.9';
    expect(clientAddress(forged, 0)).toBe('direct');
    expect(clientAddress(forged, 1)).toBe('203.0.113.9');
    expect(clientAddress('6.6.6.6, 203.0.113.9, 10.0.0.1', 2)).toBe('203.0.113.9');
    expect(clientAddress(undefined, 1)).toBe('direct');
    expect(clientAddress('203.0.113.9', 2)).toBe('direct');
  });
});
