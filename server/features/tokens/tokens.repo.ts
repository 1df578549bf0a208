import { and, desc, eq } from 'drizzle-orm';
import type { Db } from '../../db/client.ts';
import { botTokens } from '../../db/schema/people.ts';

export type TokenRow = typeof botTokens.$inferSelect;

export function createTokensRepo(db: Db) {
  return {
    insert: (row: typeof botTokens.$inferInsert): TokenRow =>
      db.insert(botTokens).values(row).returning().get(),
    find: (id: number): TokenRow | undefined => db.select().from(botTokens).where(eq(botTokens.id, id)).get(),
    findByHash: (tokenHash: string): TokenRow | undefined =>
      db.select().from(botTokens).where(eq(botTokens.tokenHash, tokenHash)).get(),
    findIn: (libraryId: number, id: number): TokenRow | undefined =>
      db
        .select()
        .from(botTokens)
        .where(and(eq(botTokens.libraryId, libraryId), eq(botTokens.id, id)))
        .get(),
    update: (id: number, change: Partial<typeof botTokens.$inferInsert>): void => {
      db.update(botTokens).set(change).where(eq(botTokens.id, id)).run();
    },
    /** Newest first. */
    list: (libraryId: number): TokenRow[] =>
      db.select().from(botTokens).where(eq(botTokens.libraryId, libraryId)).orderBy(desc(botTokens.id)).all(),
  };
}
