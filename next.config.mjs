/** @type {import('next').NextConfig} */
const config = {
  distDir: process.env.SELVEDGE_DIST_DIR ?? '.next',
  poweredByHeader: false,
  reactStrictMode: true,
  serverExternalPackages: ['@node-rs/argon2', 'pg', 'pg-boss'],
};
export default config;
