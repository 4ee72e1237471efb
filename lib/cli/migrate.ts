/** `npm run migrate`: brings the database of DATABASE_URL up to the newest migration. */
import { migrateDb } from '@/db/migrate';
import { getConfig } from '@/lib/config';

migrateDb(getConfig().databaseUrl).catch((error: unknown) => {
  console.error(error);
  process.exitCode = 1;
});
