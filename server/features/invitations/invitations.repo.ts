import { and, desc, eq, gt, isNull } from 'drizzle-orm';
import type { Db } from '../../db/client.ts';
import { invitations } from '../../db/schema/people.ts';

export type InvitationRow = typeof invitations.$inferSelect;

export function createInvitationsRepo(db: Db) {
  return {
    insert: (row: typeof invitations.$inferInsert): InvitationRow =>
      db.insert(invitations).values(row).returning().get(),
    findIn: (libraryId: number, id: number): InvitationRow | undefined =>
      db
        .select()
        .from(invitations)
        .where(and(eq(invitations.libraryId, libraryId), eq(invitations.id, id)))
        .get(),
    findByHash: (tokenHash: string): InvitationRow | undefined =>
      db.select().from(invitations).where(eq(invitations.tokenHash, tokenHash)).get(),
    findOpen: (libraryId: number, email: string, now: number): InvitationRow | undefined =>
      db
        .select()
        .from(invitations)
        .where(
          and(
            eq(invitations.libraryId, libraryId),
            eq(invitations.email, email),
            isNull(invitations.acceptedAt),
            isNull(invitations.revokedAt),
            gt(invitations.expiresAt, now),
          ),
        )
        .get(),
    update: (id: number, change: Partial<typeof invitations.$inferInsert>): InvitationRow | undefined =>
      db.update(invitations).set(change).where(eq(invitations.id, id)).returning().get(),
    /** Newest first. */
    list: (libraryId: number): InvitationRow[] =>
      db
        .select()
        .from(invitations)
        .where(eq(invitations.libraryId, libraryId))
        .orderBy(desc(invitations.id))
        .all(),
  };
}
