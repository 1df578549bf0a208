import { eq, gte, lt } from 'drizzle-orm';
import type { Db } from '../../db/client.ts';
import { buildPreviews } from '../../db/schema/libraries.ts';

export type BuildPreviewRow = typeof buildPreviews.$inferSelect;

export function createBuildPreviewsRepo(db: Db) {
  return {
    insert: (row: typeof buildPreviews.$inferInsert): BuildPreviewRow =>
      db.insert(buildPreviews).values(row).returning().get(),
    find: (id: number): BuildPreviewRow | undefined =>
      db.select().from(buildPreviews).where(eq(buildPreviews.id, id)).get(),
    setBuild(id: number, buildId: number): void {
      db.update(buildPreviews).set({ buildId }).where(eq(buildPreviews.id, id)).run();
    },
    dropExpired(now: number): void {
      db.delete(buildPreviews).where(lt(buildPreviews.expiresAt, now)).run();
    },
    /** What the files in the store are needed for. */
    readNeeds: (now: number) =>
      db
        .select({ sourceKey: buildPreviews.sourceKey, address: buildPreviews.address })
        .from(buildPreviews)
        .where(gte(buildPreviews.expiresAt, now))
        .all(),
  };
}

export type BuildPreviewsRepo = ReturnType<typeof createBuildPreviewsRepo>;
