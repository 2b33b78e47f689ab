import type { NextConfig } from 'next';

const config: NextConfig = {
  // A second place lets a new build be made while an older one is still being served.
  distDir: process.env.NEXT_DIST_DIR || '.next',
  poweredByHeader: false,
  reactStrictMode: true,
  // postgres.js and pg-boss open sockets; they stay outside the bundle.
  serverExternalPackages: ['postgres', 'pg-boss', 'nodemailer', 'pdfkit'],
};

export default config;
