/** @type {import('next').NextConfig} */
const config = {
  // Tests build beside a running server: their output goes to a folder of their own.
  distDir: process.env.NEXT_DIST_DIR || '.next',
  // `npm test` type-checks everything, tests included; a build that does it again only takes longer.
  typescript: { ignoreBuildErrors: true },
  // In development Next would print what actions are called with: people's words, which belong in no log.
  logging: { serverFunctions: false },
  poweredByHeader: false,
  reactStrictMode: true,
  allowedDevOrigins: ['127.0.0.1', 'localhost'],
  // They load native parts, worker files or data by path, which a bundle would break.
  serverExternalPackages: ['@node-rs/argon2', 'pino', 'pdfkit', 'verovio', 'mysql2'],
};

export default config;
