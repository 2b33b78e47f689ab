import path from 'node:path';
import { defineConfig } from 'vitest/config';

const alias = { '@': path.resolve(__dirname) };

export default defineConfig({
  resolve: { alias },
  test: {
    retry: 0,
    allowOnly: false,
    passWithNoTests: false,
    projects: [
      {
        resolve: { alias },
        // A test of a component asks for a document with `// @vitest-environment jsdom` in its first line.
        test: { name: 'unit', include: ['tests/unit/**/*.test.{ts,tsx}'], environment: 'node' },
      },
      {
        resolve: { alias },
        test: {
          name: 'db',
          include: ['tests/db/**/*.test.ts'],
          environment: 'node',
          pool: 'forks',
          globalSetup: ['lib/local/test-database.ts'],
          testTimeout: 20_000,
          hookTimeout: 30_000,
        },
      },
    ],
  },
});
