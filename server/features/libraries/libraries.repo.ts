import { and, asc, eq, gt, sql } from 'drizzle-orm';
import { AppError } from '../../../shared/errors.ts';
import { type Db, isConstraintError } from '../../db/client.ts';
import { libraries } from '../../db/schema/libraries.ts';
import { isOfVisible, type VisibleLibraries } from '../../db/visible-libraries.ts';

export type LibraryRow = typeof libraries.$inferSelect;

// Written out, since a column in a query on one table is otherwise named without its table.
const counts = {
  solverCount: sql<number>`(select count(*) from solvers as s where s.library_id = libraries.id and s.declared)`,
  buildCount: sql<number>`(select count(*) from builds as b where b.library_id = libraries.id)`,
  runCount: sql<number>`(select count(*) from runs as r where r.library_id = libraries.id)`,
};

export function createLibrariesRepo(db: Db) {
  return {
    insert(row: typeof libraries.$inferInsert): LibraryRow {
      try {
        return db.insert(libraries).values(row).returning().get();
      } catch (error) {
        if (!isConstraintError(error, 'UNIQUE')) throw error;
        throw new AppError('conflict', `There is a library “${row.slug}” already.`, {
          issues: [{ path: 'slug', message: 'taken' }],
          cause: error,
        });
      }
    },
    update: (id: number, change: Partial<typeof libraries.$inferInsert>): LibraryRow | undefined =>
      db.update(libraries).set(change).where(eq(libraries.id, id)).returning().get(),
    find: (slug: string): LibraryRow | undefined =>
      db.select().from(libraries).where(eq(libraries.slug, slug)).get(),
    findById: (id: number): LibraryRow | undefined =>
      db.select().from(libraries).where(eq(libraries.id, id)).get(),
    findCounted: (slug: string) =>
      db
        .select({ library: libraries, ...counts })
        .from(libraries)
        .where(eq(libraries.slug, slug))
        .get(),
    /** By slug, from A to Z. */
    listQuery(options: {
      after?: string | undefined;
      visible?: VisibleLibraries | undefined;
      limit: number;
    }) {
      return db
        .select({ library: libraries, ...counts })
        .from(libraries)
        .where(
          and(
            options.visible && isOfVisible('libraries.id', options.visible),
            options.after === undefined ? undefined : gt(libraries.slug, options.after),
          ),
        )
        .orderBy(asc(libraries.slug))
        .limit(options.limit);
    },
  };
}
