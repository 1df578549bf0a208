import { and, asc, count, eq, isNull, ne } from 'drizzle-orm';
import type { Role } from '../../../shared/permissions.ts';
import type { Db } from '../../db/client.ts';
import { members, users } from '../../db/schema/people.ts';

export type MemberRow = typeof members.$inferSelect;
export interface NamedMember {
  member: MemberRow;
  name: string;
  email: string;
  disabledAt: Date | null;
}

const named = { member: members, name: users.name, email: users.email, disabledAt: users.disabledAt };

export function createMembersRepo(db: Db) {
  const keyOf = (libraryId: number, userId: string) =>
    and(eq(members.libraryId, libraryId), eq(members.userId, userId));
  return {
    /** Adds a member or changes the role of one. */
    set(row: typeof members.$inferInsert): void {
      db.insert(members)
        .values(row)
        .onConflictDoUpdate({ target: [members.libraryId, members.userId], set: { role: row.role } })
        .run();
    },
    find: (libraryId: number, userId: string): NamedMember | undefined =>
      db
        .select(named)
        .from(members)
        .innerJoin(users, eq(users.id, members.userId))
        .where(keyOf(libraryId, userId))
        .get(),
    remove: (libraryId: number, userId: string): boolean =>
      db.delete(members).where(keyOf(libraryId, userId)).run().changes === 1,
    list: (libraryId: number): NamedMember[] =>
      db
        .select(named)
        .from(members)
        .innerJoin(users, eq(users.id, members.userId))
        .where(eq(members.libraryId, libraryId))
        .orderBy(asc(users.name), asc(users.id))
        .all(),
    /** Maintainers besides one person who can still act. */
    countOtherMaintainers: (libraryId: number, userId: string): number =>
      db
        .select({ n: count() })
        .from(members)
        .innerJoin(users, eq(users.id, members.userId))
        .where(
          and(
            eq(members.libraryId, libraryId),
            eq(members.role, 'maintainer' satisfies Role),
            ne(members.userId, userId),
            isNull(users.disabledAt),
          ),
        )
        .get()?.n ?? 0,
  };
}

export type MembersRepo = ReturnType<typeof createMembersRepo>;
