import path from 'node:path';
import { defineConfig } from 'vitest/config';

export default defineConfig({
  resolve: { alias: { '@': path.resolve(import.meta.dirname) } },
  test: {
    include: ['tests/{unit,published,integration}/**/*.test.{ts,tsx}'],
    // Two cores: more workers only fight each other.
    maxWorkers: 2,
  },
});
