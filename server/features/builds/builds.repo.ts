import { and, desc, eq, lt, sql } from 'drizzle-orm';
import type { Db } from '../../db/client.ts';
import { builds, libraries } from '../../db/schema/libraries.ts';
import { runs } from '../../db/schema/runs.ts';

export type BuildRow = typeof builds.$inferSelect;

export function createBuildsRepo(db: Db) {
  const runCount = sql<number>`(select count(*) from ${runs} where ${runs.buildId} = ${builds.id})`;
  const selectCounted = () =>
    db
      .select({ build: builds, library: libraries.slug, runCount })
      .from(builds)
      .innerJoin(libraries, eq(libraries.id, builds.libraryId));
  return {
    insert: (row: typeof builds.$inferInsert): BuildRow => db.insert(builds).values(row).returning().get(),
    find: (id: number): BuildRow | undefined => db.select().from(builds).where(eq(builds.id, id)).get(),
    findByCommit: (libraryId: number, commit: string): BuildRow | undefined =>
      db
        .select()
        .from(builds)
        .where(and(eq(builds.libraryId, libraryId), eq(builds.commit, commit)))
        .get(),
    findCounted: (id: number) => selectCounted().where(eq(builds.id, id)).get(),
    moveTo(id: number, folder: string): void {
      db.update(builds).set({ folder }).where(eq(builds.id, id)).run();
    },
    /** Newest first. */
    listQuery(options: { libraryId: number; before?: number | undefined; limit: number }) {
      return selectCounted()
        .where(
          and(
            eq(builds.libraryId, options.libraryId),
            options.before === undefined ? undefined : lt(builds.id, options.before),
          ),
        )
        .orderBy(desc(builds.id))
        .limit(options.limit);
    },
  };
}
