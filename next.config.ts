import type { NextConfig } from 'next';

const config: NextConfig = {
  poweredByHeader: false,
  reactStrictMode: true,
  // postgres.js and pg-boss open sockets; they stay outside the bundle.
  serverExternalPackages: ['postgres', 'pg-boss', 'nodemailer', 'pdfkit'],
};

export default config;
