import type { NextConfig } from 'next'

const config: NextConfig = {
  poweredByHeader: false,
  reactStrictMode: true,
  serverExternalPackages: ['pg', 'exceljs', '@node-rs/argon2', 'hyperformula'],
}

export default config
