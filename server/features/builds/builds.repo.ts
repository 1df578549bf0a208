import { and, desc, eq, inArray, lt, sql } from 'drizzle-orm';
import type { BuildState } from '../../../shared/schemas/builds.ts';
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
    findByContent: (libraryId: number, contentHash: string): BuildRow | undefined =>
      db
        .select()
        .from(builds)
        .where(and(eq(builds.libraryId, libraryId), eq(builds.contentHash, contentHash)))
        .get(),
    findCounted: (id: number) => selectCounted().where(eq(builds.id, id)).get(),
    moveTo(id: number, folder: string): void {
      db.update(builds).set({ folder }).where(eq(builds.id, id)).run();
    },
    update(id: number, set: Partial<BuildRow>): void {
      db.update(builds).set(set).where(eq(builds.id, id)).run();
    },
    /** Changes a build only while it is in one of these states; returns whether it did. */
    updateWhile(id: number, states: BuildState[], set: Partial<BuildRow>): boolean {
      const result = db
        .update(builds)
        .set(set)
        .where(and(eq(builds.id, id), inArray(builds.state, states)))
        .run();
      return result.changes === 1;
    },
    /** What the files in the store are needed for. */
    readNeeds: () =>
      db
        .select({ sourceKey: builds.sourceKey, address: builds.address, folder: builds.folder })
        .from(builds)
        .all(),
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

export type BuildsRepo = ReturnType<typeof createBuildsRepo>;
