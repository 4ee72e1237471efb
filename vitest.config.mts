import path from 'node:path';
import { defineConfig } from 'vitest/config';

const alias = { '@': path.resolve(import.meta.dirname) };

export default defineConfig({
  test: {
    // Two cores: more workers only fight each other.
    maxWorkers: 2,
    projects: [
      {
        resolve: { alias },
        test: { name: 'unit', include: ['tests/unit/**/*.test.{ts,tsx}'], testTimeout: 60_000, hookTimeout: 240_000 },
      },
      {
        resolve: { alias },
        test: { name: 'published', include: ['tests/published/**/*.test.ts'], testTimeout: 60_000, hookTimeout: 240_000 },
      },
      {
        resolve: { alias },
        test: {
          name: 'integration',
          include: ['tests/integration/**/*.test.ts'],
          globalSetup: ['tests/support/global-setup.ts'],
          pool: 'forks',
          testTimeout: 120_000,
          hookTimeout: 240_000,
        },
      },
    ],
  },
});
