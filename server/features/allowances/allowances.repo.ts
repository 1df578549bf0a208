import { and, desc, eq, lt } from 'drizzle-orm';
import { AppError } from '../../../shared/errors.ts';
import { type Db, isConstraintError } from '../../db/client.ts';
import { allowanceRevisions } from '../../db/schema/references.ts';

export type AllowanceRow = typeof allowanceRevisions.$inferSelect;

export function createAllowancesRepo(db: Db) {
  return {
    insert(row: typeof allowanceRevisions.$inferInsert): AllowanceRow {
      try {
        return db.insert(allowanceRevisions).values(row).returning().get();
      } catch (error) {
        if (!isConstraintError(error, 'UNIQUE')) throw error;
        throw new AppError('conflict', 'Somebody else has set the allowances meanwhile.', { cause: error });
      }
    },
    find: (libraryId: number, number: number): AllowanceRow | undefined =>
      db
        .select()
        .from(allowanceRevisions)
        .where(and(eq(allowanceRevisions.libraryId, libraryId), eq(allowanceRevisions.number, number)))
        .get(),
    /** Newest first. */
    listQuery: (options: { libraryId: number; before?: number | undefined; limit: number }) =>
      db
        .select()
        .from(allowanceRevisions)
        .where(
          and(
            eq(allowanceRevisions.libraryId, options.libraryId),
            options.before === undefined ? undefined : lt(allowanceRevisions.number, options.before),
          ),
        )
        .orderBy(desc(allowanceRevisions.number))
        .limit(options.limit),
  };
}
