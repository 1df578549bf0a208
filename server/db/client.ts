import Database from 'better-sqlite3';
import { type BetterSQLite3Database, drizzle } from 'drizzle-orm/better-sqlite3';

export type Db = BetterSQLite3Database;
export type Sqlite = Database.Database;

export interface DatabaseClient {
  /** Typed queries; shares its connection with `sqlite`. */
  db: Db;
  /** Prepared statements for what is read and written by the ten thousand. */
  sqlite: Sqlite;
  close(): void;
}

/**
 * Opens (and creates) a database file. Every connection of the product is made here, so that all have the
 * same pragmas. With WAL and `synchronous = normal` a transaction survives the death of the process; only
 * the last ones can be lost when the machine itself goes down, and the file stays sound even then.
 */
export function openDatabase(file: string): DatabaseClient {
  const sqlite = new Database(file);
  sqlite.pragma('journal_mode = WAL');
  sqlite.pragma('synchronous = NORMAL');
  sqlite.pragma('foreign_keys = ON');
  sqlite.pragma('busy_timeout = 5000');
  sqlite.pragma('cache_size = -65536'); // 64 MiB
  sqlite.pragma('mmap_size = 268435456'); // 256 MiB
  sqlite.pragma('temp_store = MEMORY');
  sqlite.pragma('trusted_schema = OFF');
  return { db: drizzle(sqlite), sqlite, close: () => sqlite.close() };
}

/** Runs `work` in one write transaction; `work` must not be async, since SQLite here is synchronous. */
export function inTransaction<Result>(client: DatabaseClient, work: () => Result): Result {
  return client.sqlite.inTransaction ? work() : client.sqlite.transaction(work).immediate();
}

/** True for a broken unique or foreign key; repos turn these into `conflict`. */
export function isConstraintError(error: unknown, kind: 'UNIQUE' | 'FOREIGNKEY'): boolean {
  const cause = error instanceof Error && error.cause instanceof Error ? error.cause : error;
  return cause instanceof Database.SqliteError && cause.code === `SQLITE_CONSTRAINT_${kind}`;
}
