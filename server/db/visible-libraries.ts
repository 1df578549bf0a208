import { type SQL, sql } from 'drizzle-orm';
import type { SQLiteColumn } from 'drizzle-orm/sqlite-core';

/** The libraries that exist for somebody. */
export type VisibleLibraries =
  | { kind: 'all' }
  | { kind: 'none' }
  | { kind: 'one'; library: number }
  /** Public ones, and those that the person is a member of. */
  | { kind: 'of person'; person: string };

/** For queries on rows of many libraries: that the row is of one that is visible. */
export function isOfVisible(libraryId: SQLiteColumn, visible: VisibleLibraries): SQL | undefined {
  if (visible.kind === 'all') return undefined;
  if (visible.kind === 'none') return sql`false`;
  if (visible.kind === 'one') return sql`${libraryId} = ${visible.library}`;
  return sql`${libraryId} in (
    select l.id from libraries as l where l.visibility = 'public'
    union all select m.library_id from members as m where m.user_id = ${visible.person})`;
}
