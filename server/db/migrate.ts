import { fileURLToPath } from 'node:url';
import { migrate } from 'drizzle-orm/better-sqlite3/migrator';
import type { DatabaseClient } from './client.ts';

const migrationsFolder = fileURLToPath(new URL('../../drizzle', import.meta.url));

/** Brings a database to the newest schema; does nothing where it is there already. */
export function migrateDatabase(client: DatabaseClient): void {
  migrate(client.db, { migrationsFolder });
}
