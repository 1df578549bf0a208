import { type SQL, sql } from 'drizzle-orm';

/** The libraries that exist for somebody. */
export type VisibleLibraries =
  | { kind: 'all' }
  | { kind: 'none' }
  | { kind: 'one'; library: number }
  /** Public ones, and those that the person is a member of. */
  | { kind: 'of person'; person: string };

/**
 * For queries on rows of many libraries: that the row is of one that is visible. The column is written out
 * with its table: without it, as in a query on one table, it would be taken for one of the tables in here.
 */
export function isOfVisible(
  column: 'libraries.id' | 'runs.library_id',
  visible: VisibleLibraries,
): SQL | undefined {
  const libraryId = sql.raw(column);
  if (visible.kind === 'all') return undefined;
  if (visible.kind === 'none') return sql`false`;
  if (visible.kind === 'one') return sql`${libraryId} = ${visible.library}`;
  // Asked row by row, so that the order of the list decides which index is used.
  return sql`exists (select 1 from libraries as l where l.id = ${libraryId} and (l.visibility = 'public'
    or exists (select 1 from members as m where m.user_id = ${visible.person} and m.library_id = l.id)))`;
}
