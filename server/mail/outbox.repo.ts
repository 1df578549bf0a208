import { and, asc, desc, eq, lt, lte, min } from 'drizzle-orm';
import type { Db } from '../db/client.ts';
import { mailOutbox } from '../db/schema/mail.ts';

export type OutboxRow = typeof mailOutbox.$inferSelect;

export function createOutboxRepo(db: Db) {
  return {
    insert: (row: typeof mailOutbox.$inferInsert): OutboxRow =>
      db.insert(mailOutbox).values(row).returning().get(),
    find: (id: number): OutboxRow | undefined =>
      db.select().from(mailOutbox).where(eq(mailOutbox.id, id)).get(),
    nextDue: (now: number): OutboxRow | undefined =>
      db
        .select()
        .from(mailOutbox)
        .where(and(eq(mailOutbox.state, 'waiting'), lte(mailOutbox.nextAt, now)))
        .orderBy(asc(mailOutbox.nextAt))
        .limit(1)
        .get(),
    /** When the next one is due; undefined where none waits. */
    nextTime: (): number | undefined =>
      db
        .select({ at: min(mailOutbox.nextAt) })
        .from(mailOutbox)
        .where(eq(mailOutbox.state, 'waiting'))
        .get()?.at ?? undefined,
    /** Changes a mail that is still as it was read, so that two processes never send the same one at once. */
    updateFrom(row: OutboxRow, change: Partial<typeof mailOutbox.$inferInsert>): boolean {
      const isSame = and(
        eq(mailOutbox.id, row.id),
        eq(mailOutbox.state, row.state),
        eq(mailOutbox.nextAt, row.nextAt),
      );
      return db.update(mailOutbox).set(change).where(isSame).run().changes === 1;
    },
    /** Newest first. */
    listQuery: (options: {
      state?: OutboxRow['state'] | undefined;
      before?: number | undefined;
      limit: number;
    }) =>
      db
        .select()
        .from(mailOutbox)
        .where(
          and(
            options.state === undefined ? undefined : eq(mailOutbox.state, options.state),
            options.before === undefined ? undefined : lt(mailOutbox.id, options.before),
          ),
        )
        .orderBy(desc(mailOutbox.id))
        .limit(options.limit),
  };
}

export type OutboxRepo = ReturnType<typeof createOutboxRepo>;
