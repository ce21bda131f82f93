/** @type {import('next').NextConfig} */
const config = {
  poweredByHeader: false,
  reactStrictMode: true,
  typedRoutes: false,
  serverExternalPackages: ['pg', 'graphile-worker', 'pino', '@node-rs/argon2'],
  experimental: { turbopackFileSystemCacheForBuild: false },
};
export default config;
