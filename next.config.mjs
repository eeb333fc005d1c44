/** @type {import('next').NextConfig} */
export default {
  // Tests build into a folder of their own so that they never disturb a running app.
  distDir: process.env.NEXT_DIST_DIR ?? '.next',
  poweredByHeader: false,
  reactStrictMode: true,
  // A path with a trailing slash is answered by our own 404 instead of a redirect.
  skipTrailingSlashRedirect: true,
  // The console answers a missing permission with status 403 and app/console/forbidden.tsx.
  experimental: { authInterrupts: true },
  // `npm test` and `npm run verify` check the types of everything; a start on a new machine need not do it again.
  typescript: { ignoreBuildErrors: true },
  // Database drivers are loaded by Node as they are; bundling them breaks their optional requires.
  serverExternalPackages: ['knex', 'pg', 'rate-limiter-flexible'],
};
