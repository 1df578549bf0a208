import { and, desc, eq, lt } from 'drizzle-orm';
import type { Db } from '../../db/client.ts';
import { libraries } from '../../db/schema/libraries.ts';
import { auditLog } from '../../db/schema/operations.ts';

export function createAuditRepo(db: Db) {
  return {
    insert(row: typeof auditLog.$inferInsert): void {
      db.insert(auditLog).values(row).run();
    },
    /** Newest first. */
    listQuery(options: { libraryId?: number | undefined; before?: number | undefined; limit: number }) {
      return db
        .select({ entry: auditLog, library: libraries.slug })
        .from(auditLog)
        .leftJoin(libraries, eq(libraries.id, auditLog.libraryId))
        .where(
          and(
            options.libraryId === undefined ? undefined : eq(auditLog.libraryId, options.libraryId),
            options.before === undefined ? undefined : lt(auditLog.id, options.before),
          ),
        )
        .orderBy(desc(auditLog.id))
        .limit(options.limit);
    },
  };
}
