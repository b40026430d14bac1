/** @type {import('next').NextConfig} */
const nextConfig = {
  reactStrictMode: true,
  poweredByHeader: false,
  serverExternalPackages: ['better-sqlite3', 'piscina', '@node-rs/argon2', 'exceljs', 'pino'],
  // Types are checked by `npm test` (tsc), once, not again by the build.
  typescript: { ignoreBuildErrors: true },
};
export default nextConfig;
