import type { NextConfig } from 'next'

const securityHeaders = [
  { key: 'x-content-type-options', value: 'nosniff' },
  { key: 'referrer-policy', value: 'same-origin' },
  { key: 'x-frame-options', value: 'DENY' },
  { key: 'cross-origin-opener-policy', value: 'same-origin' },
  { key: 'cross-origin-resource-policy', value: 'same-origin' },
  { key: 'permissions-policy', value: 'camera=(), microphone=(), geolocation=(), payment=()' },
  // Browsers ignore it over plain http, so it is harmless on a developer's machine.
  { key: 'strict-transport-security', value: 'max-age=31536000' },
]

const config: NextConfig = {
  poweredByHeader: false,
  // `npm run typecheck` looks at types, once and for every file; a build need not wait for it.
  typescript: { ignoreBuildErrors: true },
  reactStrictMode: true,
  serverExternalPackages: ['pg', 'exceljs', '@node-rs/argon2', 'hyperformula'],
  headers: async () => [
    { source: '/:path*', headers: securityHeaders },
    {
      source: '/api/:path*',
      headers: [
        { key: 'cache-control', value: 'no-store' },
        { key: 'content-security-policy', value: "default-src 'none'; frame-ancestors 'none'" },
      ],
    },
  ],
}

export default config
