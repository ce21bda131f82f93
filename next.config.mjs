// For every answer. proxy.ts adds what pages need: the content security policy with its nonce, and HSTS on https.
const headers = [
  { key: 'X-Content-Type-Options', value: 'nosniff' },
  { key: 'Referrer-Policy', value: 'same-origin' },
  { key: 'Permissions-Policy', value: 'camera=(), geolocation=(), microphone=(), payment=(), usb=()' },
  { key: 'Cross-Origin-Opener-Policy', value: 'same-origin' },
  { key: 'Cross-Origin-Resource-Policy', value: 'same-origin' },
];
// Answers of the API are data and show nothing.
const apiHeaders = [{ key: 'Content-Security-Policy', value: "default-src 'none'; frame-ancestors 'none'" }];

// npm test builds beside what is served, from sources whose types it has checked, and with a tsconfig that next may rewrite.
const distDir = process.env.NEXT_DIST_DIR ?? '.next';
const typescript =
  distDir === '.next' ? {} : { ignoreBuildErrors: true, tsconfigPath: '.test-data/tsconfig.json' };

// Endings that a path segment of the file tree cannot have.
const rewrites = [
  {
    source: '/api/v1/programs/:program/baselines/:number([^/.]+).csv',
    destination: '/api/v1/programs/:program/baselines/:number/csv',
  },
];

/** @type {import('next').NextConfig} */
const config = {
  distDir,
  typescript,
  poweredByHeader: false,
  reactStrictMode: true,
  typedRoutes: false,
  serverExternalPackages: ['pg', 'graphile-worker', 'pino', '@node-rs/argon2'],
  experimental: { turbopackFileSystemCacheForBuild: false, authInterrupts: true },
  headers: async () => [
    { source: '/:path*', headers },
    { source: '/api/:path*', headers: apiHeaders },
  ],
  rewrites: async () => rewrites,
};
export default config;
