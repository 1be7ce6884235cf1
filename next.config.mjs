/** @type {import('next').NextConfig} */
const config = {
  // Names the build, so that each has a service worker of its own. Inherited by the build's own processes.
  env: { STILLSTAND_BUILD: (process.env.STILLSTAND_BUILD ??= String(Date.now())) },
  reactStrictMode: true,
  poweredByHeader: false,
  devIndicators: false,
  // `npm test` has a step of its own for types; a fault in a test file must not stop `npm start`.
  typescript: { ignoreBuildErrors: true },
  // Writing it costs more than the next build saves.
  experimental: { turbopackFileSystemCacheForBuild: false },
  turbopack: { resolveAlias: { '@stdlib/assert-has-generator-support': './lib/science/has-generators.cjs' } },
  // A file that opens in a tab of its own names no mark, so the browser asks for it under this address.
  rewrites: async () => [{ source: '/favicon.ico', destination: '/mark.svg' }],
  allowedDevOrigins: ['127.0.0.1'],
  // Native or file-reading packages stay outside the bundle.
  serverExternalPackages: [
    '@node-rs/argon2',
    'pg',
    'pg-boss',
    'jimp',
    'formidable',
    '@react-pdf/renderer',
    'nodemailer',
    'smtp-server',
    'pino',
  ],
}

export default config
