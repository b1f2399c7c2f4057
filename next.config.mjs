/** Headers that are the same for every answer; the Content-Security-Policy has a nonce and is set in proxy.ts. */
const headers = [
  { key: 'X-Content-Type-Options', value: 'nosniff' },
  { key: 'X-Frame-Options', value: 'DENY' },
  { key: 'Referrer-Policy', value: 'same-origin' },
  { key: 'Cross-Origin-Opener-Policy', value: 'same-origin' },
  { key: 'Cross-Origin-Resource-Policy', value: 'same-origin' },
  { key: 'Permissions-Policy', value: 'camera=(), microphone=(), geolocation=(), payment=(), usb=()' },
  ...(process.env.NEXTAUTH_URL?.startsWith('https:')
    ? [{ key: 'Strict-Transport-Security', value: 'max-age=31536000' }]
    : []),
];

/** A page behind a link that is someone's alone: kept by no cache, named to no other site, found by no search. */
const privateLink = [
  { key: 'Referrer-Policy', value: 'no-referrer' },
  { key: 'X-Robots-Tag', value: 'noindex, nofollow' },
  { key: 'Cache-Control', value: 'no-store' },
];

/** @type {import('next').NextConfig} */
const config = {
  distDir: process.env.SELVEDGE_DIST_DIR ?? '.next',
  poweredByHeader: false,
  reactStrictMode: true,
  // Types are checked by "npm test", once, over the whole project; a start must not wait for it.
  typescript: { ignoreBuildErrors: true },
  serverExternalPackages: ['@node-rs/argon2', 'pg', 'pg-boss', '@react-pdf/renderer'],
  // A router's fetch of a page that is not there streams "not found" with status 200. A shared show is only ever loaded
  // whole, so what asks for its stream is sent where nothing is: 404, whatever the token.
  rewrites: async () => ({
    beforeFiles: ['rsc', 'next-router-prefetch'].map((key) => ({ source: '/shown/:token', has: [{ type: 'header', key }], destination: '/shown' })),
  }),
  headers: async () => [{ source: '/:path*', headers }, { source: '/size', headers: privateLink }, { source: '/shown/:token', headers: privateLink }],
};
export default config;
