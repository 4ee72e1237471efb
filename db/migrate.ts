import path from 'node:path';
import { migrate } from 'drizzle-orm/mysql2/migrator';
import { drizzle } from 'drizzle-orm/mysql2';
import { createConnection } from 'mysql2/promise';

/** How long one process waits for another that is migrating, in seconds. */
const LOCK_WAIT = 60;

/** Brings the database up to the newest migration of `drizzle/`. Safe to run from several processes at once. */
export async function migrateDb(url: string, folder = path.resolve('drizzle')): Promise<void> {
  const connection = await createConnection({ uri: url, timezone: 'Z', charset: 'utf8mb4' });
  try {
    await connection.query("SELECT GET_LOCK(concat('migrate ', database()), ?)", [LOCK_WAIT]);
    await migrate(drizzle(connection), { migrationsFolder: folder });
  } finally {
    await connection.end();
  }
}
