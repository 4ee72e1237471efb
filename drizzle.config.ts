import { defineConfig } from 'drizzle-kit';

// `npx drizzle-kit generate --name what-changed` writes the next migration. `push` and `pull` fail on MariaDB.
export default defineConfig({
  dialect: 'mysql',
  schema: './db/schema/index.ts',
  out: './drizzle',
});
