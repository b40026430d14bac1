/** On every answer; the policy of pages, with its nonce, is proxy.ts's. */
const everywhere = [
  { key: 'X-Content-Type-Options', value: 'nosniff' },
  { key: 'Referrer-Policy', value: 'same-origin' },
  { key: 'X-Frame-Options', value: 'DENY' },
  { key: 'Cross-Origin-Opener-Policy', value: 'same-origin' },
  { key: 'Cross-Origin-Resource-Policy', value: 'same-origin' },
  { key: 'Permissions-Policy', value: 'camera=(), microphone=(), geolocation=(), payment=(), usb=()' },
];
const apiPolicy = { key: 'Content-Security-Policy', value: "default-src 'none'; frame-ancestors 'none'" };

/** @type {import('next').NextConfig} */
const nextConfig = {
  reactStrictMode: true,
  poweredByHeader: false,
  serverExternalPackages: ['better-sqlite3', 'piscina', '@node-rs/argon2', 'exceljs', 'pino', 'resend'],
  // Types are checked by `npm test` (tsc), once, not again by the build.
  typescript: { ignoreBuildErrors: true },
  headers: () =>
    Promise.resolve([
      { source: '/:path*', headers: everywhere },
      { source: '/api/:path*', headers: [apiPolicy] },
    ]),
};
export default nextConfig;
